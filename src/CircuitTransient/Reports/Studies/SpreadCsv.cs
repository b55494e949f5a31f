using System.Globalization;
using System.Text;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Reports.Studies;

/// <summary>The draws one by one, the first 20 000 of them, as a table (RFC 4180): the values drawn, then the
/// figures they gave; empty where there is none.</summary>
public static class SpreadCsv
{
    private const string LineEnd = "\r\n";

    /// <summary>The table.</summary>
    public static string Write(SpreadResult spread)
    {
        var text = new StringBuilder("draw");
        foreach (var value in spread.Varied.Values)
        {
            AppendHeading(text, value.Name, value.Unit);
        }

        foreach (var figure in spread.Figures)
        {
            AppendHeading(text, figure.Figure.Name, figure.Figure.Unit);
        }

        text.Append(LineEnd);
        var (k, f) = (spread.Varied.Values.Length, spread.Figures.Length);
        for (var draw = 0; draw < (spread.Draws?.RowCount ?? 0); draw++)
        {
            text.Append(CultureInfo.InvariantCulture, $"{draw + 1}");
            Append(text, spread.Draws!.Points.AsSpan(draw * k, k));
            Append(text, spread.Draws.Rows.AsSpan(draw * f, f));
            text.Append(LineEnd);
        }

        return text.ToString();
    }

    private static void Append(StringBuilder text, ReadOnlySpan<double> numbers)
    {
        foreach (var number in numbers)
        {
            text.Append(',');
            if (double.IsFinite(number))
            {
                // Adding zero turns the negative zero into the plain one.
                text.Append(CultureInfo.InvariantCulture, $"{number + 0.0}");
            }
        }
    }

    private static void AppendHeading(StringBuilder text, string name, string unit)
    {
        var heading = unit.Length > 0 ? $"{name} ({unit})" : name;
        text.Append(',').Append(heading.AsSpan().IndexOfAny(",\"\r\n") < 0
            ? heading
            : $"\"{heading.Replace("\"", "\"\"", StringComparison.Ordinal)}\"");
    }
}
