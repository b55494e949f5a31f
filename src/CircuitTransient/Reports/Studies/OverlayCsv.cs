using System.Globalization;
using System.Text;
using CircuitTransient.Studies.Overlays;

namespace CircuitTransient.Reports.Studies;

/// <summary>The aligned records as a table, <c>overlay.csv</c> (RFC 4180), thinned to what a picture
/// shows.</summary>
public static class OverlayCsv
{
    /// <summary>The table: one row a sample, the records one after the other.</summary>
    public static string Write(OverlayResult result)
    {
        var text = new StringBuilder(
            "record,unit,time of the study (s),record value,lower,upper,model,difference\n");
        foreach (var record in result.Records)
        {
            var trace = record.Trace;
            for (var k = 0; k < trace.Times.Length; k++)
            {
                var half = trace.HalfWidths.IsEmpty ? 0 : trace.HalfWidths[k];
                text.Append(Quoted(record.File)).Append(',').Append(record.Unit);
                foreach (var value in (double[])[
                    trace.Times[k], trace.Record[k], trace.Record[k] - half, trace.Record[k] + half,
                    trace.Model[k], trace.Record[k] - trace.Model[k]])
                {
                    text.Append(',').Append((value + 0.0).ToString("R", CultureInfo.InvariantCulture));
                }

                text.Append('\n');
            }
        }

        return text.ToString();
    }

    private static string Quoted(string name) =>
        name.AsSpan().ContainsAny(",\"\n\r") ? $"\"{name.Replace("\"", "\"\"")}\"" : name;
}
