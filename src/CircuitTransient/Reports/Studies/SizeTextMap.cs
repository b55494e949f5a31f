using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The map of two parts' values in characters: which pairs hold.</summary>
internal static class SizeTextMap
{
    private const int MostColumns = 40;
    private const int LabelWidth = 10;

    /// <summary>Writes it, the greatest value of the second part on top.</summary>
    public static void Write(SummaryText text, SizeResult result)
    {
        if (result.Axes.Length != 2 || result.Axes[0].Length > MostColumns || result.Axes[1].Length > MostColumns)
        {
            return;
        }

        var (across, up) = (result.Problem.Parts[0], result.Problem.Parts[1]);
        var (columns, rows) = (result.Axes[0], result.Axes[1]);
        text.Heading(
            $"{up.Name} upwards, {across.Name} to the right: ■ holds, · broken" +
            (result.Chosen is null ? "" : ", ◆ proposed"));
        for (var row = rows.Length - 1; row >= 0; row--)
        {
            var marks = Enumerable.Range(0, columns.Length).Select(column =>
                Mark(result, row, column));
            text.Paragraph(
                $"{SizeWords.Value(Rounded(rows[row]), up.Unit),LabelWidth}  {string.Join(' ', marks)}");
        }

        var (first, last) = (
            SizeWords.Value(Rounded(columns[0]), across.Unit), SizeWords.Value(Rounded(columns[^1]), across.Unit));
        var room = Math.Max(1, (2 * columns.Length) - 1 - first.Length - last.Length);
        text.Paragraph($"{new string(' ', LabelWidth)}  {first}{new string(' ', room)}{last}");
    }

    private static char Mark(SizeResult result, int row, int column)
    {
        var point = result.Points[(row * result.Axes[0].Length) + column];
        var isChosen = result.Chosen is { } chosen
            && Nearest(result.Axes[0], chosen.Values[0]) == column
            && Nearest(result.Axes[1], chosen.Values[1]) == row;
        return isChosen ? '◆' : point.Holds ? '■' : '·';
    }

    private static int Nearest(IReadOnlyList<double> axis, double value) =>
        Enumerable.Range(0, axis.Count).MinBy(i => Math.Abs(Math.Log(axis[i] / value)));

    // Three digits label a row; the exact value stands in the table.
    private static double Rounded(double value)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(value)) - 2);
        return Math.Round(value / power) * power;
    }
}
