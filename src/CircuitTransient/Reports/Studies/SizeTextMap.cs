using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The map of two parts' values in characters: which pairs hold.</summary>
internal static class SizeTextMap
{
    private const int MostColumns = 40;
    private const int LabelWidth = 10;
    private const int Beside = 1; // rows and columns shown around what holds

    /// <summary>Writes it, the greatest value of the second part on top, without the rows and columns away
    /// from all that holds.</summary>
    public static void Write(SummaryText text, SizeResult result)
    {
        if (result.Axes.Length != 2)
        {
            return;
        }

        var (columns, rows) = (result.Axes[0], result.Axes[1]);
        var (left, right) = Around(columns.Length, column =>
            Enumerable.Range(0, rows.Length).Any(row => PointAt(result, row, column).Holds));
        var (bottom, top) = Around(rows.Length, row =>
            Enumerable.Range(0, columns.Length).Any(column => PointAt(result, row, column).Holds));
        if (right - left >= MostColumns || top - bottom >= MostColumns || right < left)
        {
            return;
        }

        var (across, up) = (result.Problem.Parts[0], result.Problem.Parts[1]);
        text.Heading(
            $"{up.Name} upwards, {across.Name} to the right: ■ holds, · broken" +
            (result.Chosen is null ? "" : ", ◆ proposed"));
        for (var row = top; row >= bottom; row--)
        {
            var marks = Enumerable.Range(left, right - left + 1).Select(column => Mark(result, row, column));
            text.Paragraph($"{Label(rows[row], up.Unit),LabelWidth}  {string.Join(' ', marks)}");
        }

        var (first, last) = (Label(columns[left], across.Unit), Label(columns[right], across.Unit));
        var room = Math.Max(1, (2 * (right - left + 1)) - 1 - first.Length - last.Length);
        text.Paragraph($"{new string(' ', LabelWidth)}  {first}{new string(' ', room)}{last}");
        if (right - left + 1 < columns.Length || top - bottom + 1 < rows.Length)
        {
            text.Paragraph($"{new string(' ', LabelWidth)}  all else is broken");
        }
    }

    private static SizePoint PointAt(SizeResult result, int row, int column) =>
        result.Points[(row * result.Axes[0].Length) + column];

    private static (int First, int Last) Around(int count, Func<int, bool> holds)
    {
        var holding = Enumerable.Range(0, count).Where(holds).ToArray();
        return holding.Length == 0
            ? (0, -1)
            : (Math.Max(0, holding[0] - Beside), Math.Min(count - 1, holding[^1] + Beside));
    }

    private static char Mark(SizeResult result, int row, int column)
    {
        var isChosen = result.Chosen is { } chosen
            && Nearest(result.Axes[0], chosen.Values[0]) == column
            && Nearest(result.Axes[1], chosen.Values[1]) == row;
        return isChosen ? '◆' : PointAt(result, row, column).Holds ? '■' : '·';
    }

    private static int Nearest(IReadOnlyList<double> axis, double value) =>
        Enumerable.Range(0, axis.Count).MinBy(i => Math.Abs(Math.Log(axis[i] / value)));

    // Three digits label a row; the exact value stands in the table.
    private static string Label(double value, string unit)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(value)) - 2);
        return SizeWords.Value(Math.Round(value / power) * power, unit);
    }
}
