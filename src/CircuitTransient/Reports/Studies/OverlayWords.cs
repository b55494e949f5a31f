using CircuitTransient.Studies.Overlays;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>What an overlay found, in sentences that the terminal, the pictures and the page share.</summary>
internal static class OverlayWords
{
    /// <summary>The verdict on all records and values, one sentence.</summary>
    public static string Verdict(OverlayResult result)
    {
        var wrong = result.Records.Count(r => !r.IsExplained);
        var records = (result.Records.Length, wrong) switch
        {
            (1, 0) => "The model explains the record to within its noise.",
            (1, _) => "The model does not explain the record.",
            (2, 0) => "The model explains both records to within their noise.",
            (var n, 0) => $"The model explains all {n} records to within their noise.",
            (2, 2) => "The model explains neither record.",
            (var n, var w) => $"The model does not explain {w} of {n} records.",
        };
        return result.Fit switch
        {
            null => records,
            { Converged: false } => $"The fit did not come to rest. {records}",
            { IsResolved: true } fit when wrong == 0 => $"The records determine {Names(fit)}. {records}",
            { IsResolved: true } fit => $"{records} The values of {Names(fit)} are the best this model can "
                + "do, and no better than it.",
            { } fit => $"{Refused(fit)} {records}",
        };
    }

    /// <summary>How a record compares with the model, one sentence.</summary>
    public static string Verdict(RecordComparison record)
    {
        var noise = $"{Value(record.Noise.Value, record.Unit, 3)} rms";
        return record.IsExplained
            ? $"explained to within {Ratio(record.Ratio)} × its noise of {noise}"
            : $"not explained: what is left is {Ratio(record.Ratio)} × its noise of {noise}";
    }

    /// <summary>A value with its standard error, or that it was given.</summary>
    public static string Estimated(Estimate estimate, string unit) => estimate switch
    {
        { IsGiven: true } => $"{Value(estimate.Value, unit, 4)}, given",
        { StandardError: > 1 } when unit == "s" => $"{Value(estimate.Value, unit, 4)}, not told by slopes",
        _ => $"{Value(estimate.Value, unit, 4)} ± {Value(estimate.StandardError, unit, 2)}",
    };

    /// <summary>A fitted value's standard error.</summary>
    public static string Error(double relative) => relative < 10
        ? "± " + EngineeringNumber.Format(100 * relative, "%", 2)
        : "± more than a factor of ten";

    /// <summary>A ratio with as many digits as it deserves.</summary>
    public static string Ratio(double ratio) => EngineeringNumber.Format(ratio, "", 3);

    /// <summary>A value in SI.</summary>
    public static string Value(double value, string unit, int digits) =>
        EngineeringNumber.Format(value, unit, digits);

    /// <summary>A relative difference in per cent, with its sign.</summary>
    public static string Change(double relative) =>
        (relative > 0 ? "+" : "") + EngineeringNumber.Format(100 * relative, "%", 3);

    /// <summary>A mode in words.</summary>
    public static string Mode(RingMode mode) =>
        $"{Value(mode.Frequency, "Hz", 4)} ± {Value(mode.FrequencyError, "Hz", 2)}, damping ratio "
        + EngineeringNumber.Format(mode.Damping, "", 3);

    private static string Refused(FitResult fit)
    {
        var open = fit.Values.Where(v => !v.IsResolved).Select(v => v.Name).ToArray();
        var what = open.Length == 1
            ? $"{open[0]} is not determined by the record{(fit.RecordCount == 1 ? "" : "s")}"
            : $"The record{(fit.RecordCount == 1 ? " does" : "s do")} not tell {Joined(open)} apart";
        return fit.Determined.IsEmpty ? $"{what}."
            : $"{what}: only {Joined([.. fit.Determined.Select(d => d.Words)])} "
                + $"{(fit.Determined.Length == 1 ? "is" : "are")} determined.";
    }

    private static string Names(FitResult fit) => Joined([.. fit.Values.Select(v => v.Name)]);

    private static string Joined(string[] words) => words.Length < 2
        ? string.Concat(words)
        : $"{string.Join(", ", words[..^1])} and {words[^1]}";
}
