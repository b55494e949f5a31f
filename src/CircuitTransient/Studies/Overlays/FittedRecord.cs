using CircuitTransient.Studies.Sensitivities;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A record as the fit sees it: its samples, its circuit that varies, its own offset, gain and
/// level.</summary>
/// <param name="Placed">The record.</param>
/// <param name="Varied">Its circuit.</param>
/// <param name="Samples">Its samples, thinned.</param>
/// <param name="Noise">Their noise.</param>
internal sealed record FittedRecord(
    PlacedRecord Placed, VariedCircuit Varied, RecordSamples Samples, double Noise)
{
    /// <summary>How many of offset, gain and level are estimated.</summary>
    public int OwnCount =>
        (Placed.Given.Offset is null ? 1 : 0) + (Placed.Given.Gain is null ? 1 : 0)
        + (Placed.Given.Level is null ? 1 : 0);

    /// <summary>Offset, gain and level of which some are given.</summary>
    public (double Offset, double Gain, double Level) Own(ReadOnlySpan<double> free)
    {
        var n = 0;
        return (Placed.Given.Offset ?? free[n++], Placed.Given.Gain ?? free[n++],
            Placed.Given.Level ?? free[n]);
    }

    /// <summary>Those that are estimated.</summary>
    public double[] Free(double offset, double gain, double level)
    {
        var free = new List<double>();
        if (Placed.Given.Offset is null)
        {
            free.Add(offset);
        }

        if (Placed.Given.Gain is null)
        {
            free.Add(gain);
        }

        if (Placed.Given.Level is null)
        {
            free.Add(level);
        }

        return [.. free];
    }

    /// <summary>The model at some values on the record's instants: values, rates and slopes by the values;
    /// null where there is no solution.</summary>
    public (double[] Values, double[] Rates, double[] Slopes)? Evaluate(
        double[] values, RecordSamples samples, double offset, CancellationToken cancellation)
    {
        var analysis = SensitivityAnalysis.Of(Varied, values, cancellation);
        if (!analysis.Succeeded
            || ModelCurve.Of(analysis.Value.Solution, Placed.Observation) is not { Value: { } model })
        {
            return null;
        }

        var until = model.Until;
        var times = Array.ConvertAll(samples.Times, t => Math.Clamp(t - offset, 0, until));
        var (at, rates) = (new double[times.Length], new double[times.Length]);
        model.Evaluate(Array.ConvertAll(samples.Times, t => t - offset), at, rates);
        var slopes = new double[times.Length * values.Length];
        return analysis.Value.Samples(Placed.Observation.Quantity, times, at, slopes)
            ? (at, rates, slopes)
            : null;
    }
}
