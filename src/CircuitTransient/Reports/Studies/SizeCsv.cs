using System.Globalization;
using System.Text;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The table of a sizing, <c>size.csv</c> (RFC 4180): a row for each set of values looked at, with
/// the margin of each requirement and rating.</summary>
public static class SizeCsv
{
    private const string LineBreak = "\r\n";

    /// <summary>The table: the points of the scan, then preferred values that are not among them.</summary>
    public static string Write(SizeResult result)
    {
        var text = new StringBuilder();
        var aim = result.Request.Aim as Extremal;
        string[] header =
        [
            .. result.Problem.Parts.Select(part => $"{part.Name} ({part.Unit})"),
            "holds",
            .. aim is null ? [] : new[] { $"{aim.Of.Content.Trim()} ({result.Problem.AimUnit})" },
            .. result.Problem.Constraints.Select(c => $"margin of {c.Name} ({c.Unit})"),
        ];
        text.AppendJoin(',', header.Select(Quoted)).Append(LineBreak);
        var preferred = result.Preferred == result.Points ? [] : result.Preferred;
        foreach (var point in result.Points.Concat(preferred))
        {
            string[] row =
            [
                .. point.Values.Select(Number),
                point.Holds ? "yes" : "no",
                .. aim is null ? [] : new[] { point.Aim is { } value ? Number(value) : "" },
                .. point.Shares.Zip(result.Problem.Constraints, (share, c) => Number(share * c.Scale)),
            ];
            text.AppendJoin(',', row).Append(LineBreak);
        }

        return text.ToString();
    }

    private static string Number(double value) =>
        double.IsFinite(value) ? (value + 0.0).ToString("R", CultureInfo.InvariantCulture) : "";

    private static string Quoted(string text) => text.AsSpan().IndexOfAny("\",\r\n") < 0
        ? text
        : $"\"{text.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}
