using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>Finds what a set of equations leaves open: vectors n with E n = 0 and G n = 0.</summary>
internal static class OpenDirections
{
    /// <summary>A basis of the open directions; in each one unknown, held at zero in the solution, has the
    /// value 1.</summary>
    public static List<(int Fixed, SparseVector Direction)> Find(List<EquationRow> rows, int[] unknowns)
    {
        var reduced = new List<(int Pivot, SparseVector Row)>();
        foreach (var row in rows.SelectMany(r => new[] { r.E, r.G }))
        {
            var rest = row;
            foreach (var (pivot, earlier) in reduced)
            {
                rest = Clear(rest, pivot, earlier);
            }

            if (!rest.IsEmpty)
            {
                var pivot = rest.Terms.ToArray().MaxBy(t => Math.Abs(t.Value.Hi)).Index;
                for (var k = 0; k < reduced.Count; k++)
                {
                    reduced[k] = (reduced[k].Pivot, Clear(reduced[k].Row, pivot, rest));
                }

                reduced.Add((pivot, rest));
            }
        }

        var pivots = reduced.Select(r => r.Pivot).ToHashSet();
        return [.. unknowns.Where(u => !pivots.Contains(u)).Select(u => (u, Direction(u, reduced)))];
    }

    private static SparseVector Direction(int free, List<(int Pivot, SparseVector Row)> reduced) =>
        SparseVector.From(
            reduced.Select(r => (r.Pivot, -r.Row.At(free) / r.Row.At(r.Pivot)))
                .Append((free, DoubleDouble.One)));

    private static SparseVector Clear(SparseVector row, int pivot, SparseVector by)
    {
        var value = row.At(pivot);
        return value.IsZero ? row : SparseVector.Add(row, -value / by.At(pivot), by).Without(pivot);
    }
}
