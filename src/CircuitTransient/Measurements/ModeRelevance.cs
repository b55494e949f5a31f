using System.Collections.Immutable;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>For how long each mode of each segment shows in a set of curves: until it has decayed to a
/// thousandth of the curve's own size. A mode of a part that nobody observes shows in none.</summary>
internal static class ModeRelevance
{
    private const double Visible = 1e-3; // of the curve's size: a line's width on a page

    /// <summary>For each segment and mode the number of its decay times for which it shows; negative where it
    /// never does, infinite where it does not decay.</summary>
    public static ImmutableArray<double[]> Of(TransientSolution solution, ImmutableArray<Curve> curves)
    {
        var shows =
            solution.Segments.Select(s => Enumerable.Repeat(-1.0, s.Basis.Modes.Length).ToArray()).ToArray();
        foreach (var lines in curves.SelectMany(LinearParts))
        {
            double size = 0;
            foreach (var piece in lines)
            {
                foreach (var value in piece.Tabulated)
                {
                    size = Math.Max(size, Math.Abs(value));
                }
            }

            for (var s = 0; s < lines.Length && size > 0; s++)
            {
                Extend(shows[s], lines[s], size);
            }
        }

        return [.. shows];
    }

    private static void Extend(double[] shows, LinearPiece piece, double size)
    {
        var modes = piece.Segment.Basis.Modes;
        for (var m = 0; m < modes.Length; m++)
        {
            double amplitude = 0;
            for (var k = 0; k < modes[m].Width; k++)
            {
                amplitude =
                    Math.Max(amplitude, Math.Abs(piece.Coefficients[piece.Segment.Basis.Place(m) + k]));
            }

            // A chain's or block's functions beyond the first grow with time before they decay.
            var grows = modes[m].CarrierCount > 1;
            shows[m] = grows && amplitude > 0
                ? Math.Max(shows[m], 9)
                : Math.Max(shows[m], Math.Log(amplitude / (Visible * size)));
        }
    }

    /// <summary>The linear quantities that a curve is made of, each over all segments.</summary>
    private static IEnumerable<LinearPiece[]> LinearParts(Curve curve)
    {
        var products = curve.Pieces.Select(p => p switch
        {
            LinearPiece linear => new[] { linear },
            QuadraticPiece quadratic => Factors(quadratic),
            AccumulatedPiece accumulated => Factors(accumulated.Rate),
            _ => [],
        }).ToArray();
        var count = products.Min(p => p.Length);
        return Enumerable.Range(0, count).Select(k => products.Select(p => p[k]).ToArray());
    }

    private static LinearPiece[] Factors(QuadraticPiece quadratic) =>
        [.. quadratic.Terms.SelectMany(t => new[] { t.First, t.Second })];
}
