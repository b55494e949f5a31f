using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <content>The worst observation by switching and by mode.</content>
public static partial class TerminalSummary
{
    private const int MostModes = 8;
    private const int MostCausesBeside = 4; // columns that fit beside a mode's name

    private static readonly TextColumn RightProse = new(IsRight: true, IsProse: true);

    private static void WriteSwitchings(SummaryText text, TransientResult result, WorstObservation worst)
    {
        var both = worst.Observation.BySwitching;
        if ((worst.AtMax ? both?.AtMax : both?.AtMin) is not { } breakdown
            || worst.Extreme.Value is not { } total)
        {
            return;
        }

        var unit = worst.Observation.Unit;
        if (breakdown.Effects.IsEmpty)
        {
            text.Paragraph("By switching: no switch acts before that instant");
            return;
        }

        text.Paragraph("By switching: the answer with each and those before it, less that without it");
        var scale = breakdown.Effects.Select(e => Math.Abs(e.Value ?? 0))
            .Append(Math.Abs(breakdown.Base)).Max();
        var shown = Largest(breakdown.Effects);
        var rows = shown.Select(e => ImmutableArray.Create(
            e.Event,
            $"at {Number(e.Time, "s")}",
            e.Value is null ? "" : Signed(e.Value, unit, scale),
            e.Value is null ? "" : PercentOf(e.Value, total),
            e.Reason ?? "")).ToList();
        if (shown.Length < breakdown.Effects.Length)
        {
            var rest = breakdown.Effects.Sum(e => e.Value ?? 0) - shown.Sum(e => e.Value ?? 0);
            rows.Add([$"{breakdown.Effects.Length - shown.Length} others together", "",
                Signed(rest, unit, scale), PercentOf(rest, total), ""]);
        }

        rows.Insert(0, [breakdown.BaseWords, "", Number(breakdown.Base, unit, scale),
            PercentOf(breakdown.Base, total), ""]);
        text.Table([Prose, Left, Right, Right, Prose], rows, indent: 4);
        if (DecidedByAnswer(result) is not null)
        {
            text.Paragraph("instants of the full answer kept", indent: 4);
        }
    }

    /// <summary>All effects where they are few, else the largest, in the order of time.</summary>
    private static ImmutableArray<SwitchingEffect> Largest(ImmutableArray<SwitchingEffect> effects) =>
        effects.Length <= MostCauses
            ? effects
            : [.. effects.OrderByDescending(e => Math.Abs(e.Value ?? 0)).Take(MostCauses - 1)
                .OrderBy(e => e.Time)];

    private static void WriteModes(SummaryText text, TransientResult result, WorstObservation worst)
    {
        if (result.By != Breakdown.Mode || worst.Observation.ByMode is not { } both
            || worst.Extreme.Value is not { } total)
        {
            return;
        }

        if ((worst.AtMax ? both.AtMax : both.AtMin) is not { } breakdown)
        {
            text.Paragraph("By mode: an integral over time is not made of modes at an instant");
            return;
        }

        var unit = worst.Observation.Unit;
        text.Paragraph("By mode, in the interval of that instant, named by the parts that hold its energy");
        text.Table(
            [Prose, Right, Right, .. Beside(breakdown).Select(_ => RightProse)],
            ModeRows(breakdown, total, unit), indent: 4);
        if (breakdown.Joint != 0)
        {
            text.Paragraph($"joint, of no single cause and mode: {Number(breakdown.Joint, unit)}", indent: 4);
        }

        if (breakdown.Modes.Any(m => m.IsDriven))
        {
            text.Paragraph(
                "* with the part of the sources that follows it too closely to be told apart", indent: 4,
                hanging: 2);
        }

        if (breakdown.Energies is { } energies)
        {
            text.Paragraph($"stored at that instant: {Stored(energies)}", indent: 4, hanging: 2);
        }
    }

    private static ImmutableArray<int> Beside(ModeBreakdown breakdown) => breakdown.Causes.Length < 2
        ? []
        : [.. Enumerable.Range(0, breakdown.Causes.Length)
            .Where(c => breakdown.Causes[c].Values.Any(v => !IsRounding(v, Largest(breakdown))))
            .OrderByDescending(c => breakdown.Causes[c].Values.Select(Math.Abs).DefaultIfEmpty().Max())
            .Take(MostCausesBeside).Order()];

    private static double Largest(ModeBreakdown breakdown) => breakdown.Causes
        .SelectMany(c => c.Values).Select(Math.Abs).DefaultIfEmpty().Max();

    private static IEnumerable<ImmutableArray<string>> ModeRows(
        ModeBreakdown breakdown, double total, string unit)
    {
        var beside = Beside(breakdown);
        var scale = breakdown.Modes.Select(m => Math.Abs(m.Value)).DefaultIfEmpty().Max();
        var shown = breakdown.Modes.Length <= MostModes ? breakdown.Modes.Length : MostModes - 1;
        if (!beside.IsEmpty)
        {
            yield return ["", "all causes", "", .. beside.Select(c => breakdown.Causes[c].Cause)];
        }

        for (var m = 0; m < shown; m++)
        {
            var mode = breakdown.Modes[m];
            yield return [mode.Name + (mode.IsDriven ? " *" : ""), Signed(mode.Value, unit, scale),
                PercentOf(mode.Value, total),
                .. beside.Select(c => Signed(breakdown.Causes[c].Values[m], unit, scale))];
        }

        if (shown < breakdown.Modes.Length)
        {
            var rest = breakdown.Modes[shown..].Sum(m => m.Value);
            yield return [$"{breakdown.Modes.Length - shown} others together", Signed(rest, unit, scale),
                PercentOf(rest, total),
                .. beside.Select(c => Signed(breakdown.Causes[c].Values[shown..].Sum(), unit, scale))];
        }
    }
}
