using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Html;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Pdf;

/// <content>Events, observations and everything after them.</content>
public static partial class PdfReport
{
    private const int MostPolePictures = 12;
    private const int MostLines = 5000;
    private const int LettersPerLine = 80; // of the wider column
    private const double OnePanel = PdfPages.TextWidth / PlotPanel.Width;
    private const double TwoPanels = 0.5;
    private const double SmallestPanels = 0.4; // past that the tables take a page of their own

    private static void AddEvents(PdfPages pages, TransientResult result)
    {
        if (result.Events.IsEmpty)
        {
            return;
        }

        pages.Heading("Events", 14, 90);
        pages.Picture(EventLine.Draw(result, pages.Fonts), 0.75);
        PdfTable.Add(
            pages,
            ["Time|", "Event", "Across, before|", "Across, after|", "Through, before|", "Through, after|"],
            result.Events.Select(e => ImmutableArray.Create<PdfCell>(
                Number(e.Time, "s"),
                e.Remark is { } remark ? $"{InstantWords.Name(e)} ({remark})" : InstantWords.Name(e),
                Before(e, e.VoltageBefore, "V"), Number(e.VoltageAfter, "V"),
                Before(e, e.CurrentBefore, "A"), Number(e.CurrentAfter, "A"))));
    }

    private static void AddObservation(PdfPages pages, TransientResult result, ObservationResult observed)
    {
        pages.NewPage();
        pages.Heading(observed.Name, 14, 100);
        pages.Paragraph(ExtremesOf(result, observed));
        var worst = WorstObservation.Find(result);
        var atMax = ReferenceEquals(worst?.Observation, observed)
            ? worst!.AtMax
            : observed.Greatest == observed.Max;
        var within = worst is { IsWithin: true } && ReferenceEquals(worst.Shown, observed) ? worst : null;
        PlotWindow?[] windows = [PlotWindow.Whole(result, observed), PlotWindow.Enlarged(result, observed)];
        var panels = windows.OfType<PlotWindow>().Select(window =>
        {
            var (shapes, height) = PlotPanel.Draw(result, observed, window, pages.Fonts, 0);
            return new Drawing(PlotPanel.Width, height, observed.Name, shapes);
        }).ToArray();
        var usual = panels.Length == 1 ? OnePanel : TwoPanels;
        var causes = HeightOfCauses(result, observed, atMax)
            + (within is null ? 0 : 30 + HeightOfCauses(result, within.Observation, within.AtMax));
        var fitting = (pages.Room - causes - (8 * panels.Length))
            / panels.Sum(panel => panel.Height);
        var scale = fitting < SmallestPanels ? usual : Math.Min(usual, fitting);
        foreach (var panel in panels)
        {
            pages.Picture(panel, scale);
        }

        if (within is not null)
        {
            AddRequired(pages, result, within);
        }

        AddCauses(pages, result, observed, atMax);
    }

    /// <summary>What makes a requirement's worst value, where that is no extreme of the
    /// waveform.</summary>
    private static void AddRequired(PdfPages pages, TransientResult result, WorstObservation worst)
    {
        var value = Number(worst.Extreme.Value, worst.Observation.Unit);
        pages.Paragraph(
            $"{value} of {worst.Observation.Name}: {worst.Why}. {WithinWords.Of(result, worst)}", 9.5);
        AddCauses(pages, result, worst.Observation, worst.AtMax);
    }

    /// <summary>What the tables of causes take, with words of some length and names that wrap.</summary>
    private static double HeightOfCauses(TransientResult result, ObservationResult observed, bool atMax)
    {
        var count = Math.Max(observed.Contributions.Length, SinceOf(observed, atMax)?.Parts.Length ?? 0);
        var letters = PeakWords.Of(result, observed, atMax)?.Length ?? 0;
        return 56 + (13 * ((letters + LettersPerLine - 1) / LettersPerLine)) + (20 * count);
    }

