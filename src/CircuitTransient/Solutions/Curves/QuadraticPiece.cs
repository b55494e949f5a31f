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
            var (b, b1, b2) = ReferenceEquals(term.First, term.Second) ? (a, a1, a2)
                : term.Second.At(tau, phi);
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
            var a = term.First.ValueAt(tau, phi);
            value += term.Factor * a * (ReferenceEquals(term.First, term.Second) ? a
                : term.Second.ValueAt(tau, phi));
        }

        return value;
    }

    /// <summary>Bounds of the magnitudes of value, first, second and third derivative.</summary>
    public (double Value, double First, double Second, double Third) Bounds(ReadOnlySpan<double> envelope)
    {
        double value = 0, first = 0, second = 0, third = 0;
        foreach (var term in terms)
        {
            var a = term.First.Bounds(envelope);
            var b = ReferenceEquals(term.First, term.Second) ? a : term.Second.Bounds(envelope);
            var f = Math.Abs(term.Factor);
            value += f * a.Value * b.Value;
            first += f * ((a.First * b.Value) + (a.Value * b.First));
            second += f * ((a.Second * b.Value) + (2 * a.First * b.First) + (a.Value * b.Second));
            third += f * ((a.Third * b.Value) + (3 * a.Second * b.First) + (3 * a.First * b.Second)
                + (a.Value * b.Third));
        }

        return (value, first, second, third);
    }

    /// <inheritdoc/>
    public override (double Second, double Third) DerivativeBounds(ReadOnlySpan<double> envelope)
    {
        var (_, _, second, third) = Bounds(envelope);
        return (second, third);
    }

    /// <inheritdoc/>
    public override double UpperBetween(
        double sign, double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last,
        ReadOnlySpan<double> envelope)
    {
        double start = 0, end = 0, bend = 0, fast = 0;
        foreach (var (factor, a, b) in Splits(width, first, last, envelope))
        {
            start += factor * a.First * b.First;
            end += factor * a.Last * b.Last;
            bend += Math.Abs(factor) * ((a.Bend * b.Size) + (2 * a.Rate * b.Rate) + (a.Size * b.Bend));
            fast += Math.Abs(factor) * ((a.Fast * (b.Size + b.Fast)) + (a.Size * b.Fast));
        }

        return Math.Max(sign * start, sign * end) + (width * width / 8 * bend) + fast;
    }

    /// <inheritdoc/>
    public override double UpperAround(
        double sign, double half, double tau, ReadOnlySpan<double> middle, ReadOnlySpan<double> envelope)
    {
        double value = 0, slope = 0, bend = 0, fast = 0;
        foreach (var (factor, a, b) in Splits(2 * half, middle, middle, envelope))
        {
            value += factor * a.First * b.First;
            slope += factor * ((a.Slope * b.First) + (a.First * b.Slope));
            bend += Math.Abs(factor) * ((a.Bend * b.Size) + (2 * a.Rate * b.Rate) + (a.Size * b.Bend));
            fast += Math.Abs(factor) * ((a.Fast * (b.Size + b.Fast)) + (a.Size * b.Fast));
        }

        return (sign * value) + (half * Math.Abs(slope)) + (half * half / 2 * bend) + fast;
    }

    /// <inheritdoc/>
    public override void Expand(
        double half, double tau, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope,
        ref Expansion expansion)
    {
        Span<double> first = stackalloc double[Expansion.Order];
        Span<double> second = stackalloc double[Expansion.Order];
        foreach (var term in terms)
        {
            first.Clear();
            var a = new Expansion(first);
            term.First.Expand(half, tau, phi, envelope, ref a);
            if (ReferenceEquals(term.First, term.Second))
            {
                expansion.AddProduct(term.Factor, a, a);
                continue;
            }

            second.Clear();
            var b = new Expansion(second);
            term.Second.Expand(half, tau, phi, envelope, ref b);
            expansion.AddProduct(term.Factor, a, b);
        }
    }

    private (double Factor, SlowAndFast First, SlowAndFast Second)[] Splits(
        double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last, ReadOnlySpan<double> envelope)
    {
        var splits = new (double, SlowAndFast, SlowAndFast)[terms.Length];
        for (var k = 0; k < splits.Length; k++)
        {
            var a = terms[k].First.Split(width, first, last, envelope);
            var b = ReferenceEquals(terms[k].First, terms[k].Second)
                ? a
                : terms[k].Second.Split(width, first, last, envelope);
            splits[k] = (terms[k].Factor, a, b);
        }

        return splits;
    }
}
