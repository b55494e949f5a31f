namespace CircuitTransient.Circuits;

/// <summary>The known name that an unknown one was most likely meant to be.</summary>
internal static class NearestName
{
    /// <summary>The nearest name by edit distance (insertion, deletion, replacement, exchange of neighbours,
    /// letter case free), or null where none is near.</summary>
    public static string? Find(string name, IEnumerable<string> known)
    {
        string? nearest = null;
        var least = Math.Max(1, name.Length / 3) + 1;
        foreach (var candidate in known)
        {
            if (Math.Abs(candidate.Length - name.Length) >= least || candidate == name)
            {
                continue;
            }

            var distance = Distance(name.ToUpperInvariant(), candidate.ToUpperInvariant());
            if (distance < least)
            {
                (least, nearest) = (distance, candidate);
            }
        }

        return nearest;
    }

    private static int Distance(string a, string b)
    {
        int[] beforeLast = new int[b.Length + 1], last = new int[b.Length + 1], current = new int[b.Length + 1];
        for (var j = 0; j <= b.Length; j++)
        {
            last[j] = j;
        }

        for (var i = 1; i <= a.Length; i++)
        {
            current[0] = i;
            for (var j = 1; j <= b.Length; j++)
            {
                var replaced = last[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
                current[j] = Math.Min(Math.Min(last[j] + 1, current[j - 1] + 1), replaced);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    current[j] = Math.Min(current[j], beforeLast[j - 2] + 1);
                }
            }

            (beforeLast, last, current) = (last, current, beforeLast);
        }

        return last[b.Length];
    }
}
