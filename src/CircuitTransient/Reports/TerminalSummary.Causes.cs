using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <content>The causes of the worst observation.</content>
public static partial class TerminalSummary
{
    private const int MostCauses = 12;
    private const int BarCells = 12;

    private static void WriteCauses(SummaryText text, TransientResult result)
    {
        if (WorstObservation.Find(result) is not { } worst || worst.Extreme.Value is not { } total)
        {
            return;
        }

        var unit = worst.Observation.Unit;
        text.Heading(HeadingOf(result, worst));
        if (PeakWords.Of(result, worst.Observation, worst.AtMax) is { } words)
        {
            text.Paragraph(words);
        }

        if (PhaseWords.Of(result, worst.Observation, worst.AtMax) is { } phase)
        {
            text.Paragraph(phase);
        }

        text.Paragraph($"From the start: {FromStart(result)}, carried through every switching");
        var without = worst.AtMax ? "max without" : "min without";
        WriteShares(text, SharesFromStart(result, worst), total, unit, without,
            result.Causes.Any(cause => cause.Kind == CauseKind.Edge) ? "others together" : "smaller ones");
        WritePulses(text, worst, total, without);
        if (DecidedByAnswer(result) is { } decided)
        {
            text.Paragraph($"instants of the full answer kept for {decided}", hanging: 2);
        }

        WriteSwitchings(text, result, worst);
        WriteModes(text, result, worst);
        if (worst.Since is not null)
        {
            WriteSince(text, result, worst);
            return;
        }

        if (SinceWords.WhyNone(result, worst) is { } why)
        {
            text.Paragraph(why);
        }

        if (WorstObservation.FindSinceEvent(result) is { } other)
        {
            text.Heading(HeadingOf(result, other));
            WriteSince(text, result, other);
        }
    }

    private static void WritePulses(SummaryText text, WorstObservation worst, double total, string without)
    {
        if (worst.Observation.Pulses.IsEmpty)
        {
            return;
        }

        text.Paragraph("Pulses, their edges together:");
        WriteShares(
            text,
            [
                .. worst.Observation.Pulses.Select(p => new Share(
                    p.Pulse, worst.AtMax ? p.AtMax : p.AtMin, null,
                    worst.AtMax ? p.MaxWithout : p.MinWithout)),
            ],
            total, worst.Observation.Unit, without, "more");
    }

    private static string HeadingOf(TransientResult result, WorstObservation worst)
    {
        var when = InstantWords.At(result, worst.Extreme.Time, worst.Extreme.Side);
        return $"What makes the {Number(worst.Extreme.Value, worst.Observation.Unit)} of " +
            $"{worst.Observation.Name} ({when}; {worst.Why})";
    }

    private static void WriteSince(SummaryText text, TransientResult result, WorstObservation worst)
    {
        if (worst.Since is not { } since || worst.Extreme.Value is not { } total)
        {
            return;
        }

        text.Paragraph(
            $"Since {since.Event}: what each part held just before it, and the sources from then on");
        var shares = since.Parts.Select(part => new Share(part.Cause, part.Value)).ToImmutableArray();
        WriteShares(text, shares, total, worst.Observation.Unit, without: null);
        foreach (var driving in Driving(result, worst, since))
        {
            text.Paragraph(driving, hanging: 2);
        }
    }

    private static string FromStart(TransientResult result)
    {
        var sources = result.Causes.Any(cause => cause.Kind == CauseKind.Edge)
            ? "the edges of the sources"
            : "the sources";
        var apart = result.Circuit.StartsSettled ? " apart from them" : "";
        return $"{sources}, and what was stored at t = 0{apart}";
    }

    private static ImmutableArray<Share> SharesFromStart(TransientResult result, WorstObservation worst) =>
        [
            .. worst.Observation.Contributions.Select((c, i) => new Share(
                c.Cause,
                worst.Share(c),
                Math.Abs(c.OwnMin?.Value ?? 0) > Math.Abs(c.OwnMax?.Value ?? 0) ? c.OwnMin : c.OwnMax,
                worst.AtMax ? c.MaxWithout : c.MinWithout,
                i < result.Causes.Length && result.Causes[i].From > worst.Extreme.Time)),
        ];

