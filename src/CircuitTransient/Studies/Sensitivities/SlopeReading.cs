using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Reads quantities and their derivatives with respect to values off the segments: linear ones, and
/// products by the product rule.</summary>
internal sealed class SlopeReading(
    TransientSolution solution, ImmutableArray<Variation> variations, SegmentFrame[] frames,
    SegmentSlopes?[][] slopes, double[][] starts)
{
    private readonly Dictionary<(int Segment, int Value, Measurand Quantity), double[]> coefficients = [];
    private double[] functions = [];
    private (int Segment, double Tau) evaluated = (-1, 0);

    /// <summary>Reads derivatives of integrals.</summary>
    public IntegralSlopes Integrals => field ??= new IntegralSlopes(this);

    /// <summary>How the start of an interval goes with a value.</summary>
    public double StartShift(int interval, int value) => starts[interval][value];

    /// <summary>The solution.</summary>
    public TransientSolution Solution => solution;

    /// <summary>A segment's frame.</summary>
    public SegmentFrame FrameOf(int segment) => frames[segment];

    /// <summary>Whether the derivatives with respect to a value are known on a segment.</summary>
    public bool IsKnown(int segment, int value) => slopes[segment][value] is not null;

    /// <summary>A quantity, its rate and that one's rate; of an integral, its integrand; null where it is
    /// left open.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="segment">The segment.</param>
    /// <param name="tau">Seconds from the segment's start.</param>
    public (double Value, double Slope, double Bend)? At(Measurand quantity, int segment, double tau)
    {
        if (QuantityFactors.OfAny(solution.Circuit, quantity) is not { } product)
        {
            return Linear(quantity, segment, tau);
        }

        if (Linear(product.First, segment, tau) is not { } a
            || Linear(product.Second, segment, tau) is not { } b)
        {
            return null;
        }

        return (product.Factor * a.Value * b.Value,
            product.Factor * ((a.Slope * b.Value) + (a.Value * b.Slope)),
            product.Factor * ((a.Bend * b.Value) + (2 * a.Slope * b.Slope) + (a.Value * b.Bend)));
    }

    /// <summary>The derivative of a quantity with respect to a value at a fixed instant, and the derivative
    /// of its rate; of an integral, those of its integrand; null where it is left open.</summary>
    public (double Value, double Slope)? SlopeOf(Measurand quantity, int segment, double tau, int value)
    {
        if (QuantityFactors.OfAny(solution.Circuit, quantity) is not { } product)
        {
            return LinearSlope(quantity, segment, tau, value);
        }

        if (Linear(product.First, segment, tau) is not { } a
            || Linear(product.Second, segment, tau) is not { } b
            || LinearSlope(product.First, segment, tau, value) is not { } da
            || LinearSlope(product.Second, segment, tau, value) is not { } db)
        {
            return null;
        }

        var factor = FactorSlope(quantity, value);
        return (
            (factor * a.Value * b.Value) + (product.Factor * ((da.Value * b.Value) + (a.Value * db.Value))),
            (factor * ((a.Slope * b.Value) + (a.Value * b.Slope)))
                + (product.Factor * ((da.Slope * b.Value) + (da.Value * b.Slope)
                    + (a.Slope * db.Value) + (a.Value * db.Slope))));
    }

    /// <summary>The derivative of a quantity, an integral since t = 0 among them.</summary>
    public double? ValueSlope(Measurand quantity, int segment, double tau, int value) =>
        QuantityFactors.OfAny(solution.Circuit, quantity) is { IsIntegrated: true }
            ? Integrals.Of(quantity, (0, 0), segment, tau, value)
            : SlopeOf(quantity, segment, tau, value)?.Value;

    /// <summary>The derivative of the limit of a quantity for t → ∞ if a segment went on; null where there is
    /// none, or where it is not known.</summary>
    public double? FinalSlope(Measurand quantity, int segment, int value)
    {
        if (QuantityFactors.OfAny(solution.Circuit, quantity) is not { } product)
        {
            return Limit(SlopesIn(segment, quantity, value));
        }

        var (a, b) = (Limit(NominalIn(segment, product.First)), Limit(NominalIn(segment, product.Second)));
        var (da, db) = (Limit(SlopesIn(segment, product.First, value)),
            Limit(SlopesIn(segment, product.Second, value)));
        return product.IsIntegrated ? null
            : (FactorSlope(quantity, value) * a * b) + (product.Factor * ((da * b) + (a * db)));

        double? Limit(double[]? sum) => sum is null ? null
            : FinalSlopes.Of(frames[segment].Driven.Basis, sum, solution.Segments[segment].Length);
    }

    /// <summary>How the factor of a product goes with a value: half a capacitance or inductance, a mutual
    /// inductance.</summary>
    public double FactorSlope(Measurand quantity, int value) => quantity switch
    {
        EnergyIn e when solution.Circuit.Parts[e.Part] is Capacitor c =>
            (e.Delivered ? -0.5 : 0.5) * variations[value].SlopeOf(c.Capacitance),
        EnergyIn e when solution.Circuit.Parts[e.Part] is Inductor l =>
            (e.Delivered ? -0.5 : 0.5) * variations[value].SlopeOf(l.Inductance),
        CouplingEnergy k => (double)variations[value].MutualSlope(solution.Circuit.Couplings[k.Coupling]),
        _ => 0,
    };

    /// <summary>The coefficients of a linear quantity itself in the functions of a segment's frame.</summary>
    public double[]? NominalIn(int segment, Measurand quantity)
    {
        if (!frames[segment].Model.Project(quantity).Output.IsDetermined)
        {
            return null;
        }

        const int itself = -1;
        var frame = frames[segment];
        return Kept((segment, itself, quantity), () => frame.Rounded(
            frame.Modes.Coefficients(frame.Model.Project(quantity), frame.Total)));
    }

    /// <summary>The coefficients of a linear quantity's derivative in the functions of a segment's
    /// frame.</summary>
    public double[]? SlopesIn(int segment, Measurand quantity, int value)
    {
        var whose = quantity is RateOfChange rate ? rate.Of : quantity;
        return slopes[segment][value] is { } known
            && frames[segment].Model.Project(whose).Output.IsDetermined
            ? Kept((segment, value, quantity), () => frames[segment].Rounded(known.Coefficients(quantity)))
            : null;
    }

    private (double Value, double Slope, double Bend)? Linear(Measurand quantity, int segment, double tau)
    {
        if (NominalIn(segment, quantity) is not { } c)
        {
            return null;
        }

        var basis = frames[segment].Driven.Basis;
        var first = basis.Differentiate(c);
        Evaluate(segment, tau);
        return (DotProduct.Of(c, functions), DotProduct.Of(first, functions),
            DotProduct.Of(basis.Differentiate(first), functions));
    }

    private (double Value, double Slope)? LinearSlope(Measurand quantity, int segment, double tau, int value)
    {
        if (SlopesIn(segment, quantity, value) is not { } c)
        {
            return null;
        }

        Evaluate(segment, tau);
        return (DotProduct.Of(c, functions),
            DotProduct.Of(frames[segment].Driven.Basis.Differentiate(c), functions));
    }

    private void Evaluate(int segment, double tau)
    {
        if (evaluated != (segment, tau))
        {
            functions = new double[frames[segment].Driven.Basis.Width];
            frames[segment].Driven.Basis.Evaluate(tau, functions);
            evaluated = (segment, tau);
        }
    }

    private double[] Kept((int, int, Measurand) key, Func<double[]> make)
    {
        if (!coefficients.TryGetValue(key, out var known))
        {
            coefficients.Add(key, known = make());
        }

        return known;
    }
}
