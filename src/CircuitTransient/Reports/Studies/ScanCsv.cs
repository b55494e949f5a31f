using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>The points of a scan as comma-separated values by RFC 4180, <c>scan.csv</c>: the scanned values,
/// then each figure and, for extremes, when it stood. What has no value is empty.</summary>
public static class ScanCsv
{
    private const string LineEnd = "\r\n"; // RFC 4180, section 2.1

    /// <summary>The file's text.</summary>
    public static string Write(ScanResult result)
    {
        var text = new StringBuilder();
        var (headings, points) = result.Axes.IsEmpty && result.Scatter is { } scatter
            ? ([Heading(scatter.Axis)], scatter.Points)
            : (result.Axes.Select(Heading), result.Points);
        AppendRow(text, [.. headings, .. result.Figures.SelectMany(Headings)]);
        foreach (var point in points)
        {
            AppendRow(text, [.. point.At.Select(value => Cell(value)), .. Cells(result.Figures, point)]);
        }

        return text.ToString();
    }

    private static string Heading(ScanAxis axis) => $"{axis.Varied.Name} ({axis.Varied.Unit})";

    private static IEnumerable<string> Headings(StudyFigure figure)
    {
        yield return figure.Unit.Length > 0 ? $"{figure.Name} ({figure.Unit})" : figure.Name;
        if (HasTime(figure))
        {
            yield return $"time of {figure.Name} (s)";
        }
    }

    private static IEnumerable<string> Cells(ImmutableArray<StudyFigure> figures, ScanPoint point)
    {
        for (var f = 0; f < figures.Length; f++)
        {
            yield return Cell(point.Found?.Values[f]);
            if (HasTime(figures[f]))
            {
                yield return Cell(point.Found?.Times[f]);
            }
        }
    }

    private static bool HasTime(StudyFigure figure) =>
        figure.Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum;

    private static string Cell(double? value) => value is { } number && double.IsFinite(number)
        ? (number + 0.0).ToString(CultureInfo.InvariantCulture)
        : "";

    private static void AppendRow(StringBuilder text, ImmutableArray<string> cells) =>
        text.AppendJoin(',', cells.Select(Quoted)).Append(LineEnd);

    private static string Quoted(string cell) => cell.AsSpan().IndexOfAny(",\"\r\n") < 0
        ? cell
        : $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}
