using System.Globalization;

namespace CircuitTransient.Reports.Studies;

/// <summary>Shades of one hue, from the paper to the accent: what is darker is more.</summary>
internal static class ScanShade
{
    private static readonly (int R, int G, int B) Light = Read("#eef3f5");
    private static readonly (int R, int G, int B) Dark = Read(PlotStyle.Accent);

    /// <summary>The shade of a fraction between 0, the lightest, and 1.</summary>
    public static string Of(double fraction)
    {
        var f = double.IsFinite(fraction) ? Math.Clamp(fraction, 0, 1) : 0;
        return $"#{Mix(Light.R, Dark.R):x2}{Mix(Light.G, Dark.G):x2}{Mix(Light.B, Dark.B):x2}";

        int Mix(int a, int b) => (int)Math.Round(a + ((b - a) * f));
    }

    private static (int, int, int) Read(string colour) => (Part(colour, 1), Part(colour, 3), Part(colour, 5));

    private static int Part(string colour, int place) =>
        int.Parse(colour.AsSpan(place, 2), NumberStyles.HexNumber, CultureInfo.InvariantCulture);
}
