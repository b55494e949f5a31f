using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>Where a record's instants come from.</summary>
/// <param name="Column">Index of the time's column; −1 where instants are counted.</param>
/// <param name="Interval">The sample interval, in seconds, where they are.</param>
/// <param name="IsGuessed">Whether the column is taken for the time because it rises.</param>
internal sealed record TimeColumn(int Column, double? Interval, bool IsGuessed)
{
    private const int RowsLookedAt = 50;

    /// <summary>Finds the time's column, or that there is none.</summary>
    public static Outcome<TimeColumn> Find(
        RecordHead head, RecordNotation notation, RecordColumns columns, double? interval)
    {
        for (var c = 0; c < notation.Columns; c++)
        {
            if (columns.IsTime(c))
            {
                return new(new TimeColumn(c, null, false), []);
            }
        }

        var counts = notation.Columns > 1 && (columns.IsCount(0) || IsCount(head, notation));
        if (notation.Columns > 1 && (!counts || interval is null) && Rises(head, notation))
        {
            return new(new TimeColumn(0, null, true), []);
        }

        return interval is not null
            ? new(new TimeColumn(-1, interval, false), [])
            : new(null, [head.Fault(notation.FirstRow,
                notation.Columns == 1
                    ? "the record has one column and states no sample interval"
                    : "no column of the record is a time, and it states no sample interval",
                "say it: `--interval \"1 ns\"`")]);
    }

    /// <summary>What is to be said of it.</summary>
    public string? Remark(bool isGiven) =>
        Interval is { } interval
            ? $"no time column: one sample each {EngineeringNumber.Format(interval, "s")}, as "
                + (isGiven ? "given" : "the record states")
        : IsGuessed ? "no column is titled as a time: the first, which rises, is taken as seconds"
        : null;

    private static bool Rises(RecordHead head, RecordNotation notation) =>
        Steps(head, notation, (before, now) => now >= before);

    private static bool IsCount(RecordHead head, RecordNotation notation) =>
        Steps(head, notation, (before, now) => now == before + 1);

    private static bool Steps(RecordHead head, RecordNotation notation, Func<double, double, bool> isStep)
    {
        Span<int> starts = stackalloc int[1];
        Span<int> ends = stackalloc int[1];
        var before = double.NaN;
        var last = Math.Min(head.Lines.Count, notation.FirstRow + RowsLookedAt);
        for (var i = notation.FirstRow; i < last; i++)
        {
            var line = head.Content(i);
            notation.Split(line, starts, ends);
            if (RecordNumber.Read(line[starts[0]..ends[0]], notation.Mark, out var now) != CellKind.Number)
            {
                return false;
            }

            if (!double.IsNaN(before) && !isStep(before, now))
            {
                return false;
            }

            before = now;
        }

        return true;
    }
}
