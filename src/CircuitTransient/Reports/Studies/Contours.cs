using System.Collections.Immutable;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>Lines on which a constraint is just met, drawn through the scanned points of two parts.</summary>
internal static class Contours
{
    private const int Digits = 9; // of a logarithm: two triangles find the place on their common side alike

    /// <summary>Lines in the parts' values; the place between two points is interpolated in the
    /// logarithms.</summary>
    public static ImmutableArray<ImmutableArray<(double X, double Y)>> Of(SizeResult result, int constraint)
    {
        var pieces = new List<((double X, double Y) From, (double X, double Y) To)>();
        var (columns, rows) = (result.Axes[0], result.Axes[1]);
        for (var row = 0; row + 1 < rows.Length; row++)
        {
            for (var column = 0; column + 1 < columns.Length; column++)
            {
                // Two triangles a cell: a triangle is crossed by at most one piece, without a doubt which.
                var (near, far) = (At(row, column), At(row + 1, column + 1));
                Cross(near, At(row, column + 1), far);
                Cross(near, far, At(row + 1, column));
            }
        }

        return Joined(pieces);

        Corner At(int row, int column) => new(
            columns[column], rows[row], result.Points[(row * columns.Length) + column].Shares[constraint]);

        void Cross(Corner a, Corner b, Corner c)
        {
            (double X, double Y)[] places = [.. Met(a, b), .. Met(b, c), .. Met(c, a)];
            if (places is [var from, var to])
            {
                pieces.Add((from, to));
            }
        }
    }

    private static IEnumerable<(double X, double Y)> Met(Corner a, Corner b)
    {
        if (a.Share >= 0 == b.Share >= 0)
        {
            yield break;
        }

        var part = double.IsFinite(a.Share) && double.IsFinite(b.Share) ? a.Share / (a.Share - b.Share) : 0.5;
        yield return (a.X * Math.Pow(b.X / a.X, part), a.Y * Math.Pow(b.Y / a.Y, part));
    }

    // Pieces are strung together, so that dashes run on along a line.
    private static ImmutableArray<ImmutableArray<(double X, double Y)>> Joined(
        List<((double X, double Y) From, (double X, double Y) To)> pieces)
    {
        var at = pieces.SelectMany((piece, i) => new[] { (Key(piece.From), i), (Key(piece.To), i) })
            .ToLookup(end => end.Item1, end => end.i);
        var isUsed = new bool[pieces.Count];
        var lines = ImmutableArray.CreateBuilder<ImmutableArray<(double, double)>>();
        for (var i = 0; i < pieces.Count; i++)
        {
            if (!isUsed[i])
            {
                isUsed[i] = true;
                var line = new LinkedList<(double X, double Y)>([pieces[i].From, pieces[i].To]);
                while (Next(line.Last!.Value) is { } last)
                {
                    line.AddLast(last);
                }

                while (Next(line.First!.Value) is { } first)
                {
                    line.AddFirst(first);
                }

                lines.Add([.. line]);
            }
        }

        return lines.ToImmutable();

        (double X, double Y)? Next((double X, double Y) end)
        {
            foreach (var i in at[Key(end)])
            {
                if (!isUsed[i])
                {
                    isUsed[i] = true;
                    return Key(pieces[i].From) == Key(end) ? pieces[i].To : pieces[i].From;
                }
            }

            return null;
        }
    }

    private static (double X, double Y) Key((double X, double Y) place) =>
        (Math.Round(Math.Log(place.X), Digits), Math.Round(Math.Log(place.Y), Digits));

    private readonly record struct Corner(double X, double Y, double Share);
}
