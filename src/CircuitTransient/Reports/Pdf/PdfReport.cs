using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Text;
using SkiaSharp;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Pdf;

/// <summary>The report on paper: the page's content in its order, drawn without a browser.</summary>
public static partial class PdfReport
{
    /// <summary>The document.</summary>
    /// <param name="result">What it reports.</param>
    /// <param name="command">The command that makes it again, as typed.</param>
    public static byte[] Write(TransientResult result, string command)
    {
        using var fonts = new PlotFonts();
        using var stream = new MemoryStream();
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        var outline = Draw(result, command, title, fonts, stream);
        return PdfOutline.Append(stream.ToArray(), outline);
    }

    private static List<(string Title, int Page)> Draw(
        TransientResult result, string command, string title, PlotFonts fonts, MemoryStream stream)
    {
        // No dates: the same input makes the same bytes.
        var metadata = new SKDocumentPdfMetadata
        {
            Title = title,
            Subject = $"SHA-256 {result.Circuit.Source.Sha256}",
            Creator = "Circuit Transient",
        };
        using var document = SKDocument.CreatePdf(stream, metadata);
        var foot = $"{result.Circuit.Source.Name}, SHA-256 {result.Circuit.Source.Sha256[..12]}…";
        using var pages = new PdfPages(document, fonts, foot);
        AddHead(pages, result, title);
        AddVerdict(pages, result);
        AddCautions(pages, result);
        AddEvents(pages, result);
        foreach (var observed in result.Observations)
        {
            AddObservation(pages, result, observed);
        }

        AddFigures(pages, result);
        AddStresses(pages, result);
        AddPoles(pages, result);
        AddImpulses(pages, result);
        AddChecks(pages, result);
        AddSource(pages, result, command);
        pages.Dispose();
        document.Close();
        return pages.Outline;
    }

    private static void AddHead(PdfPages pages, TransientResult result, string title)
    {
        pages.NewPage();
        pages.Heading(title, 20, 60);
        var circuit = result.Circuit;
        var start = circuit.StartsSettled
            ? "sources on for ever before the start"
            : "everything stored at the start as stated";
        var reason = result.UntilReason is { } words ? $" ({words})" : "";
        pages.Paragraph(
            $"{circuit.Source.Name}: {circuit.Parts.Length} parts, {circuit.Nodes.Length} nodes; from 0 s to "
                + $"{EngineeringNumber.Format(result.Until, "s")}{reason}; {start}.",
            8.5,
            PlotStyle.Grey);
        foreach (var note in circuit.Notes)
        {
            pages.Paragraph(note);
        }
    }

    private static void AddVerdict(PdfPages pages, TransientResult result)
    {
        pages.Heading("Verdict", 14, 60);
        pages.Paragraph(TerminalSummary.Verdict(result), 11);
        var order = Enumerable.Range(0, result.Requirements.Length)
            .OrderBy(i => result.Requirements[i].Holds);
        if (!result.Requirements.IsEmpty)
        {
            PdfTable.Add(
                pages,
                ["Required", "Verdict", "Worst value", "Used of the limit"],
                order.Select(i => RequirementRow(result, i)));
        }

        var ratings = result.Parts
            .SelectMany(part => part.Ratings.Select(rating => (part.Name, Rating: rating)))
            .OrderByDescending(r => r.Rating.Used ?? (r.Rating.Holds ? -1 : double.PositiveInfinity))
            .ToArray();
        if (ratings.Length > 0)
        {
            PdfTable.Add(
                pages,
                ["Rated", "Verdict", "Reached", "Used of the rating"],
                ratings.Select(r => ImmutableArray.Create<PdfCell>(
                    $"{r.Name}, {Rated(r.Rating.Unit)}",
                    Held(r.Rating),
                    $"{Reached(r.Rating)} of {Number(r.Rating.Rated, r.Rating.Unit)}",
                    Mark(r.Rating.Used ?? (r.Rating.Holds ? null : double.PositiveInfinity)))));
        }

        var unrated = result.Parts.Where(part => part.Ratings.IsEmpty).Select(part => part.Name).ToArray();
        if (unrated.Length > 0)
        {
            var rest = unrated.Length > 60 ? $" and {unrated.Length - 60} more" : "";
            var names = string.Join(", ", unrated.Take(60));
            pages.Paragraph($"No rating given: {names}{rest}.", 8, PlotStyle.Grey);
        }

        foreach (var part in result.Parts.Where(part => part.LinearUpTo is { Holds: false }))
        {
            var linear = part.LinearUpTo!;
            var direction = linear.Direction is { } words ? $": {words}" : "";
            pages.Paragraph(
                $"{part.Name} is linear up to {Number(linear.Declared, linear.Unit)} but reaches "
                    + $"{Number(linear.Reached, linear.Unit)}{direction}.");
        }

        foreach (var warning in result.Warnings)
        {
            var advice = warning.Diagnostic?.Advice is { } words ? $" ({words})" : "";
            pages.Paragraph(
                $"Warning: {(warning.Line > 0 ? $"line {warning.Line}: " : "")}{warning.Text}{advice}");
        }
    }

    private static ImmutableArray<PdfCell> RequirementRow(TransientResult result, int i)
    {
        var requirement = result.Requirements[i];
        var reason = requirement.Reason is { } words ? $" ({words})" : "";
        var worst = requirement.Worst.Value is { } value
            ? Number(value, requirement.Unit)
            : "no finite value";
        var used = i < result.Circuit.Requirements.Length
            ? Used(result.Circuit.Requirements[i].Bound, requirement)
            : null;
        var doubt = requirement.Doubt is { } doubtful ? $"; in doubt: {doubtful}" : "";
        return
        [
            $"{requirement.Statement}{reason}, line {requirement.Line}{doubt}",
            Held(requirement),
            $"{worst} {InstantWords.At(result, requirement.Worst.Time)}",
            Mark(used),
        ];
    }

    private static PdfCell Mark(double? used) => used switch
    {
        null => "no ratio",
        { } fraction when double.IsFinite(fraction) => new PdfCell(Percent(fraction), fraction),
        _ => new PdfCell("without limit", 1.25),
    };

    private static void AddCautions(PdfPages pages, TransientResult result)
    {
        if (result.Cautions.IsEmpty)
        {
            return;
        }

        pages.Heading("Cautions", 14, 30);
        foreach (var caution in result.Cautions.OrderByDescending(c => c.Severity))
        {
            pages.Paragraph($"{caution.Severity}. {caution.Text} ({caution.Standard})");
        }
    }
}
