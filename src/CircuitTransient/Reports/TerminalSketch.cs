using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>A waveform in Unicode blocks: a column shows everything between its least and greatest value, in
/// half cells.</summary>
internal static class TerminalSketch
{
    private const int Columns = 72;
    private const int Rows = 9;
    private const int LabelWidth = 12;

    /// <summary>The lines: the close-up of the peak where there is one, else the whole window.</summary>
    public static ImmutableArray<string> Lines(TransientResult result, ObservationResult observation)
    {
        var window = PlotWindow.Enlarged(result, observation) ?? PlotWindow.Whole(result, observation);
        var points = PlotTrace.Within(result.SampleTimes, observation.Total, window.From, window.To)
            .RemoveAll(point => !double.IsFinite(point.Y));
        if (points.Length < 2)
        {
            return [];
        }

        var (least, greatest) = (Math.Min(0, points.Min(p => p.Y)), Math.Max(0, points.Max(p => p.Y)));
        if (greatest == least)
        {
            return [];
        }

        var filled = new bool[Columns, 2 * Rows];
        for (var column = 0; column < Columns; column++)
        {
            Fill(filled, column, points, window, least, greatest);
        }

        var zero = (int)Math.Round(HalfCell(0, least, greatest)) / 2;
        return
        [
            .. Enumerable.Range(0, Rows).Select(row => Label(row) + Row(filled, row, isZero: row == zero)),
            Times(window),
        ];

        string Label(int row)
        {
            var value =
                row == 0 ? greatest
                : row == Rows - 1 ? least
                : row == zero ? 0
                : double.NaN;
            var label = double.IsNaN(value) ? "" : EngineeringNumber.Format(value, observation.Unit, 3);
            return label.PadLeft(LabelWidth) + " ";
        }
    }

    // Values between samples lie on straight lines, so a column's ends are interpolated.
    private static void Fill(
        bool[,] filled,
        int column,
        ImmutableArray<PlotPoint> points,
        PlotWindow window,
        double least,
        double greatest)
    {
        var width = (window.To - window.From) / Columns;
        var (from, to) = (window.From + (column * width), window.From + ((column + 1) * width));
        var times = points.Select(p => p.X).ToImmutableArray();
        var values = points.Select(p => p.Y).ToImmutableArray();
        var here = PlotTrace.Within(times, values, from, to);
        if (here.IsEmpty)
        {
            return;
        }

        var first = (int)Math.Round(HalfCell(here.Max(p => p.Y), least, greatest));
        var last = (int)Math.Round(HalfCell(here.Min(p => p.Y), least, greatest));
        for (var cell = first; cell <= last; cell++)
        {
            filled[column, cell] = true;
        }
    }

    private static double HalfCell(double value, double least, double greatest) =>
        (greatest - value) / (greatest - least) * ((2 * Rows) - 1);

    private static string Row(bool[,] filled, int row, bool isZero) =>
        string.Concat(Enumerable.Range(0, Columns).Select(column =>
            (filled[column, 2 * row], filled[column, (2 * row) + 1]) switch
            {
                (true, true) => '█',
                (true, false) => '▀',
                (false, true) => '▄',
                _ => isZero ? '·' : ' ',
            })).TrimEnd();

    private static string Times(PlotWindow window)
    {
        var first = EngineeringNumber.Format(window.From - window.Origin, "s", 3);
        var last = EngineeringNumber.Format(window.To - window.Origin, "s", 3)
            + (window.OriginName is { } name ? $" after {name}" : "");
        return new string(' ', LabelWidth + 1) + first
            + last.PadLeft(Math.Max(last.Length + 2, Columns - first.Length));
    }
}
