using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>The waveforms as comma-separated values by RFC 4180, <c>waveforms.csv</c>: a column of time, then
/// each observation followed by its contributions. A jump stands in two rows of one time; what is
/// undetermined is empty.</summary>
public static class CsvReport
{
    private const string LineEnd = "\r\n"; // RFC 4180, section 2.1

    /// <summary>The file's text.</summary>
    public static string Write(TransientResult result)
    {
        var text = new StringBuilder();
        var columns = new List<ImmutableArray<double>> { result.SampleTimes };
        text.Append("time (s)");
        foreach (var observation in result.Observations)
        {
            AppendHeading(text, $"{observation.Name} ({observation.Unit})");
            columns.Add(observation.Total);
            for (var i = 0; i < observation.Contributions.Length; i++)
            {
                var cause = observation.Contributions[i].Cause;
                AppendHeading(text, $"{observation.Name} from {cause} ({observation.Unit})");
                columns.Add(observation.ByCause[i]);
            }
        }

        text.Append(LineEnd);
        for (var row = 0; row < result.SampleTimes.Length; row++)
        {
            AppendRow(text, columns, row);
        }

        return text.ToString();
    }

    private static void AppendRow(StringBuilder text, List<ImmutableArray<double>> columns, int row)
    {
        for (var column = 0; column < columns.Count; column++)
        {
            if (column > 0)
            {
                text.Append(',');
            }

            var value = columns[column][row];
            if (double.IsFinite(value))
            {
                // Adding zero turns the negative zero into the plain one.
                text.Append(CultureInfo.InvariantCulture, $"{value + 0.0}");
            }
        }

        text.Append(LineEnd);
    }

    private static void AppendHeading(StringBuilder text, string heading)
    {
        text.Append(',');
        if (heading.AsSpan().IndexOfAny(",\"\r\n") < 0)
        {
            text.Append(heading);
            return;
        }

        text.Append('"').Append(heading.Replace("\"", "\"\"", StringComparison.Ordinal)).Append('"');
    }
}