    private static string ExtremesOf(TransientResult result, ObservationResult observed)
    {
        var unit = observed.Unit;
        var final = observed.Final is { } limit
            ? $"tends to {Number(limit, unit)}"
            : "goes on swinging or has no limit";
        var rising = observed.EndsRising ? "; it is still growing at the end of the study" : "";
        return $"Highest {At(observed.Max)}; lowest {At(observed.Min)}; "
            + $"{Number(Cleaned(observed.End, observed), unit)} at the end, {final}{rising}.";

        string At(Extreme extreme) => Cleaned(extreme.Value, observed) is { } value
            ? Number(value, unit) + When(result, extreme)
            : "no finite value";
    }

    private static void AddCauses(
        PdfPages pages, TransientResult result, ObservationResult observed, bool atMax)
    {
        var (extreme, unit) = (atMax ? observed.Max : observed.Min, observed.Unit);
        if (extreme.Value is not { } total || observed.Contributions.IsEmpty)
        {
            return;
        }

        var shares = observed.Contributions
            .Select(c => (
                Cause: c,
                Value: Cleaned(atMax ? c.AtMax : c.AtMin, observed),
                Own: Own(c),
                Without: atMax ? c.MaxWithout : c.MinWithout))
            .OrderByDescending(s => Math.Abs(s.Value ?? 0)).ToArray();
        var largest = Math.Max(shares.Max(s => Math.Abs(s.Value ?? 0)), double.Epsilon);
        pages.SideBySide(
            AddShares, () => AddSince(pages, observed, atMax, total),
            HeightOfCauses(result, observed, atMax));

        void AddShares()
        {
            pages.Paragraph(
                $"What made the {(atMax ? "highest" : "lowest")} value, {Number(total, unit)}"
                    + When(result, extreme),
                9.5,
                isStrong: true);
            if (PeakWords.Of(result, observed, atMax) is { } words)
            {
                pages.Paragraph(words, 9.5);
            }

            PdfTable.Add(
                pages,
                [
                    "Cause", "Then|", "Of the total|", "", "Its own peak|",
                    atMax ? "Highest without it|" : "Lowest without it|",
                ],
                shares.Select(s => ImmutableArray.Create<PdfCell>(
                    s.Cause.Cause,
                    Signed(s.Value, unit),
                    s.Value is { } part && total != 0 ? Percent(part / total) : "",
                    new PdfCell("", Bar: (s.Value ?? 0) / largest),
                    s.Own?.Value is { } own ? $"{Number(own, unit)} at {Number(s.Own.Time, "s")}" : "",
                    s.Without is null ? "" : Number(s.Without.Value, unit))));
        }
    }

    private static TimedValue? Own(Contribution c) =>
        Math.Abs(c.OwnMin?.Value ?? 0) > Math.Abs(c.OwnMax?.Value ?? 0) ? c.OwnMin : c.OwnMax;

    private static SinceEvent? SinceOf(ObservationResult observed, bool atMax) =>
        atMax ? observed.After?.AtMax : observed.After?.AtMin;

    private static void AddSince(PdfPages pages, ObservationResult observed, bool atMax, double total)
    {
        if (SinceOf(observed, atMax) is not { Parts.IsEmpty: false } since)
        {
            return;
        }

        var largest = Math.Max(since.Parts.Max(p => Math.Abs(p.Value ?? 0)), double.Epsilon);
        pages.Paragraph(
            $"The same value counted since {since.Event}: what each part held just before it, and the "
                + "sources from then on",
            9.5,
            isStrong: true);
        var parts = since.Parts.OrderByDescending(p => Math.Abs(p.Value ?? 0));
        PdfTable.Add(
            pages,
            ["Cause", "Then|", "Of the total|", ""],
            parts.Select(p => ImmutableArray.Create<PdfCell>(
                p.Cause,
                Signed(p.Value, observed.Unit),
                p.Value is { } part && total != 0 ? Percent(part / total) : "",
                new PdfCell("", Bar: (p.Value ?? 0) / largest))));
    }

    private static void AddFigures(PdfPages pages, TransientResult result)
    {
        if (!result.Figures.IsEmpty)
        {
            pages.Heading("Read off the waveforms", 14, 40);
            PdfTable.Add(pages, ["Figure", "Value|", "Definition"], result.Figures.Select(f =>
                ImmutableArray.Create<PdfCell>(f.Name, Number(f.Value, f.Unit), f.Definition)));
        }
    }

