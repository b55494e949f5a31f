using System.Collections.Immutable;
using System.Text;

namespace CircuitTransient.Reports;

/// <summary>A column of a table in plain text.</summary>
/// <param name="IsRight">Whether its cells stand at the right edge.</param>
/// <param name="IsProse">Whether its cells are broken over lines first, where the table is too wide.</param>
public sealed record TextColumn(bool IsRight = false, bool IsProse = false);

/// <summary>Tables and paragraphs in plain text, laid out by display width.</summary>
public static class TextTable
{
    private const int Gap = 2;
    private const int NarrowestColumn = 6;

    /// <summary>The lines of a table, none wider than <paramref name="width"/>.</summary>
    public static ImmutableArray<string> Lines(
        ImmutableArray<TextColumn> columns,
        ImmutableArray<ImmutableArray<string>> rows,
        int indent,
        int width)
    {
        var printable = rows.Select(row => row.Select(DisplayWidth.Printable).ToArray()).ToArray();
        var widths = columns
            .Select((_, i) => printable.Select(row => DisplayWidth.Of(row[i])).DefaultIfEmpty().Max())
            .ToArray();
        Narrow(columns, widths, width - indent);
        var lines = ImmutableArray.CreateBuilder<string>();
        foreach (var row in printable)
        {
            var cells = row.Select((cell, i) => Wrap(cell, widths[i])).ToArray();
            for (var line = 0; line < cells.Max(cell => cell.Length); line++)
            {
                lines.Add(Line(columns, widths, cells, line, indent));
            }
        }

        return lines.ToImmutable();
    }

    /// <summary>The lines of a text broken at spaces, or within words that are too long.</summary>
    public static ImmutableArray<string> Wrap(string text, int width)
    {
        if (DisplayWidth.Of(text) <= width)
        {
            return [text]; // spaces at its start and in a row are kept
        }

        var lines = ImmutableArray.CreateBuilder<string>();
        var line = new StringBuilder();
        var used = 0;
        foreach (var word in text.Split(' '))
        {
            var space = line.Length > 0 ? 1 : 0;
            var needed = DisplayWidth.Of(word);
            if (used + space + needed > width && line.Length > 0)
            {
                lines.Add(line.ToString());
                line.Clear();
                (used, space) = (0, 0);
            }

            line.Append(' ', space);
            used += space;
            foreach (var rune in word.EnumerateRunes())
            {
                if (used + DisplayWidth.Of(rune) > width && used > 0)
                {
                    lines.Add(line.ToString());
                    line.Clear();
                    used = 0;
                }

                line.Append(rune);
                used += DisplayWidth.Of(rune);
            }
        }

        lines.Add(line.ToString());
        return lines.ToImmutable();
    }

    private static void Narrow(ImmutableArray<TextColumn> columns, int[] widths, int available)
    {
        available -= Gap * (columns.Length - 1);
        while (widths.Sum() > available)
        {
            var prose = Enumerable.Range(0, widths.Length)
                .Where(i => columns[i].IsProse && widths[i] > 2 * NarrowestColumn).ToArray();
            var candidates = prose.Length > 0 ? prose : [.. Enumerable.Range(0, widths.Length)];
            var widest = candidates.MaxBy(i => widths[i]);
            if (widths[widest] <= NarrowestColumn)
            {
                return;
            }

            widths[widest]--;
        }
    }

    private static string Line(
        ImmutableArray<TextColumn> columns,
        int[] widths,
        ImmutableArray<string>[] cells,
        int line,
        int indent)
    {
        var text = new StringBuilder().Append(' ', indent);
        for (var i = 0; i < columns.Length; i++)
        {
            var cell = line < cells[i].Length ? cells[i][line] : "";
            var padding = Math.Max(0, widths[i] - DisplayWidth.Of(cell));
            text.Append(' ', i > 0 ? Gap : 0);
            text.Append(' ', columns[i].IsRight ? padding : 0).Append(cell);
            text.Append(' ', columns[i].IsRight ? 0 : padding);
        }

        return text.ToString().TrimEnd(' ');
    }
}
