using SkiaSharp;

namespace CircuitTransient.Reports.Pdf;

/// <summary>Pages as they fill from top to bottom: headings, paragraphs and pictures, each on a new page
/// where the old one has no room. Units are points; a page is A4 turned, so that waveforms are
/// wide.</summary>
internal sealed class PdfPages : IDisposable
{
    /// <summary>Left edge of the text.</summary>
    public const double Left = 42;

    /// <summary>Width of the text.</summary>
    public const double TextWidth = Width - (2 * Left);

    private const double Width = 841.89;
    private const double Height = 595.28;
    private const double Top = 40;
    private const double Bottom = Height - 42;

    private readonly SKDocument document;
    private readonly string foot;
    private SKCanvas? canvas;
    private double y = Top;

    /// <summary>Begins on a document; the foot stands under every page.</summary>
    public PdfPages(SKDocument document, PlotFonts fonts, string foot) =>
        (this.document, Fonts, this.foot) = (document, fonts, foot);

    /// <summary>The faces of all text.</summary>
    public PlotFonts Fonts { get; }

    /// <summary>Headings with the number of their page, from 0, for the outline.</summary>
    public List<(string Title, int Page)> Outline { get; } = [];

    /// <summary>Pages begun.</summary>
    public int Count { get; private set; }

    /// <summary>Left edge of the column that is being filled; mostly that of the text.</summary>
    public double ColumnLeft { get; private set; } = Left;

    /// <summary>Width of the column that is being filled.</summary>
    public double ColumnWidth { get; private set; } = TextWidth;

    /// <summary>Two blocks side by side where their height has room on a page, else one after the
    /// other.</summary>
    /// <param name="first">Adds the first.</param>
    /// <param name="second">Adds the second.</param>
    /// <param name="height">What the taller one needs at most.</param>
    public void SideBySide(Action first, Action second, double height)
    {
        if (height > Bottom - Top)
        {
            first();
            second();
            return;
        }

        Need(height);
        var top = y;
        const double gap = 24;
        ColumnWidth = (TextWidth - gap) * 0.56; // the first has two columns of figures more
        first();
        (var end, y) = (y, top);
        (ColumnLeft, ColumnWidth) = (Left + ColumnWidth + gap, TextWidth - ColumnWidth - gap);
        second();
        (y, ColumnLeft, ColumnWidth) = (Math.Max(y, end), Left, TextWidth);
    }

    /// <summary>What is left of the page.</summary>
    public double Room => canvas is null ? Bottom - Top : Bottom - y;

    /// <summary>Makes room, on a new page where this one has too little.</summary>
    public void Need(double height)
    {
        if (canvas is null || y + height > Bottom)
        {
            NewPage();
        }
    }

    /// <summary>Begins a page.</summary>
    public void NewPage()
    {
        End();
        canvas = document.BeginPage((float)Width, (float)Height);
        Count++;
        y = Top;
        Write(foot, Left, Height - 22, 7.5, PlotStyle.Grey);
        Write($"{Count}", Left + TextWidth, Height - 22, 7.5, PlotStyle.Grey, TextAnchor.End);
    }

    /// <summary>A heading, listed in the outline, kept with what follows it.</summary>
    public void Heading(string text, double size, double follows)
    {
        Need((size * 2) + follows);
        y += size * 0.9;
        Outline.Add((text, Count - 1));
        var fitted = Fonts.Fitted(text, size, TextWidth, isStrong: true);
        Write(fitted, Left, y + size, size, PlotStyle.Ink, isStrong: true);
        y += size * 1.7;
    }

    /// <summary>A paragraph within a comfortable measure.</summary>
    public void Paragraph(string text, double size = 9, string colour = PlotStyle.Ink, bool isStrong = false)
    {
        foreach (var line in TextLines.Of(Fonts, text, size, Math.Min(ColumnWidth, 62 * size), isStrong))
        {
            Need(size * 1.5);
            Write(line, ColumnLeft, y + size, size, colour, isStrong: isStrong);
            y += size * 1.45;
        }

        y += size * 0.4;
    }

    /// <summary>A picture at a scale.</summary>
    public void Picture(Drawing drawing, double scale)
    {
        Need(drawing.Height * scale);
        canvas!.Save();
        canvas.Translate((float)Left, (float)y);
        canvas.Scale((float)scale);
        PngRenderer.Draw(drawing, canvas, Fonts);
        canvas.Restore();
        y += (drawing.Height * scale) + 4;
    }

    /// <summary>Pictures side by side, over several rows where they are many.</summary>
    public void Row(IReadOnlyList<(Drawing Drawing, string Caption)> pictures, double scale)
    {
        var (place, height) = (Left, pictures.Count == 0 ? 0 : (pictures[0].Drawing.Height * scale) + 14);
        Need(height);
        foreach (var (drawing, caption) in pictures)
        {
            var width = drawing.Width * scale;
            if (place + width > Left + TextWidth + 1)
            {
                (place, y) = (Left, y + height);
                Need(height);
            }

            canvas!.Save();
            canvas.Translate((float)place, (float)y);
            canvas.Scale((float)scale);
            PngRenderer.Draw(drawing, canvas, Fonts);
            canvas.Restore();
            Write(Fonts.Fitted(caption, 7.5, width - 6), place, y + height - 5, 7.5, PlotStyle.Grey);
            place += width;
        }

        y += height;
    }

    /// <summary>Shapes laid out by the caller from the current height downwards.</summary>
    public void Block(double height, Func<double, IEnumerable<Shape>> shapes)
    {
        Need(height);
        PngRenderer.Draw(new Drawing(Width, Height, "", [.. shapes(y)]), canvas!, Fonts);
        y += height;
    }

    /// <summary>Empty space.</summary>
    public void Space(double height) => y += height;

    /// <summary>Ends the last page.</summary>
    public void Dispose() => End();

    private void End()
    {
        if (canvas is not null)
        {
            document.EndPage();
            canvas = null; // it belongs to the document
        }
    }

    private void Write(
        string text,
        double x,
        double place,
        double size,
        string colour,
        TextAnchor anchor = TextAnchor.Start,
        bool isStrong = false)
    {
        var shape = new TextShape(x, place, text, size, colour, anchor, isStrong);
        PngRenderer.Draw(new Drawing(Width, Height, "", [shape]), canvas!, Fonts);
    }
}
