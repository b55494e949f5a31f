using SkiaSharp;

namespace CircuitTransient.Reports;

/// <summary>The two faces of the pictures, embedded so that they look and measure the same on every
/// machine.</summary>
public sealed class PlotFonts : IDisposable
{
    private readonly SKTypeface regular = Load("Inter-Regular.ttf");
    private readonly SKTypeface strong = Load("Inter-SemiBold.ttf");

    /// <summary>A font of a size in points; the caller disposes of it.</summary>
    public SKFont Font(double size, bool isStrong) =>
        new(isStrong ? strong : regular, (float)size)
        {
            Edging = SKFontEdging.Antialias,
            Hinting = SKFontHinting.None,
            Subpixel = true,
        };

    /// <summary>The width of a text in points.</summary>
    public double Width(string text, double size, bool isStrong = false)
    {
        using var font = Font(size, isStrong);
        return font.MeasureText(text);
    }

    /// <summary>The text, cut with an ellipsis where it is wider than a limit.</summary>
    public string Fitted(string text, double size, double limit, bool isStrong = false)
    {
        if (Width(text, size, isStrong) <= limit)
        {
            return text;
        }

        var runes = text.EnumerateRunes().ToArray();
        var (kept, tooMany) = (0, runes.Length);
        while (tooMany - kept > 1)
        {
            var middle = (kept + tooMany) / 2;
            var isTooMany = Width(Cut(middle), size, isStrong) > limit;
            (kept, tooMany) = isTooMany ? (kept, middle) : (middle, tooMany);
        }

        return Cut(kept);

        string Cut(int count) => string.Concat(runes.Take(count)).TrimEnd() + "…";
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        regular.Dispose();
        strong.Dispose();
    }

    private static SKTypeface Load(string face)
    {
        using var stream = typeof(PlotFonts).Assembly.GetManifestResourceStream(face)
            ?? throw new InvalidOperationException($"{face} is not embedded");
        return SKTypeface.FromStream(stream);
    }
}
