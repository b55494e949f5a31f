using System.Collections.Immutable;

namespace CircuitTransient.Solutions.Curves;

/// <summary>A factor times the product of two linear quantities.</summary>
public sealed record ProductTerm(double Factor, LinearPiece First, LinearPiece Second);

/// <summary>A sum of products: a power, a stored energy, the joint part of several causes.</summary>
public sealed class QuadraticPiece(SegmentTable table, ImmutableArray<ProductTerm> terms) : CurvePiece(table)
{
    /// <summary>The products.</summary>
    public ImmutableArray<ProductTerm> Terms => terms;

    /// <inheritdoc/>
    public override (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi)
    {
        double value = 0, slope = 0, bend = 0;
        foreach (var term in terms)
        {
            var (a, a1, a2) = term.First.At(tau, phi);
            var (b, b1, b2) = term.Second.At(tau, phi);
            value += term.Factor * a * b;
            slope += term.Factor * ((a1 * b) + (a * b1));
            bend += term.Factor * ((a2 * b) + (2 * a1 * b1) + (a * b2));
        }

        return (value, slope, bend);
    }

    /// <inheritdoc/>
    public override double ValueAt(double tau, ReadOnlySpan<double> phi)
    {
        double value = 0;
        foreach (var term in terms)
        {
            value += term.Factor * term.First.ValueAt(tau, phi) * term.Second.ValueAt(tau, phi);
        }

        return value;
    }

    /// <inheritdoc/>
    public override double MagnitudeWithin(ReadOnlySpan<double> envelope)
    {
        double sum = 0;
        foreach (var term in terms)
        {
            sum += Math.Abs(term.Factor) * term.First.MagnitudeWithin(envelope)
                * term.Second.MagnitudeWithin(envelope);
        }

        return sum;
    }

    /// <inheritdoc/>
    public override TaylorModel Around(
        double tau, double half, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope)
    {
        var sum = TaylorModel.Zero;
        foreach (var term in terms)
        {
            var first = term.First.Around(tau, half, phi, envelope);
            var second = ReferenceEquals(term.First, term.Second)
                ? first
                : term.Second.Around(tau, half, phi, envelope);
            sum = sum.Plus(term.Factor, first.Times(second));
        }

        return sum;
    }
}
