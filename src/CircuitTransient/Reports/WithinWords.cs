using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <summary>Which window is meant where a value is explained that a requirement has in its own, and no
/// observation among its extremes.</summary>
internal static class WithinWords
{
    /// <summary>The sentence.</summary>
    public static string Of(TransientResult result, WorstObservation worst)
    {
        var (from, to) = worst.Observation.Window ?? (0, result.Until);
        return "Extremes here are those within the requirement's window, from "
            + $"{Number(from, "s")} to {Number(to, "s")}.";
    }
}
