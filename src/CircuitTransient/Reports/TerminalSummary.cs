using System.Collections.Immutable;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <summary>The summary for the terminal: a note to a colleague within 100 columns, verdict first.</summary>
public static partial class TerminalSummary
{
    /// <summary>The sentence every summary and report ends with.</summary>
    public const string Closing =
        "This is the result of a linear model and a calculation aid; the applicable code and a licensed " +
        "practitioner decide.";

    private const int MostObservations = 50;

    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary of a result.</summary>
    /// <param name="result">The result.</param>
    /// <param name="files">Where the files are, as the user may open them; may be empty.</param>
    /// <param name="colour">Whether headings are bold and bars blue.</param>
    /// <param name="terminalWidth">Columns of the terminal it goes to; null where it goes to none. A wide one
    /// gets a sketch of the worst observation.</param>
    public static string Write(
        TransientResult result, ImmutableArray<string> files, bool colour = false, int? terminalWidth = null)
    {
        var text = new SummaryText(colour);
        text.Title(TitleOf(result));
        WriteVerdict(text, result);
        WriteEvents(text, result);
        WriteObservations(text, result);
        WriteCauses(text, result);
        WriteSketch(text, result, terminalWidth);
        WriteFigures(text, result);
        WriteRatings(text, result);
        WriteImpulses(text, result);
        WriteSelfChecks(text, result.SelfChecks, result.NotJudged);
        WriteWarnings(text, result);
        WriteCautions(text, result);
        text.End(files);
        return text.ToString();
    }

    private static void WriteSketch(SummaryText text, TransientResult result, int? terminalWidth)
    {
        if (terminalWidth >= SummaryText.Width && WorstObservation.Find(result)?.Shown is { } shown
            && TerminalSketch.Lines(result, shown) is { IsEmpty: false } lines)
        {
            text.Blank();
            foreach (var line in lines)
            {
                text.Paragraph(line);
            }
        }
    }

    private static string TitleOf(TransientResult result) =>
        result.Circuit.Title is { } title
            ? $"{title} ({result.Circuit.Source.Name})"
            : result.Circuit.Source.Name;

    private static void WriteEvents(SummaryText text, TransientResult result)
    {
        if (result.Events.IsEmpty)
        {
            return;
        }

        var (volts, amperes) = Scales(result);
        text.Heading("Switchings, with what each switch saw just before and just after");
        text.Table(
            [Right, Prose, Right, Left, Right, Left, Prose],
            result.Events.Select(e => ImmutableArray.Create(
                Number(e.Time, "s"),
                InstantWords.Name(e),
                Before(e, e.VoltageBefore, "V", volts),
                $"→ {Number(e.VoltageAfter, "V", volts)} across",
                Before(e, e.CurrentBefore, "A", amperes),
                $"→ {Number(e.CurrentAfter, "A", amperes)} through",
                e.Remark ?? "")));
    }

    private static string Before(EventResult switching, double? value, string unit, double scale) =>
        value is null ? ReportWords.Before(switching, value, unit) : Number(value, unit, scale);

    private static void WriteObservations(SummaryText text, TransientResult result)
    {
        if (result.Observations.IsEmpty)
        {
            return;
        }

        var windows = result.Observations.Select(o => o.Window).Distinct().ToArray();
        var common = windows is [{ } only] ? only : (0, result.Until);
        text.Heading(
            $"Observed {Between(common)}" + (result.UntilReason is { } reason ? $" ({reason})" : ""));
        var shown = result.Observations.Take(MostObservations);
        text.Table([Prose, Left, Right, Prose], shown.SelectMany(o => RowsOf(result, o)));
        if (result.Observations.Length > MostObservations)
        {
            text.Paragraph($"and {result.Observations.Length - MostObservations} more, in results.json");
        }

        if (result.Observations.Any(o => !o.Samples.IsEmpty))
        {
            text.Heading("At the instants asked for (each cause's share stands in results.json)");
            text.Table(
                [Prose, Right, Right],
                result.Observations.SelectMany(o => o.Samples.Select((sample, i) => ImmutableArray.Create(
                    i == 0 ? o.Name : "", Number(sample.Time, "s"), Number(sample.Value, o.Unit)))));
        }
    }

    private static IEnumerable<ImmutableArray<string>> RowsOf(
        TransientResult result, ObservationResult observed)
    {
        var (unit, max, min) = (observed.Unit, observed.Max, observed.Min);
        var scale = Math.Abs(observed.Greatest.Value ?? 0);
        yield return [observed.Name, "max", Peak(max), When(result, observed, max)];
        var isApart = observed.Window is not null
            && result.Observations.Any(o => o.Window != observed.Window);
        var window = isApart ? $"  {Between(observed.Window!.Value)}" : "";
        yield return [window, "min", Peak(min), When(result, observed, min)];
        var final = observed.Final is null
            ? "goes on swinging or has no limit"
            : $"tends to {Number(observed.Final, unit, scale)}";
        yield return ["", "end", Number(observed.End, unit, scale), final];

        // A value that the equations leave open has no start either; one that is missing alone is an impulse.
        string Peak(Extreme extreme) => extreme.Value is null && observed.Start is not null
            ? "infinite"
            : Number(extreme.Value, unit, scale);
    }

