using System.Collections.Immutable;

namespace CircuitTransient.Reports.Pdf;

/// <summary>A cell: a text, or a mark on the common scale, or a signed bar.</summary>
/// <param name="Used">Fraction of a limit that is used; drawn before the text.</param>
/// <param name="Bar">Signed part of the longest bar, −1 to 1.</param>
internal sealed record PdfCell(string Text, double? Used = null, double? Bar = null)
{
    /// <summary>A plain text.</summary>
    public static implicit operator PdfCell(string text) => new(text);
}

/// <summary>Tables on pages; the head stands again on every page.</summary>
internal static class PdfTable
{
    private const double Size = 8;
    private const double LineHeight = 11;
    private const double Gap = 10;
    private const double ScaleWidth = 92; // 0 to 125 % over 75 points
    private const double BarWidth = 70;

    /// <summary>Adds a table.</summary>
    /// <param name="pages">Where to.</param>
    /// <param name="heads">The heads of the columns; one that ends in <c>|</c> stands at the right
    /// edge.</param>
    /// <param name="rows">The cells.</param>
    public static void Add(
        PdfPages pages, ImmutableArray<string> heads, IEnumerable<ImmutableArray<PdfCell>> rows)
    {
        var all = rows.ToArray();
        var widths = Widths(pages, heads, all);
        var isRight = heads.Select(h => h.EndsWith('|')).ToArray();
        pages.Need(2.6 * LineHeight);
        AddHead();
        foreach (var row in all)
        {
            var lines = row
                .Select((c, i) => TextLines.Of(pages.Fonts, c.Text, Size, TextRoom(c, widths[i]))).ToArray();
            var height = (lines.Max(l => l.Length) * LineHeight) + 5;
            var page = pages.Count;
            pages.Need(height);
            if (pages.Count != page)
            {
                AddHead();
            }

            pages.Block(height, y => Row(pages, row, lines, widths, isRight, y));
        }

        pages.Space(8);

        void AddHead() => pages.Block(LineHeight + 3, y => heads.Select((head, i) => new TextShape(
            Place(pages, widths, i) + (isRight[i] ? widths[i] : 0),
            y + 9,
            head.TrimEnd('|'),
            7.5,
            PlotStyle.Grey,
            isRight[i] ? TextAnchor.End : TextAnchor.Start)));
    }

    private static IEnumerable<Shape> Row(
        PdfPages pages,
        ImmutableArray<PdfCell> row,
        ImmutableArray<string>[] lines,
        double[] widths,
        bool[] isRight,
        double y)
    {
        var end = Place(pages, widths, widths.Length - 1) + widths[^1];
        yield return new LineShape(pages.ColumnLeft, y, end, y, new(PlotStyle.Grid, 0.7));
        for (var i = 0; i < row.Length; i++)
        {
            var x = Place(pages, widths, i);
            foreach (var shape in Picture(row[i], x, y + 7.5))
            {
                yield return shape;
            }

            for (var k = 0; k < lines[i].Length; k++)
            {
                yield return new TextShape(
                    isRight[i] ? x + widths[i] : x + (row[i].Used is null ? 0 : ScaleWidth),
                    y + 10 + (k * LineHeight), lines[i][k], Size, PlotStyle.Ink,
                    isRight[i] ? TextAnchor.End : TextAnchor.Start);
            }
        }
    }

    private static IEnumerable<Shape> Picture(PdfCell cell, double x, double y)
    {
        var ink = new Stroke(PlotStyle.Accent, 1.4);
        if (cell.Used is { } used)
        {
            var end = x + 2 + (60 * Math.Min(used, 1.25));
            yield return new LineShape(x + 2, y, x + 77, y, new(PlotStyle.Axis, 0.7));
            yield return new LineShape(x + 62, y - 5, x + 62, y + 5, new(PlotStyle.Ink, 1));
            yield return new LineShape(x + 2, y, end, y, ink);
            yield return new DiscShape(end, y, 3, PlotStyle.Accent);
        }

        if (cell.Bar is { } bar)
        {
            var middle = x + (BarWidth / 2);
            var width = Math.Abs(bar) * ((BarWidth / 2) - 2);
            var start = bar < 0 ? middle - width : middle;
            yield return new RectangleShape(start, y - 3, width, 6, PlotStyle.Accent);
            yield return new LineShape(middle, y - 5, middle, y + 5, new(PlotStyle.Axis, 0.7));
        }
    }

    private static double[] Widths(
        PdfPages pages, ImmutableArray<string> heads, ImmutableArray<PdfCell>[] rows)
    {
        var fonts = pages.Fonts;
        var widths = heads.Select((head, i) => rows
            .Select(row => fonts.Width(row[i].Text, Size) + Room(row[i]))
            .Append(fonts.Width(head, 7.5)).Max() + 1).ToArray();
        var excess = widths.Sum() + (Gap * (widths.Length - 1)) - pages.ColumnWidth;
        while (excess > 0)
        {
            var widest = Array.IndexOf(widths, widths.Max());
            var step = Math.Min(excess, 8);
            (widths[widest], excess) = (widths[widest] - step, excess - step);
        }

        return widths;
    }

    private static double Room(PdfCell cell) =>
        cell.Used is not null ? ScaleWidth : cell.Bar is not null ? BarWidth : 0;

    private static double TextRoom(PdfCell cell, double width) => Math.Max(20, width - Room(cell));

    private static double Place(PdfPages pages, double[] widths, int column) =>
        pages.ColumnLeft + widths.Take(column).Sum(w => w + Gap);
}
