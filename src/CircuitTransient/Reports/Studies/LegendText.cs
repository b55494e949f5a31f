using System.Collections.Immutable;

namespace CircuitTransient.Reports.Studies;

/// <summary>Words beside a picture, broken over lines where they are too long for one.</summary>
internal static class LegendText
{
    private const double Size = 11.5;
    private const double LineHeight = 15;

    /// <summary>Adds the words from a place to the right edge of the picture.</summary>
    /// <returns>The base line of the last line.</returns>
    public static double Add(
        ImmutableArray<Shape>.Builder shapes, PlotFonts fonts, string words, double x, double y)
    {
        var room = PlotPanel.Width - x - 8;
        var line = "";
        foreach (var word in words.Split(' '))
        {
            var longer = line.Length == 0 ? word : $"{line} {word}";
            if (line.Length > 0 && fonts.Width(longer, Size) > room)
            {
                shapes.Add(new TextShape(x, y, line, Size, PlotStyle.Ink));
                (line, y) = (word, y + LineHeight);
            }
            else
            {
                line = longer;
            }
        }

        shapes.Add(new TextShape(x, y, fonts.Fitted(line, Size, room), Size, PlotStyle.Ink));
        return y;
    }
}
