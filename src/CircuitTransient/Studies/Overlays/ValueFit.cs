using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Fits values to records: first to their beginnings, then to ever longer parts, so that a ring of
/// another frequency is caught before it falls out of step.</summary>
internal sealed class ValueFit(
    IReadOnlyList<FittedRecord> records, double[] nominal, CancellationToken cancellation)
{
    private const int Halvings = 5;
    private const double RoughEnough = 1e-4; // part of Σ r²
    private const double FineEnough = 1e-10; // moves a value by a thousandth of its standard error at most
    private const int FewestSamples = 24; // of each record in the shortest part

    private readonly FitSystem system = new(records, nominal, cancellation);

    /// <summary>The system, for what it counted and where the values stand.</summary>
    public FitSystem System => system;

    /// <summary>Fits; null where the circuits have no solution at the start.</summary>
    /// <param name="logarithms">First logarithms of the values over their nominal ones.</param>
    public LeastSquaresResult? Run(double[] logarithms)
    {
        var curves = CurvesAt(logarithms);
        if (curves is null)
        {
            return null;
        }

        var from = curves.Min(c => OnsetOf(c));
        var until = curves.Max(c => c.Until);
        var first = ShortestPart(from, until);
        if (Start(curves, logarithms, from, first) is not { } x)
        {
            return null;
        }

        LeastSquaresResult? fit = null;
        for (var part = first; ; part = Math.Min(until, from + (2 * (part - from))))
        {
            var isWhole = part >= until;
            system.IsHeld = !isWhole;
            system.Look(x, isWhole ? 0 : Math.Max(0, from - (0.2 * (part - from))), part);
            fit = LeastSquares.Minimise(
                x, system.Linearise, radius: 0.3, mostSteps: isWhole ? 200 : 20,
                tolerance: isWhole ? FineEnough : RoughEnough);
            if (fit is null)
            {
                return null;
            }

            x = fit.X;
            if (isWhole)
            {
                break;
            }
        }

        // Once more with the samples that lie within the study where the offsets now stand.
        system.Look(x, 0, until);
        return LeastSquares.Minimise(
            x, system.Linearise, radius: 0.3, mostSteps: 200, tolerance: FineEnough) ?? fit;
    }

    private List<ModelCurve>? CurvesAt(double[] logarithms)
    {
        var values = nominal.Select((p, k) => p * Math.Exp(logarithms[k])).ToArray();
        var curves = new List<ModelCurve>();
        foreach (var record in records)
        {
            var curve = record.Varied.At(values)
                .Then(circuit => ModelCurve.Solve(circuit, record.Placed.Observation, cancellation));
            if (!curve.Succeeded)
            {
                return null;
            }

            curves.Add(curve.Value);
        }

        return curves;
    }

    private double ShortestPart(double from, double until)
    {
        for (var k = Halvings; k > 0; k--)
        {
            var part = from + ((until - from) / (1 << k));
            if (records.All(r => (part - from) / (until - from) * r.Samples.Count >= FewestSamples))
            {
                return part;
            }
        }

        return until;
    }

    /// <summary>Offsets, gains and levels at which the beginnings lie best.</summary>
    private double[]? Start(List<ModelCurve> curves, double[] logarithms, double from, double part)
    {
        var x = new List<double>();
        for (var i = 0; i < records.Count; i++)
        {
            if (StartOf(records[i], curves[i], from, part) is not var (offset, gain, level))
            {
                return null;
            }

            x.AddRange(records[i].Free(offset, gain, level));
        }

        return [.. x, .. logarithms];
    }

    private static (double Offset, double Gain, double Level)? StartOf(
        FittedRecord record, ModelCurve curve, double from, double part)
    {
        var given = record.Placed.Given;
        List<double> offsets = given.Offset is { } known ? [known]
            : [.. OffsetSearch.Candidates(record.Samples, curve, given),
                OnsetOf(record) - OnsetOf(curve)];
        (double Offset, double Gain, double Level)? best = null;
        var least = double.PositiveInfinity;
        foreach (var offset in offsets)
        {
            var begin = record.Samples.Between(
                offset + Math.Max(0, from - (0.2 * (part - from))), offset + part);
            if (begin.Count < 8
                || new RecordAlignment(curve, given with { Offset = offset })
                    .Near(begin, offset) is not { } near)
            {
                continue;
            }

            // Against the samples' own spread: where the record is flat, anything fits.
            var mean = begin.Values.Average();
            var left = near.Variance(0) / (begin.Values.Average(v => (v - mean) * (v - mean)) + Tiny(record));
            (best, least) = left < least ? ((near.Offset, near.Gain, near.Level), left) : (best, least);
        }

        return best;
    }

    private static double Tiny(FittedRecord record) => 1e-3 * record.Noise * record.Noise;

    /// <summary>When the model first moves by a hundredth of its range.</summary>
    private static double OnsetOf(ModelCurve curve)
    {
        const int steps = 2000;
        var times = Enumerable.Range(0, steps + 1).Select(k => k * curve.Until / steps).ToArray();
        var values = new double[times.Length];
        curve.Evaluate(times, values, null);
        var bound = 0.01 * (values.Max() - values.Min());
        var k = Array.FindIndex(values, v => Math.Abs(v - values[0]) > bound);
        return k > 0 ? times[k - 1] : 0;
    }

    /// <summary>When the record first leaves its noise.</summary>
    private static double OnsetOf(FittedRecord record)
    {
        var values = record.Samples.Values;
        var bound = Math.Max(8 * record.Noise, 0.01 * (values.Max() - values.Min()));
        var level = values.Take(8).Average();
        var k = Array.FindIndex(values, v => Math.Abs(v - level) > bound);
        return record.Samples.Times[Math.Max(0, k - 1)];
    }
}
