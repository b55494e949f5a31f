using System.Collections.Immutable;

namespace CircuitTransient.Reports.Pdf;

/// <summary>Breaks a text over lines of a width in points: at spaces, or within words that are too
/// long.</summary>
internal static class TextLines
{
    /// <summary>The lines.</summary>
    public static ImmutableArray<string> Of(
        PlotFonts fonts, string text, double size, double width, bool isStrong = false)
    {
        if (fonts.Width(text, size, isStrong) <= width)
        {
            return [text];
        }

        var lines = ImmutableArray.CreateBuilder<string>();
        var line = "";
        foreach (var word in text.Split(' '))
        {
            var longer = line.Length == 0 ? word : $"{line} {word}";
            if (fonts.Width(longer, size, isStrong) <= width)
            {
                line = longer;
                continue;
            }

            if (line.Length > 0)
            {
                lines.Add(line);
            }

            line = word;
            while (fonts.Width(line, size, isStrong) > width && line.Length > 1)
            {
                var kept = Fitting(fonts, line, size, width, isStrong);
                lines.Add(line[..kept]);
                line = line[kept..];
            }
        }

        lines.Add(line);
        return lines.ToImmutable();
    }

    // How many characters of a long word fit, at least one; a surrogate pair is not parted.
    private static int Fitting(PlotFonts fonts, string word, double size, double width, bool isStrong)
    {
        var (fits, tooMany) = (1, word.Length);
        while (tooMany - fits > 1)
        {
            var middle = (fits + tooMany) / 2;
            var isTooMany = fonts.Width(word[..middle], size, isStrong) > width;
            (fits, tooMany) = isTooMany ? (fits, middle) : (middle, tooMany);
        }

        return char.IsHighSurrogate(word[fits - 1]) ? Math.Min(fits + 1, word.Length) : fits;
    }
}