    private static string Between((double From, double To) window) =>
        $"from {Number(window.From, "s")} to {Number(window.To, "s")}";

    private static string When(TransientResult result, ObservationResult observation, Extreme extreme)
    {
        if (extreme.Value is not { } value)
        {
            return observation.Start is null ? "" : InstantWords.At(result, extreme.Time, extreme.Side);
        }

        var when = InstantWords.At(result, extreme.Time, extreme.Side);
        if (observation.EndsRising && extreme == observation.Greatest)
        {
            when += "; still rising at the end";
        }

        // The bound is owed within 1e-9 of the value; where it fell short, the reader is told.
        return extreme.Bound is { } bound
            && !IsRounding(bound - value, observation)
            && Math.Abs(bound - value) > 2e-9 * Math.Abs(value)
            ? when + $"; proven only not to pass {Number(bound, observation.Unit)}"
            : when;
    }

    private static void WriteFigures(SummaryText text, TransientResult result)
    {
        if (!result.Figures.IsEmpty)
        {
            text.Heading("Read off the waveforms");
            text.Table(
                [Prose, Right, Prose],
                result.Figures.Select(figure => ImmutableArray.Create(
                    figure.Name, Number(figure.Value, figure.Unit), figure.Definition)));
        }
    }

    private static void WriteImpulses(SummaryText text, TransientResult result)
    {
        var intervals = result.Intervals.Where(interval => !interval.Impulses.IsEmpty).ToArray();
        if (intervals.Length == 0)
        {
            return;
        }

        text.Heading("Impulses: ideal parts joined or parted with more than they could hold");
        foreach (var interval in intervals)
        {
            foreach (var impulse in interval.Impulses)
            {
                var size = impulse.Charge is { } charge
                    ? $"{Number(charge, "C")} through {impulse.Part}"
                    : $"{Number(impulse.VoltSeconds, "Vs")} across {impulse.Part}";
                var remedy = impulse.Remedy is { } words ? $"; {words}" : "";
                text.Paragraph($"{InstantWords.At(result, impulse.Time)}: {size}{remedy}", hanging: 2);
            }

            text.Paragraph($"lost in them: {Number(interval.EnergyLost, "J")}", hanging: 2);
        }
    }

    /// <summary>What the solution checked of itself.</summary>
    internal static void WriteSelfChecks(
        SummaryText text, ImmutableArray<SelfCheck> checks, ImmutableArray<NotJudged> notJudged)
    {
        if (checks.IsEmpty && notJudged.IsEmpty)
        {
            return;
        }

        text.Blank();
        var failed = checks.Where(check => !check.Holds).ToArray();
        if (failed.Length > 0)
        {
            text.Title("Self-checks: FAILED, do not use these figures");
            text.Table(
                [Prose, Left],
                failed.Select(check => ImmutableArray.Create(
                    check.Name, $"worst {Small(check.Worst)}, allowed {Small(check.Allowed)}")));
        }
        else if (!checks.IsEmpty)
        {
            var closest = checks.MaxBy(check => check.Worst / check.Allowed)!;
            var count = checks is [_] ? "it holds" : $"all {checks.Length} hold";
            text.Paragraph(
                $"Self-checks: {count}; nearest to its limit is {closest.Name}, {Small(closest.Worst)} of " +
                $"{Small(closest.Allowed)} allowed.",
                indent: 0,
                hanging: 2);
        }

        foreach (var check in notJudged)
        {
            text.Paragraph($"Not judged: {check.Name}: {check.Reason}.", indent: 0, hanging: 2);
        }
    }

    private static void WriteWarnings(SummaryText text, TransientResult result)
    {
        if (!result.Warnings.IsEmpty)
        {
            text.Heading("Warnings");
            foreach (var warning in result.Warnings)
            {
                var place = warning.Line > 0 ? $"line {warning.Line}: " : "";
                text.Paragraph(place + warning.Text, hanging: 2);
            }
        }
    }

    private static void WriteCautions(SummaryText text, TransientResult result)
    {
        if (!result.Cautions.IsEmpty)
        {
            text.Heading("Cautions");
            foreach (var caution in result.Cautions.OrderByDescending(caution => caution.Severity))
            {
                var word = caution.Severity switch
                {
                    CautionSeverity.Danger => "danger",
                    CautionSeverity.Warning => "warning",
                    _ => "note",
                };
                text.Paragraph($"{word}: {caution.Text} ({caution.Standard})", hanging: 2);
            }
        }
    }
}
