using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of a sizing, <c>size.svg</c> and <c>size.png</c>.</summary>
public static class SizePlot
{
    /// <summary>The picture as SVG.</summary>
    public static string Svg(SizeResult result) => PlotPage.Svg(fonts => Draw(result, fonts));

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(SizeResult result) => PlotPage.Png(fonts => Draw(result, fonts));

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(SizeResult result, PlotFonts fonts) =>
        result.Axes.Length == 2 ? SizeMap.Draw(result, fonts) : SizeLine.Draw(result, fonts);
}
