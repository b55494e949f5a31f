using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of a sizing, <c>size.svg</c> and <c>size.png</c>.</summary>
public static class SizePlot
{
    private const double PixelsPerPoint = 2;

    /// <summary>The picture as SVG.</summary>
    public static string Svg(SizeResult result)
    {
        using var fonts = new PlotFonts();
        return SvgRenderer.Write(Draw(result, fonts));
    }

    /// <summary>The picture as PNG.</summary>
    public static byte[] Png(SizeResult result)
    {
        using var fonts = new PlotFonts();
        return PngRenderer.Write(Draw(result, fonts), fonts, PixelsPerPoint);
    }

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(SizeResult result, PlotFonts fonts) =>
        result.Axes.Length == 2 ? SizeMap.Draw(result, fonts) : SizeLine.Draw(result, fonts);
}
