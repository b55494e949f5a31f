using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Records;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A record with what it is laid over.</summary>
/// <param name="Record">The record.</param>
/// <param name="Observation">What it shows.</param>
/// <param name="Circuit">The circuit it was taken on, added parts included.</param>
/// <param name="Added">The added parts as statements.</param>
/// <param name="Given">What of the alignment the user gives.</param>
public sealed record PlacedRecord(
    OscilloscopeRecord Record, Observation Observation, Circuit Circuit, ImmutableArray<string> Added,
    AlignmentGiven Given)
{
    /// <summary>What is to be said of how it was placed.</summary>
    public ImmutableArray<string> Remarks { get; init; } = [];
}

/// <summary>Lays one record over the model and measures what is left.</summary>
internal sealed class RecordComparer(PlacedRecord placed, ModelCurve model)
{
    private readonly OscilloscopeRecord record = placed.Record;
    private readonly RecordAlignment alignment = new(model, placed.Given);
    private readonly List<string> remarks = [.. placed.Record.Remarks, .. placed.Remarks];

    /// <summary>The samples that are no clipped ones, and how they lie; null, with a mistake, where no part
    /// of the record lies within the study.</summary>
    public (RecordSamples Samples, Aligned Aligned)? Align(out int clipped, out Diagnostic? mistake)
    {
        (clipped, mistake) = (0, null);
        var marks = ClippedSamples.Candidates(record.Values);
        var samples = RecordSamples.Of(record, marks);
        var aligned = alignment.Find(samples);
        if (aligned is not null && marks is not null)
        {
            var noise = RecordNoise.FromDifferences(record.Times, record.Values).Value;
            var beyond = ClippedSamples.Beyond(record.Times, record.Values, marks, aligned, model, noise);
            clipped = beyond?.Count(m => m) ?? 0;
            if (clipped > 0)
            {
                remarks.Add($"{clipped} clipped sample{(clipped == 1 ? "" : "s")} left out: the range of the "
                    + "instrument ends there and the model goes on");
            }

            if (clipped < marks.Count(m => m))
            {
                samples = RecordSamples.Of(record, beyond);
                aligned = alignment.Find(samples);
            }
        }

        if (aligned is not null)
        {
            return (samples, aligned);
        }

        var (message, advice) = WhyNotAligned();
        mistake = Diagnostic.Error(new SourceText(record.Name, ""), new TextSpan(0, 0), message, advice);
        return null;
    }

    private (string Message, string Advice) WhyNotAligned() => record.Values.Distinct().Take(2).Count() switch
    {
        < 2 => ("every sample of this record has the same value, which tells neither offset nor gain",
            "choose a channel that moves, with `--channel`, or give `--offset` and `--gain`"),
        _ when record.Values.Length < RecordAlignment.FewestCompared => (
            $"this record has {record.Values.Length} samples, and {RecordAlignment.FewestCompared} are the "
                + "fewest that can be laid over the model",
            "take a longer record, or one with a shorter interval"),
        _ => ("no part of this record lies within the study",
            $"the study runs from 0 s to {EngineeringNumber.Format(model.Until, "s")}; give the record's "
                + "time of the study's 0 s with `--offset`"),
    };

    /// <summary>Everything that is told of the record.</summary>
    public Outcome<RecordComparison> Compare(CancellationToken cancellation)
    {
        if (Align(out var clipped, out var mistake) is not var (samples, aligned))
        {
            return new(null, [mistake!]);
        }

        cancellation.ThrowIfCancellationRequested();
        var noise = RecordNoise.Of(record.Times, record.Values, aligned);
        var left = DifferencesOf(aligned);
        SayWhatIsOdd(aligned, left);
        var ring = new RingAnalysis(model, aligned, noise.Value);
        var comparison = new RecordComparison(
            record.Name, record.Sha256, record.Channel, placed.Observation.Name, placed.Observation.Unit,
            placed.Added, [.. remarks], record.RowCount, clipped, samples.Count - aligned.Compared.Count,
            alignment.Describe(aligned, Math.Max(left.Rms * left.Rms, noise.Value * noise.Value)), noise,
            left, PeakOf(aligned, 1), PeakOf(aligned, -1), ring.Strongest, [], TraceOf(aligned));
        cancellation.ThrowIfCancellationRequested();
        var missing = comparison.IsExplained ? [] : ring.Missing;
        return new(comparison with
        {
            Unexplained =
            [
                .. missing.Select(m => m with
                {
                    Strays = new StraySearch(placed, aligned, noise.Value, ring.Segment!)
                        .Find(m.Mode, comparison.Ratio, cancellation),
                }),
            ],
        }, []);
    }

