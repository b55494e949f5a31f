using CircuitTransient.Circuits;

namespace CircuitTransient.Reports;

/// <summary>What every picture of its own file has: a title and what it comes to above its panels, below them
/// the circuit it shows.</summary>
internal static class PlotPage
{
    /// <summary>Where titles begin.</summary>
    public const double Left = 76;

    /// <summary>What a line of text may take.</summary>
    public const double Width = PlotPanel.Width - Left - 20;

    private const double PixelsPerPoint = 2;

    /// <summary>The picture as SVG.</summary>
    public static string Svg(Func<PlotFonts, Drawing> draw)
    {
        using var fonts = new PlotFonts();
        return SvgRenderer.Write(draw(fonts));
    }

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(Func<PlotFonts, Drawing> draw)
    {
        using var fonts = new PlotFonts();
        return PngRenderer.Write(draw(fonts), fonts, PixelsPerPoint);
    }

    /// <summary>The title.</summary>
    public static Shape Title(string title, PlotFonts fonts) => new TextShape(
        Left, 34, fonts.Fitted(title, 19, Width, isStrong: true), 19, PlotStyle.Ink, IsStrong: true);

    /// <summary>A remark on the picture, in grey.</summary>
    public static Shape Remark(string words, double y, PlotFonts fonts, double size = 12.5) =>
        new TextShape(Left, y, fonts.Fitted(words, size, Width), size, PlotStyle.Grey);

    /// <summary>The circuit at the foot.</summary>
    public static Shape Foot(Circuit circuit, double y, PlotFonts fonts) => Remark(
        $"{circuit.Source.Name}, SHA-256 {circuit.Source.Sha256[..12]}… · a linear model, a calculation aid",
        y, fonts, 11);
}
