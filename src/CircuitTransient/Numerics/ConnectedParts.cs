namespace CircuitTransient.Numerics;

/// <summary>The coordinates of a square matrix in sets that no entry connects, so that what is independent is
/// never mixed by rounding.</summary>
internal static class ConnectedParts
{
    /// <summary>The sets, each ascending, by least member.</summary>
    public static IReadOnlyList<int[]> Of(DoubleDoubleMatrix a)
    {
        var n = a.Rows;
        int[] name = [.. Enumerable.Range(0, n)];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                if (!a[i, j].IsZero && name[i] != name[j])
                {
                    (var kept, var lost) = (Math.Min(name[i], name[j]), Math.Max(name[i], name[j]));
                    for (var k = 0; k < n; k++)
                    {
                        name[k] = name[k] == lost ? kept : name[k];
                    }
                }
            }
        }

        return [.. Enumerable.Range(0, n).GroupBy(i => name[i]).Select(group => group.ToArray())];
    }
}