    private static void AddStresses(PdfPages pages, TransientResult result)
    {
        if (result.Parts.IsEmpty)
        {
            return;
        }

        pages.NewPage();
        pages.Heading("What every part bears", 14, 40);
        PdfTable.Add(
            pages,
            ["Part", "Kind", "Voltage|", "Current|", "Power|", "Energy|", "I²t|"],
            result.Parts.Select(p => ImmutableArray.Create<PdfCell>(
                p.Name, p.Kind, Peak(p.PeakVoltage, "V"), Peak(p.PeakCurrent, "A"), Peak(p.PeakPower, "W"),
                Number(p.Energy, "J"), Number(p.JouleIntegral, "A²s"))));
    }

    private static void AddPoles(PdfPages pages, TransientResult result)
    {
        if (result.Intervals.All(i => i.Poles.IsEmpty))
        {
            return;
        }

        pages.Heading("Poles", 14, 150);
        var planes = result.Intervals.Take(MostPolePictures)
            .Select(i => (PolePlane.Draw(result, i, pages.Fonts), IntervalName(i))).ToArray();
        var room = PdfPages.TextWidth / (Math.Max(1, planes.Length) * PolePlane.Width);
        pages.Row(planes, Math.Clamp(room, 0.38, 0.55));
        foreach (var interval in result.Intervals)
        {
            pages.Need(50);
            pages.Paragraph(IntervalName(interval), 9.5, isStrong: true);
            PdfTable.Add(
                pages,
                ["Pole", "Time constant|", "Natural frequency|", "Damping ratio|", "Multiplicity|"],
                interval.Poles.Select(pole => PoleWords(pole).Select(w => (PdfCell)w).ToImmutableArray()));
        }
    }

    private static void AddImpulses(PdfPages pages, TransientResult result)
    {
        var intervals = result.Intervals.Where(i => !i.Impulses.IsEmpty).ToArray();
        if (intervals.Length == 0)
        {
            return;
        }

        pages.Heading("Impulses and lost energy", 14, 30);
        foreach (var interval in intervals)
        {
            foreach (var impulse in interval.Impulses)
            {
                var size = impulse.Charge is { } charge
                    ? $"{Number(charge, "C")} through {impulse.Part}"
                    : $"{Number(impulse.VoltSeconds, "Vs")} across {impulse.Part}";
                var remedy = impulse.Remedy is { } words ? $"; {words}" : "";
                pages.Paragraph($"{InstantWords.At(result, impulse.Time)}: {size}{remedy}.");
            }

            pages.Paragraph($"Energy lost in them: {Number(interval.EnergyLost, "J")}.");
        }
    }

    private static void AddChecks(PdfPages pages, TransientResult result)
    {
        pages.Heading("Self-checks", 14, 40);
        PdfTable.Add(
            pages,
            ["Check", "Worst|", "Allowed|", "Verdict"],
            result.SelfChecks
                .Select(c => ImmutableArray.Create<PdfCell>(
                    c.Name, Small(c.Worst), Small(c.Allowed),
                    c.Holds ? "holds" : "FAILED: do not use these figures"))
                .Concat(result.NotJudged.Select(n =>
                    ImmutableArray.Create<PdfCell>(n.Name, "", "", $"not judged: {n.Reason}"))));
    }

    private static void AddSource(PdfPages pages, TransientResult result, string command)
    {
        var source = result.Circuit.Source;
        pages.NewPage();
        pages.Heading("The circuit file", 14, 30);
        PdfTable.Add(
            pages,
            ["Line|", "Text"],
            Enumerable.Range(1, Math.Min(source.LineCount, MostLines))
                .Select(n => ImmutableArray.Create<PdfCell>($"{n}", source.Line(n).Replace("\t", "    "))));
        pages.Paragraph($"SHA-256 {source.Sha256}");
        pages.Paragraph($"Circuit Transient {HtmlReport.Version}; to make this again: {command}");
        pages.Paragraph(TerminalSummary.Closing, 8.5, PlotStyle.Grey);
    }
}
