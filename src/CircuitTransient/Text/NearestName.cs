namespace CircuitTransient.Text;

/// <summary>The known name a mistyped one most likely meant.</summary>
public static class NearestName
{
    private const int LongestCompared = 64; // longer words are no slips of the finger; keeps the work bounded

    /// <summary>The nearest candidate, or null where none is near enough: a third of
    /// the letters may differ.</summary>
    public static string? Find(string word, IEnumerable<string> candidates)
    {
        string? nearest = null;
        var least = Math.Max(1, word.Length / 3) + 1;
        foreach (var candidate in candidates)
        {
            if (candidate == word || word.Length > LongestCompared || candidate.Length > LongestCompared
                || Math.Abs(candidate.Length - word.Length) >= least)
            {
                continue;
            }

            // Letters that differ only in case count nothing, so `RPRE` finds `Rpre` however long it is.
            var distance = Distance(word.ToUpperInvariant(), candidate.ToUpperInvariant());
            if (distance < least && distance < Math.Max(word.Length, candidate.Length))
            {
                least = distance;
                nearest = candidate;
            }
        }

        return nearest;
    }

    /// <summary>The least number of letters inserted, left out, exchanged or
    /// swapped with their neighbour.</summary>
    private static int Distance(string a, string b)
    {
        // Optimal string alignment: the recurrence of Damerau (1964) and Levenshtein (1966), from memory.
        var before = new int[b.Length + 1];
        var previous = new int[b.Length + 1];
        var current = new int[b.Length + 1];
        for (var j = 0; j <= b.Length; j++)
        {
            previous[j] = j;
        }

        for (var i = 1; i <= a.Length; i++)
        {
            current[0] = i;
            for (var j = 1; j <= b.Length; j++)
            {
                var exchanged = previous[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
                current[j] = Math.Min(exchanged, Math.Min(previous[j], current[j - 1]) + 1);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    current[j] = Math.Min(current[j], before[j - 2] + 1);
                }
            }

            (before, previous, current) = (previous, current, before);
        }

        return previous[b.Length];
    }
}
