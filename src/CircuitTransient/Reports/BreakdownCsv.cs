using System.Globalization;
using System.Text;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;

namespace CircuitTransient.Reports;

/// <summary>The breakdowns by switching or by mode as comma-separated values by RFC 4180,
/// <c>breakdown.csv</c>: a row for each switching, or each mode and cause, at each extreme.</summary>
public static class BreakdownCsv
{
    private const double Rounding = 1e-17; // of the extreme: less is no digit of it

    /// <summary>The file's text; null where neither breakdown was asked for.</summary>
    public static string? Write(TransientResult result)
    {
        if (result.By is not (Breakdown.Switching or Breakdown.Mode))
        {
            return null;
        }

        var text = new StringBuilder("observation,unit,extreme,time (s),by,name,cause,value\r\n");
        foreach (var observed in result.Observations)
        {
            Add(text, observed, "max", observed.Max, observed.BySwitching?.AtMax);
            Add(text, observed, "min", observed.Min, observed.BySwitching?.AtMin);
            if (result.By == Breakdown.Mode)
            {
                Add(text, observed, "max", observed.Max, observed.ByMode?.AtMax);
                Add(text, observed, "min", observed.Min, observed.ByMode?.AtMin);
            }
        }

        return text.ToString();
    }

    private static void Add(
        StringBuilder text, ObservationResult observed, string which, Extreme extreme,
        SwitchingBreakdown? breakdown)
    {
        if (breakdown is null)
        {
            return;
        }

        Row(text, observed, which, extreme, "switching", breakdown.BaseWords, "", breakdown.Base);
        foreach (var effect in breakdown.Effects)
        {
            Row(text, observed, which, extreme, "switching", effect.Event, "", effect.Value);
        }
    }

    private static void Add(
        StringBuilder text, ObservationResult observed, string which, Extreme extreme,
        ModeBreakdown? breakdown)
    {
        if (breakdown is null)
        {
            return;
        }

        for (var m = 0; m < breakdown.Modes.Length; m++)
        {
            var name = breakdown.Modes[m].Name;
            foreach (var cause in breakdown.Causes)
            {
                Row(text, observed, which, extreme, "mode", name, cause.Cause, cause.Values[m]);
            }
        }

        if (breakdown.Joint != 0)
        {
            Row(text, observed, which, extreme, "mode", "joint", "", breakdown.Joint);
        }
    }

    private static void Row(
        StringBuilder text, ObservationResult observed, string which, Extreme extreme, string by, string name,
        string cause, double? value)
    {
        string?[] cells =
        [
            observed.Name, observed.Unit, which, Figure(extreme.Time), by, name, cause,
            value is { } number ? Figure(Unless(number, extreme)) : "",
        ];
        text.AppendJoin(',', cells.Select(Quoted)).Append("\r\n");
    }

    /// <summary>Nothing where a value lies below what rounding leaves of the extreme.</summary>
    private static double Unless(double value, Extreme extreme) =>
        Math.Abs(value) <= Rounding * Math.Abs(extreme.Value ?? 0) ? 0 : value;

    private static string Figure(double value) => (value + 0.0).ToString("R", CultureInfo.InvariantCulture);

    private static string Quoted(string? cell) =>
        cell.AsSpan().IndexOfAny(",\"\r\n") < 0 ? cell ?? "" : $"\"{cell!.Replace("\"", "\"\"")}\"";
}
