using System.Collections.Immutable;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>The values of all integrals among a set of curves, moved forward together from instant to
/// instant, so that the functions of time are evaluated once for all of them.</summary>
internal sealed class GatheredIntegrals
{
    private readonly ImmutableArray<Curve> curves;
    private readonly int[] integrals;
    private readonly double?[] values;
    private int segment = -1;
    private double tau;

    public GatheredIntegrals(ImmutableArray<Curve> curves)
    {
        this.curves = curves;
        integrals =
            [.. Enumerable.Range(0, curves.Length).Where(c => curves[c].Pieces[0] is AccumulatedPiece)];
        values = new double?[curves.Length];
    }

    /// <summary>The value of a curve where the set stands; null for one that is no integral.</summary>
    public double? ValueOf(int curve) => values[curve];

    /// <summary>Moves to an instant of a segment, not earlier than the last one.</summary>
    public void MoveTo(int nextSegment, double nextTau)
    {
        if (integrals.Length == 0)
        {
            return;
        }

        if (nextSegment != segment)
        {
            segment = nextSegment;
            tau = 0;
            foreach (var c in integrals)
            {
                values[c] = Piece(c).Tabulated[0];
            }
        }

        var basis = Piece(integrals[0]).Segment.Basis;
        var phi = new double[basis.Width];
        Quadrature.Visit(basis, tau, nextTau, (instant, weight) =>
        {
            basis.Evaluate(instant, phi);
            foreach (var c in integrals)
            {
                if (instant >= Piece(c).From)
                {
                    values[c] += weight * Piece(c).Rate.ValueAt(instant, phi);
                }
            }
        });
        tau = nextTau;
    }

    private AccumulatedPiece Piece(int curve) => (AccumulatedPiece)curves[curve].Pieces[segment];
}
