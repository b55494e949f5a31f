using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Derivatives of absorbed energies and Joule integrals: the integral of the integrand's derivative,
/// and at each instant that moves the step of the integrand there.</summary>
internal sealed class IntegralSlopes(SlopeReading reading)
{
    private readonly Dictionary<(int Segment, double Tau), double[,]> grams = [];

    /// <summary>The derivative of an integral at an instant; null where it is not known: with an impulse in
    /// it an integral is no sum of products.</summary>
    /// <param name="quantity">The integral.</param>
    /// <param name="from">Since when it gathers, in seconds, and how that goes with the value.</param>
    /// <param name="segment">The segment of the instant.</param>
    /// <param name="tau">Seconds from the segment's start.</param>
    /// <param name="value">Index of the value.</param>
    public double? Of(
        Measurand quantity, (double Time, double Shift) from, int segment, double tau, int value)
    {
        var solution = reading.Solution;
        var first = solution.SegmentAt(from.Time);
        double sum = 0;
        for (var s = first; s <= segment; s++)
        {
            var low = Math.Max(0, from.Time - solution.Segments[s].Start);
            var high = s == segment ? tau : solution.Segments[s].Length;
            if (HasImpulse(quantity, s, from.Time) || Between(quantity, s, low, high, value) is not { } own)
            {
                return null;
            }

            sum += own;
            var isMoved = s == first ? from.Shift : Moved(s, value);
            if (isMoved != 0)
            {
                var before = s == first ? 0
                    : reading.At(quantity, s - 1, solution.Segments[s - 1].Length)!.Value.Value;
                sum += isMoved * (before - reading.At(quantity, s, low)!.Value.Value);
            }
        }

        return sum;
    }

    private double Moved(int segment, int value)
    {
        var interval = reading.Solution.Segments[segment].Interval;
        return reading.Solution.Intervals[interval].FirstSegment == segment
            ? reading.StartShift(interval, value) : 0;
    }

    private bool HasImpulse(Measurand quantity, int s, double from)
    {
        var part = quantity switch
        {
            EnergyIn e => e.Part,
            JouleIntegral j => j.Part,
            _ => throw new System.Diagnostics.UnreachableException($"{quantity} is no integral"),
        };
        var segment = reading.Solution.Segments[s];
        return segment.Start >= from
            && (segment.ImpulseAtStart(new CurrentThrough(part)) != 0
                || segment.ImpulseAtStart(new VoltageAcross(part)) != 0);
    }

    private double? Between(Measurand quantity, int s, double low, double high, int value)
    {
        var product = QuantityFactors.OfAny(reading.Solution.Circuit, quantity)!;
        if (reading.NominalIn(s, product.First) is not { } a
            || reading.NominalIn(s, product.Second) is not { } b
            || reading.SlopesIn(s, product.First, value) is not { } da
            || reading.SlopesIn(s, product.Second, value) is not { } db)
        {
            return null;
        }

        var basis = reading.FrameOf(s).Driven.Basis;
        const int mostBlocks = 6; // beyond, the integrals of pairs of blocks cost more than instants do
        return product.Factor * (basis.Modes.Count(m => m.Kind == ModeKind.Pole && m.Order > 1) > mostBlocks
            ? BySampling(basis, low, high)
            : Closed(high) - (low > 0 ? Closed(low) : 0));

        double Closed(double until)
        {
            var gram = Gram(s, until);
            return GramIntegral.Form(gram, a, db) + GramIntegral.Form(gram, b, da);
        }

        double BySampling(SegmentBasis functions, double start, double end)
        {
            double sum = 0;
            var phi = new double[functions.Width];
            Quadrature.Visit(functions, start, end, (instant, weight) =>
            {
                functions.Evaluate(instant, phi);
                sum += weight * ((DotProduct.Of(a, phi) * DotProduct.Of(db, phi))
                    + (DotProduct.Of(b, phi) * DotProduct.Of(da, phi)));
            });
            return sum;
        }
    }

    private double[,] Gram(int s, double until)
    {
        if (!grams.TryGetValue((s, until), out var gram))
        {
            grams.Add((s, until), gram = GramIntegral.Of(reading.FrameOf(s).Driven.Basis, until));
        }

        return gram;
    }
}
