using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Records laid over a circuit's solution.</summary>
/// <param name="Circuit">The circuit as the file has it.</param>
/// <param name="Records">One for each record, in the order given.</param>
/// <param name="Fit">The fitted values; null where none were asked for.</param>
public sealed record OverlayResult(
    Circuit Circuit, ImmutableArray<RecordComparison> Records, FitResult? Fit)
{
    /// <summary>Whether every record is explained to within its noise, and every value asked for was
    /// determined.</summary>
    public bool Agrees => Records.All(r => r.IsExplained) && Fit is null or { IsResolved: true };
}

/// <summary>A record against the model.</summary>
/// <param name="File">The record's name as the user gave it.</param>
/// <param name="Sha256">Of its bytes.</param>
/// <param name="Channel">The channel's title; empty where there is none.</param>
/// <param name="Observation">What the record shows.</param>
/// <param name="Unit">Unit of the values.</param>
/// <param name="Added">Parts that stand in this record's circuit and not in the file, as statements.</param>
/// <param name="Remarks">How the record was read and aligned, one sentence each.</param>
/// <param name="RowCount">Rows of the table.</param>
/// <param name="ClippedCount">Samples left out at the ends of the range.</param>
/// <param name="OutsideCount">Samples before or after the study.</param>
/// <param name="Alignment">How it lies over the model.</param>
/// <param name="Noise">The noise of its samples.</param>
/// <param name="Differences">Record less model.</param>
/// <param name="Highest">The greatest sample against the model's greatest value.</param>
/// <param name="Lowest">The least sample against the model's least value.</param>
/// <param name="Ring">The ringing of both; null where neither rings in a stretch long enough.</param>
/// <param name="Unexplained">Modes of the record that the model lacks.</param>
/// <param name="Trace">Record, model and difference, thinned for drawing.</param>
public sealed record RecordComparison(
    string File, string Sha256, string Channel, string Observation, string Unit,
    ImmutableArray<string> Added, ImmutableArray<string> Remarks, int RowCount, int ClippedCount,
    int OutsideCount, Alignment Alignment, NoiseEstimate Noise, Differences Differences,
    PeakPair Highest, PeakPair Lowest, RingComparison? Ring, ImmutableArray<UnexplainedMode> Unexplained,
    OverlayTrace Trace)
{
    /// <summary>Samples compared.</summary>
    public int ComparedCount => Differences.Count;

    /// <summary>The rms difference over the noise.</summary>
    public double Ratio => Noise.Value > 0 ? Differences.Rms / Noise.Value : double.PositiveInfinity;

    /// <summary>The ratio up to which the record counts as explained: 1.2, or as far as the noise itself is
    /// uncertain (three standard errors).</summary>
    public double AllowedRatio => Math.Max(
        1.2,
        1 + (3 * double.Hypot(Math.Sqrt(0.5 / Math.Max(1, ComparedCount)), Noise.RelativeError)));

    /// <summary>Whether the model explains the record to within its noise.</summary>
    public bool IsExplained => Ratio <= AllowedRatio;
}

/// <summary>Record less model, over the samples compared.</summary>
/// <param name="Count">Samples compared.</param>
/// <param name="Rms">Root of the mean square, by the degrees of freedom.</param>
/// <param name="Greatest">The difference of the greatest magnitude.</param>
/// <param name="GreatestAt">Study time of it, in seconds.</param>
/// <param name="Correlation">Largest autocorrelation of the differences, in magnitude.</param>
/// <param name="CorrelationLag">Its lag in seconds.</param>
/// <param name="CorrelationBound">What noise without memory stays below.</param>
public sealed record Differences(
    int Count, double Rms, double Greatest, double GreatestAt, double Correlation, double CorrelationLag,
    double CorrelationBound)
{
    /// <summary>Whether nothing but noise is left.</summary>
    public bool AreWhite => Math.Abs(Correlation) <= CorrelationBound;
}

/// <summary>An extreme of the record's samples and of the model on the same instants, in the record's unit
/// and study time.</summary>
public sealed record PeakPair(double Record, double RecordAt, double Model, double ModelAt)
{
    /// <summary>Record less model.</summary>
    public double Difference => Record - Model;
}

/// <summary>A mode read off a record.</summary>
/// <param name="Frequency">In hertz.</param>
/// <param name="FrequencyError">Its standard error.</param>
/// <param name="Decay">In 1/s.</param>
/// <param name="DecayError">Its standard error.</param>
/// <param name="Amplitude">At the start of the stretch it was read off, in the record's unit.</param>
public sealed record RingMode(
    double Frequency, double FrequencyError, double Decay, double DecayError, double Amplitude)
{
    /// <summary>Damping ratio.</summary>
    public double Damping => Decay / double.Hypot(Decay, 2 * Math.PI * Frequency);
}

/// <summary>The ringing of a record and the mode of the model nearest to it.</summary>
/// <param name="Record">The strongest mode of the record.</param>
/// <param name="ModelFrequency">Damped frequency of the model's, in hertz.</param>
/// <param name="ModelDamping">Its damping ratio.</param>
public sealed record RingComparison(RingMode Record, double ModelFrequency, double ModelDamping)
{
    /// <summary>Relative difference of the frequencies, record to model.</summary>
    public double Difference => (Record.Frequency / ModelFrequency) - 1;
}

/// <summary>A mode of a record that the model lacks.</summary>
/// <param name="Mode">The mode.</param>
/// <param name="Nearest">Frequency of the model's nearest mode in hertz; null where it has none.</param>
/// <param name="Strays">Single parts that would explain it, the likeliest first.</param>
public sealed record UnexplainedMode(RingMode Mode, double? Nearest, ImmutableArray<Stray> Strays);

/// <summary>A part that would give the model a mode it lacks.</summary>
/// <param name="Statement">The part as a statement of a circuit file.</param>
/// <param name="Words">The part in words: <c>218 pF from x to pad</c>.</param>
/// <param name="Ratio">The rms difference over the noise with it in place.</param>
public sealed record Stray(string Statement, string Words, double Ratio);

/// <summary>Curves for drawing, over study time.</summary>
/// <param name="Times">In seconds.</param>
/// <param name="Record">The record's values.</param>
/// <param name="HalfWidths">Half the distance of a pair's values; empty where there are no pairs.</param>
/// <param name="Model">The model's, gain and level applied.</param>
public sealed record OverlayTrace(
    ImmutableArray<double> Times, ImmutableArray<double> Record, ImmutableArray<double> HalfWidths,
    ImmutableArray<double> Model);
