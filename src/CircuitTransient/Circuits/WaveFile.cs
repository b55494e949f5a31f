using System.Globalization;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The points of a wave kept in a table of its own: time in the first column, value in the second,
/// the units in the header as in <c>time (s),level (V)</c>.</summary>
internal sealed record WaveFile(IReadOnlyList<(double Time, double Level)> Points, Dimension Dimension)
{
    private const int MostPoints = 100_000;

    public static WaveFile? Read(CheckState state, StraightLinesFileSyntax syntax, Dimension? expected)
    {
        if (LeavesFolder(syntax.Path))
        {
            state.Findings.Error(syntax.Span, $"`{syntax.Path}` lies outside the folder of the circuit",
                "put the file beside the circuit, or in a folder below it");
            return null;
        }

        var outcome = state.ReadFile(syntax.Path);
        foreach (var diagnostic in outcome.Diagnostics)
        {
            state.Findings.Add(diagnostic);
        }

        if (outcome.Value is null)
        {
            if (outcome.Diagnostics.IsEmpty)
            {
                state.Findings.Error(syntax.Span, $"the file `{syntax.Path}` cannot be read",
                    "it is looked for in the folder of the circuit");
            }

            return null;
        }

        return Parse(outcome.Value, state.Findings, syntax, expected);
    }

    /// <summary>Whether a path could reach anything but the circuit's folder and those below it.</summary>
    public static bool LeavesFolder(string path) =>
        path.Length == 0 || path[0] is '/' or '\\' or '~' || path.Contains(':', StringComparison.Ordinal)
        || path.Split('/', '\\').Contains("..");

    private static WaveFile? Parse(
        SourceText text, Findings findings, StraightLinesFileSyntax syntax, Dimension? expected)
    {
        if (Header(text) is not var (time, level))
        {
            findings.Add(Wrong(text, 1,
                "the first line does not name a time and a voltage or current with their units",
                "write `time (s),level (V)`"));
            return null;
        }

        if (expected is { } other && level.Dimension != other)
        {
            findings.Error(syntax.Span,
                $"`{syntax.Path}` holds {Measure.Of(level.Dimension).Phrase}; the terms before it are "
                + $"{Measure.Of(other).Phrase}", "terms of one wave have one unit");
            return null;
        }

        var points = new List<(double Time, double Level)>();
        for (var line = 2; line <= text.LineCount; line++)
        {
            if (line == text.LineCount && text.Line(line).Length == 0)
            {
                break; // the line break after the last line
            }

            if (AddPoint(points, text, line, time.Scale, level.Scale) is { } mistake)
            {
                findings.Add(mistake);
                return null;
            }
        }

        if (points.Count > 0)
        {
            return new WaveFile(points, level.Dimension);
        }

        findings.Add(Wrong(text, 1, "this file has no points", "add lines such as `0,0` and `1e-3,5`"));
        return null;
    }

    private static ((Dimension Dimension, double Scale), (Dimension Dimension, double Scale))? Header(
        SourceText text) =>
        Cells(text, 1) is [var first, var second, ..]
            && UnitOf(first) is { } time && time.Dimension == Dimension.Time
            && UnitOf(second) is { } level
            && (level.Dimension == Dimension.Voltage || level.Dimension == Dimension.Current)
            ? (time, level)
            : null;

    private static Diagnostic? AddPoint(
        List<(double Time, double Level)> points, SourceText text, int line, double second, double unit)
    {
        if (Cells(text, line) is not [{ Length: > 0 } first, { Length: > 0 } other, ..])
        {
            return Wrong(text, line, "a time or a value is missing in this line",
                "fill the gap or delete the line");
        }

        if (Number(first) is not { } time || Number(other) is not { } level)
        {
            return Wrong(text, line, "this line does not hold two numbers",
                "write numbers with a decimal point, parted by a comma");
        }

        if (StraightLines.Mistake(points, time * second) is { } mistake)
        {
            return Wrong(text, line, mistake.Message, mistake.Advice);
        }

        if (points.Count == MostPoints)
        {
            return Wrong(text, line, "this file has more than 100 000 points",
                "keep every second point, or fewer");
        }

        points.Add((time * second, level * unit));
        return null;
    }

    private static Diagnostic Wrong(SourceText text, int line, string message, string advice) =>
        Diagnostic.Error(text, text.SpanOfLine(line), message, advice);

    private static string[] Cells(SourceText text, int line) =>
        text.Line(line).Trim('\uFEFF').Split(',', StringSplitOptions.TrimEntries);

    private static double? Number(string cell) =>
        double.TryParse(cell, NumberStyles.Float, CultureInfo.InvariantCulture, out var value)
            && double.IsFinite(value)
            ? value : null;

    private static (Dimension Dimension, double Scale)? UnitOf(string title)
    {
        var open = title.LastIndexOf('(');
        return open >= 0 && title.EndsWith(')')
            && Unit.TryRead(title.AsSpan(open + 1, title.Length - open - 2), out var unit)
            ? (unit.Dimension, Math.Pow(10, unit.Exponent) * unit.Factor)
            : null;
    }
}
