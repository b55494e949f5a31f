using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>The rows of a record as they stand in the file.</summary>
/// <param name="Times">Instants in seconds, or the rows' numbers from 0 where there is no time.</param>
/// <param name="FirstRepeat">Line of the first row that repeats the instant before it; 0 for none.</param>
/// <param name="RepeatCount">How many rows do.</param>
/// <param name="IsPaired">Whether every instant stands exactly twice.</param>
/// <param name="LeftOut">What is to be said of rows without a value.</param>
/// <param name="CutOff">What is to be said of the last row, where it is not whole.</param>
internal sealed record RecordTable(
    double[] Times, double[] Values, double[]? HalfWidths, int RowCount, int FirstRepeat, int RepeatCount,
    bool IsPaired, string? LeftOut, string? CutOff);

/// <summary>Reads the rows of a record, one after the other.</summary>
internal sealed class RecordRows
{
    private const int MostCells = 256;

    private readonly RecordBytes bytes;
    private readonly RecordNotation notation;
    private readonly RecordChannel channel;
    private readonly double timeScale;
    private readonly double valueScale;
    private readonly int needed;
    private readonly List<double> times;
    private readonly List<double> values;
    private readonly List<double> halves = [];
    private int start;
    private int line;
    private int rows;
    private (int Count, int FirstLine) missing;
    private (int Count, int FirstLine, bool IsPaired) repeats = (0, 0, true);
    private string? cutOff;

    public RecordRows(
        RecordBytes bytes, RecordHead head, RecordNotation notation, RecordColumns columns,
        RecordChannel channel)
    {
        this.bytes = bytes;
        this.notation = notation;
        this.channel = channel;
        (line, start) = (head.Lines[notation.FirstRow].Number, head.Lines[notation.FirstRow].Start);
        timeScale = channel.Time >= 0 && columns.Units[channel.Time] is { } time
            ? RecordUnit.ScaleOf(time) : 1;
        valueScale = columns.Units[channel.Value] is { } unit ? RecordUnit.ScaleOf(unit) : 1;
        needed = 1 + Math.Max(channel.Time, Math.Max(channel.Value, channel.Second));
        var expected = (bytes.Span.Length - start) / Math.Max(4, head.Content(notation.FirstRow).Length);
        times = new List<double>(expected);
        values = new List<double>(expected);
    }

    public Outcome<RecordTable> Read()
    {
        Span<int> starts = stackalloc int[MostCells];
        Span<int> ends = stackalloc int[MostCells];
        while (start < bytes.Span.Length)
        {
            var row = bytes.LineAt(start, out var next);
            if (!row.Trim(" \t"u8).IsEmpty && row[0] is not ((byte)'#' or (byte)'%')
                && Take(row, starts[..needed], ends[..needed], next) is { } fault)
            {
                return new(null, [fault]);
            }

            (start, line) = (next, line + 1);
        }

        if (times.Count < 2)
        {
            return new(null, [bytes.Fault(line, [], "the record has fewer than two samples", null)]);
        }

        var leftOut = missing.Count == 0 ? null
            : $"{missing.Count} row{(missing.Count == 1 ? "" : "s")} without a value left out, the first in "
                + $"line {missing.FirstLine}";
        var isPaired = repeats.IsPaired && 2 * repeats.Count == times.Count && channel.Second < 0;
        return new(new RecordTable([.. times], [.. values], channel.Second < 0 ? null : [.. halves], rows,
            repeats.FirstLine, repeats.Count, isPaired, leftOut, cutOff), []);
    }

    private Diagnostic? Take(ReadOnlySpan<byte> row, Span<int> starts, Span<int> ends, int next)
    {
        var count = notation.Split(row, starts, ends);
        if (count < needed)
        {
            if (next == bytes.Span.Length && bytes.Span[^1] is not ((byte)'\n' or (byte)'\r'))
            {
                cutOff = $"the last line, {line}, is cut off and left out";
                return null;
            }

            return bytes.Fault(line, row, $"this line has {count} cell{(count == 1 ? "" : "s")}, the others "
                + $"have {notation.Columns}", "complete the row or delete it");
        }

        rows++;
        var time = (double)(rows - 1);
        if (!ReadCell(row, starts, ends, channel.Value, out var value, out var fault)
            || (channel.Time >= 0 && !ReadCell(row, starts, ends, channel.Time, out time, out fault)))
        {
            return fault;
        }

        var second = value;
        if (channel.Second >= 0 && !ReadCell(row, starts, ends, channel.Second, out second, out fault))
        {
            return fault;
        }

        if (channel.Time >= 0)
        {
            time *= timeScale;
        }

        if (double.IsNaN(time) || double.IsNaN(value) || double.IsNaN(second))
        {
            missing = (missing.Count + 1, missing.Count == 0 ? line : missing.FirstLine);
            return null;
        }

        return Add(row, time, value * valueScale, second * valueScale);
    }

    private Diagnostic? Add(ReadOnlySpan<byte> row, double time, double value, double second)
    {
        if (times.Count > 0 && time < times[^1])
        {
            return bytes.Fault(line, row, "the time goes back in this line, from "
                + $"{EngineeringNumber.Format(times[^1], "s")} to {EngineeringNumber.Format(time, "s")}",
                "sort the rows, or give each sweep as a record of its own");
        }

        var isRepeat = times.Count > 0 && time == times[^1];
        if (isRepeat)
        {
            repeats.FirstLine = repeats.Count == 0 ? line : repeats.FirstLine;
            repeats.Count++;
        }

        repeats.IsPaired &= isRepeat == (times.Count % 2 == 1);
        times.Add(time);
        values.Add(channel.Second < 0 ? value : 0.5 * (value + second));
        if (channel.Second >= 0)
        {
            halves.Add(0.5 * Math.Abs(second - value));
        }

        return null;
    }

    private bool ReadCell(
        ReadOnlySpan<byte> row, Span<int> starts, Span<int> ends, int column, out double value,
        out Diagnostic? fault)
    {
        fault = null;
        var cell = row[starts[column]..ends[column]];
        var kind = RecordNumber.Read(cell, notation.Mark, out value);
        if (kind == CellKind.Text)
        {
            var text = bytes.Text(RecordNumber.Trimmed(cell));
            fault = bytes.Fault(line, row, $"`{text}` is no number",
                "correct the line or delete it; a missing value is left empty or written NaN", text);
            return false;
        }

        value = kind == CellKind.Number ? value : double.NaN;
        return true;
    }
}