    private static void WriteShares(
        SummaryText text,
        ImmutableArray<Share> shares,
        double total,
        string unit,
        string? without,
        string others = "smaller ones")
    {
        var later = shares.Count(share => share.IsLater);
        var ordered = shares.Where(share => !share.IsLater)
            .OrderByDescending(share => Math.Abs(share.Value ?? 0)).ToArray();
        var shown = ordered.Length <= MostCauses ? ordered : ordered[..(MostCauses - 1)];
        var largest = shown.Select(share => Math.Abs(share.Value ?? 0)).DefaultIfEmpty().Max();
        var bars = new SignedBars(
            largest,
            shown.Any(share => share.Value < 0),
            shown.Any(s => s.Value > 0));
        var rows = shown.Select(share => Row(share, total, unit, bars, without is not null)).ToList();
        if (without is not null)
        {
            var own = shares.Any(share => share.Own is not null) ? "its own peak" : "";
            rows.Insert(0, ["", "", "", "", own, without]);
        }

        if (shown.Length < ordered.Length)
        {
            var rest = ordered[shown.Length..];
            var sum = rest.Sum(share => share.Value ?? 0);
            var count = $"{rest.Length} {others}";
            rows.Add([count, Signed(sum, unit, largest), PercentOf(sum, total), "", "", ""]);
        }

        if (later > 0)
        {
            rows.Add([later == 1 ? "one other, after that instant" : $"{later} others, after that instant",
                "nothing", "", "", "", ""]);
        }

        text.Table([Prose, Right, Right, Left, Right, Right], rows, indent: 4);
        if (Cancelling(shares, total, unit) is { } cancelling)
        {
            text.Paragraph(cancelling, indent: 4, hanging: 2);
        }
    }

    private static ImmutableArray<string> Row(
        Share share,
        double total,
        string unit,
        SignedBars bars,
        bool withOwn)
    {
        var scale = Math.Max(Math.Abs(total), bars.Largest);
        return
        [
            share.Cause,
            Signed(share.Value, unit, bars.Largest),
            PercentOf(share.Value, total),
            bars.Of(share.Value ?? 0),
            withOwn && share.Own is { Value: { } own, Time: var time }
                ? Own(own, time, unit, scale)
                : "",
            withOwn && share.Without is { } without ? Number(without.Value, unit, scale) : "",
        ];
    }

    private static string Own(double own, double time, string unit, double scale) =>
        IsRounding(own, scale) ? Number(0, unit) : $"{Number(own, unit)} at {Number(time, "s")}";

    private static string? DecidedByAnswer(TransientResult result)
    {
        var decided = result
            .Circuit.Parts.OfType<Switch>()
            .Where(s => s.Events.Any(e => e.CutAtMost is not null || e.Trigger is WhenCrosses))
            .Select(s => s.Name)
            .ToArray();
        return decided.Length == 0 ? null : string.Join(", ", decided);
    }

    private static string PercentOf(double? value, double total) =>
        value is { } share && total != 0 ? Percent(share / total) : "";

    private sealed record Share(
        string Cause,
        double? Value,
        TimedValue? Own = null,
        TimedValue? Without = null,
        bool IsLater = false);

    /// <summary>Bars to both sides of a common zero, in half cells.</summary>
    private sealed record SignedBars(double Largest, bool HasNegative, bool HasPositive)
    {
        public string Of(double value)
        {
            var cells = HasNegative && HasPositive ? BarCells / 2 : BarCells;
            var halves = Largest > 0 ? (int)Math.Round(2 * cells * Math.Abs(value) / Largest) : 0;
            var full = new string('█', halves / 2);
            var left = HasNegative ? (value < 0 ? Half(halves, '▐') + full : "").PadLeft(cells) : "";
            return left + (value > 0 ? full + Half(halves, '▌') : "");
        }

        private static string Half(int halves, char half) => halves % 2 == 1 ? half.ToString() : "";
    }
}
