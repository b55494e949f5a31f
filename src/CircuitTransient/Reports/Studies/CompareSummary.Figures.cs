using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Reports.Studies;

/// <content>What moved: observations, figures, stresses.</content>
public static partial class CompareSummary
{
    private const int MostShares = 3;
    private const int MostStresses = 12;

    private static void WriteObservations(SummaryText text, Comparison comparison)
    {
        var shown = comparison.Observations.Where(o => o.Differs).ToArray();
        if (shown.Length == 0)
        {
            return;
        }

        text.Heading("Observed");
        foreach (var observed in shown.Take(MostRows))
        {
            text.Paragraph(observed.Name);
            var rows = Rows(observed).ToArray();
            if (rows.Length > 0)
            {
                text.Table([Left, Right, Right, Right, Right, Prose], rows, indent: 4);
            }

            WriteShares(text, observed);
        }

        WriteRest(text, shown.Length);
        var same = comparison.Observations.Length - shown.Length;
        if (same > 0)
        {
            text.Paragraph($"the same as before: {same} more");
        }
    }

    private static IEnumerable<ImmutableArray<string>> Rows(ObservationChange observed)
    {
        if (observed.Max.Differs || observed.MaxTime.Differs)
        {
            yield return Row("max", observed.Max, observed.Unit, observed.MaxTime);
        }

        if (observed.Min.Differs || observed.MinTime.Differs)
        {
            yield return Row("min", observed.Min, observed.Unit, observed.MinTime);
        }

        if (observed.Final.Differs)
        {
            yield return Row("tends to", observed.Final, observed.Unit, null);
        }
    }

    private static ImmutableArray<string> Row(
        string what, NumberChange value, string unit, NumberChange? time) =>
    [
        what,
        ReportWords.Number(value.Before, unit),
        $"→ {ReportWords.Number(value.After, unit)}",
        value.Differs && value.Difference is not null ? ReportWords.Signed(value.Difference, unit) : "",
        value.Differs ? Relative(value) : "",
        time is { Differs: true }
            ? $"from {ReportWords.Number(time.Before, "s")} to {ReportWords.Number(time.After, "s")}"
            : "",
    ];

    // The extreme of the greater magnitude is the one whose causes are asked for.
    private static void WriteShares(SummaryText text, ObservationChange observed)
    {
        var isMax = Math.Abs(observed.Max.After ?? 0) >= Math.Abs(observed.Min.After ?? 0);
        var shares = (isMax ? observed.AtMax : observed.AtMin).Take(MostShares).Select(share =>
            $"{share.Cause} {ReportWords.Signed(share.Value.Before, observed.Unit)} → " +
            ReportWords.Signed(share.Value.After, observed.Unit)).ToArray();
        if (shares.Length > 0)
        {
            text.Paragraph(
                $"most changed in its {(isMax ? "max" : "min")}: {string.Join("; ", shares)}", indent: 4,
                hanging: 2);
        }
    }

    private static void WriteFigures(SummaryText text, Comparison comparison)
    {
        var shown = comparison.Figures.Where(f => f.Value.Differs).ToArray();
        if (shown.Length > 0)
        {
            text.Heading("Read off the waveforms");
            text.Table(
                [Prose, Right, Right, Right, Right],
                shown.Take(MostRows).Select(f => Row(f.Name, f.Value, f.Unit, null)[..5]));
            WriteRest(text, shown.Length);
        }
    }

    private static void WriteStresses(SummaryText text, Comparison comparison)
    {
        if (!comparison.Stresses.IsEmpty)
        {
            text.Heading("Stresses of parts, the most changed first");
            text.Table(
                [Prose, Prose, Right, Right, Right, Right],
                comparison.Stresses.Take(MostStresses).Select(s =>
                    Row(Stress(s.Stress), s.Value, s.Unit, null)[..5].Insert(0, s.Part)));
            WriteRest(text, comparison.Stresses.Length, MostStresses);
        }
    }

    private static string Stress(string name) => name switch
    {
        "peakVoltage" => "peak voltage",
        "peakCurrent" => "peak current",
        "peakPower" => "peak power",
        "peakVoltageRate" => "steepest voltage",
        "peakCurrentRate" => "steepest current",
        "jouleIntegral" => "I²t",
        _ => name,
    };

    private static string Relative(NumberChange change) => change.Relative is { } relative
        ? Math.Abs(relative) >= 1e-3
            ? (relative > 0 ? "+" : "") + ReportWords.Percent(relative)
            : $"{(relative > 0 ? "+" : "")}{Tiny(100 * relative)} %"
        : "";

    private static string Fraction(double within) => within >= 1e-4
        ? ReportWords.Number(100 * within, "%")
        : Tiny(within);

    private static string Tiny(double value) => value.ToString("0.#e-0", CultureInfo.InvariantCulture);
}