    private void SayWhatIsOdd(Aligned aligned, Differences left)
    {
        if (alignment.Other is { } other)
        {
            remarks.Add($"it fits as well at an offset of {EngineeringNumber.Format(other, "s")}: `--offset` "
                + "or `--gain` would settle it");
        }

        var mean = aligned.Compared.Values.Average();
        var own = Math.Sqrt(aligned.Compared.Values.Sum(v => (v - mean) * (v - mean))
            / aligned.Compared.Count);
        if (left.Rms < 0.7 * own || placed.Given.Gain is not null)
        {
            return;
        }

        var turned = new RecordAlignment(model, placed.Given with { Gain = -1 });
        var upsideDown = turned.Find(RecordSamples.Of(record, null));
        remarks.Add(upsideDown is not null && Math.Sqrt(upsideDown.Variance(2)) < 0.5 * left.Rms
            ? "the record looks like the model upside down: is the probe the wrong way round? `--gain -1`"
            : "the record looks nothing like the model");
    }

    private Differences DifferencesOf(Aligned aligned)
    {
        var (times, values) = (aligned.Compared.Times, aligned.Compared.Values);
        var differences = new double[values.Length];
        var worst = 0;
        double sum = 0;
        for (var k = 0; k < values.Length; k++)
        {
            differences[k] = values[k] - aligned.Model[k];
            sum += differences[k] * differences[k];
            worst = Math.Abs(differences[k]) > Math.Abs(differences[worst]) ? k : worst;
        }

        var (correlation, lag) = Correlation(differences, sum);
        var interval = (times[^1] - times[0]) / Math.Max(1, times.Length - 1);
        // Some sixty lags are looked at: 4.5 standard errors are passed by chance once in two thousand
        // records.
        return new Differences(
            values.Length, Math.Sqrt(aligned.Variance(alignment.Estimated)), differences[worst],
            times[worst] - aligned.Offset, correlation, lag * interval, 4.5 / Math.Sqrt(values.Length));
    }

    /// <summary>The largest autocorrelation, at lags up to an eighth of the record, denser at its
    /// beginning.</summary>
    private static (double Correlation, int Lag) Correlation(double[] x, double squares)
    {
        var (largest, at) = (0.0, 1);
        for (var lag = 1; lag <= x.Length / 8; lag += Math.Max(1, lag / 6))
        {
            var value = squares > 0
                ? Numerics.DotProduct.Of(x.AsSpan(lag), x.AsSpan(0, x.Length - lag)) / squares
                : 0;
            (largest, at) = Math.Abs(value) > Math.Abs(largest) ? (value, lag) : (largest, at);
        }

        return (largest, at);
    }

    private static PeakPair PeakOf(Aligned aligned, int sign)
    {
        var (r, m) = (0, 0);
        for (var k = 1; k < aligned.Model.Length; k++)
        {
            r = sign * aligned.Compared.Values[k] > sign * aligned.Compared.Values[r] ? k : r;
            m = sign * aligned.Model[k] > sign * aligned.Model[m] ? k : m;
        }

        return new PeakPair(
            aligned.Compared.Values[r], aligned.Compared.Times[r] - aligned.Offset,
            aligned.Model[m], aligned.Compared.Times[m] - aligned.Offset);
    }

    /// <summary>The least and the greatest sample of each of some thousand columns.</summary>
    private OverlayTrace TraceOf(Aligned aligned)
    {
        const int columns = 1000;
        var count = aligned.Model.Length;
        var kept = new SortedSet<int>();
        for (var c = 0; c < columns; c++)
        {
            var (from, until) = ((int)((long)c * count / columns), (int)((long)(c + 1) * count / columns));
            var (low, high) = (from, from);
            for (var k = from; k < until; k++)
            {
                low = aligned.Compared.Values[k] < aligned.Compared.Values[low] ? k : low;
                high = aligned.Compared.Values[k] > aligned.Compared.Values[high] ? k : high;
            }

            if (from < until)
            {
                kept.Add(low);
                kept.Add(high);
            }
        }

        return new OverlayTrace(
            [.. kept.Select(k => aligned.Compared.Times[k] - aligned.Offset)],
            [.. kept.Select(k => aligned.Compared.Values[k])],
            record.HalfWidths is null ? [] : [.. kept.Select(k => HalfWidthAt(aligned.Compared.Times[k]))],
            [.. kept.Select(k => aligned.Model[k])]);
    }

    private double HalfWidthAt(double time)
    {
        var place = Array.BinarySearch(record.Times, time);
        return place < 0 ? 0 : record.HalfWidths![place];
    }
}
