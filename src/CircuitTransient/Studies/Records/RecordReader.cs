using System.Security.Cryptography;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>Reads oscilloscope records: tables of text whose form is found out from themselves.</summary>
public static class RecordReader
{
    /// <summary>The largest file read, in bytes (512 MiB).</summary>
    public const int LargestFile = 512 * 1024 * 1024;

    /// <summary>Reads a channel of a record.</summary>
    /// <param name="name">The file's name as the user gave it.</param>
    /// <param name="bytes">Its content.</param>
    /// <param name="options">What the user says of it.</param>
    /// <returns>The record, or why it cannot be read, with the line.</returns>
    public static Outcome<OscilloscopeRecord> Read(
        string name, ReadOnlyMemory<byte> bytes, RecordOptions options)
    {
        var read = RecordBytes.Of(name, bytes);
        if (!read.Succeeded)
        {
            return new(null, read.Diagnostics);
        }

        var head = new RecordHead(read.Value);
        if (head.Lines.Count == 0)
        {
            return new(null, [head.Fault(0, "this record is empty", null)]);
        }

        var remarks = new List<string>();
        AddIf(remarks, read.Value.Remark);
        return RecordNotation.Of(head, options.Mark).Then(notation =>
        {
            var columns = RecordColumns.Of(head, notation);
            var above = Math.Max(0, notation.FirstRow - columns.Lines);
            var stated = RecordInterval.Find(head, above);
            columns = columns.WithUnit(RecordInterval.FindUnit(head, above));
            return TimeColumn.Find(head, notation, columns, options.Interval ?? stated).Then(time =>
                RecordChannel.Choose(head, notation, columns, time.Column, options.Channel).Then(channel =>
                {
                    Describe(remarks, notation, columns, time, options, channel);
                    AddIf(remarks, above switch
                    {
                        0 => null,
                        1 => "one line above the table is looked at for interval and unit only",
                        _ => $"{above} lines above the table are looked at for interval and unit only",
                    });
                    var table = new RecordRows(read.Value, head, notation, columns, channel).Read();
                    return table.Then(rows => Finish(
                        name, bytes, columns, channel, time, rows, remarks));
                }));
        });
    }

    private static Outcome<OscilloscopeRecord> Finish(
        string name, ReadOnlyMemory<byte> bytes, RecordColumns columns, RecordChannel channel,
        TimeColumn time, RecordTable rows, List<string> remarks)
    {
        AddIf(remarks, rows.LeftOut);
        AddIf(remarks, rows.CutOff);
        var (times, values, halves) = (rows.Times, rows.Values, rows.HalfWidths);
        if (channel.Time < 0)
        {
            var interval = time.Interval!.Value;
            times = Array.ConvertAll(times, row => row * interval);
        }
        else if (rows.IsPaired)
        {
            (times, values, halves) = RecordInstants.Pair(times, values);
            remarks.Add("two values at each instant: the middle of each pair is compared");
        }
        else if (rows.FirstRepeat > 0)
        {
            AddIf(remarks, RecordInstants.Spread(times, rows));
        }

        if (channel.Second >= 0)
        {
            remarks.Add($"`{columns.Titles[channel.Value]}` and `{columns.Titles[channel.Second]}` are a "
                + "pair: the middle of the two is compared");
        }

        var unit = columns.Units[channel.Value] is { } read ? Unit.SymbolOf(read.Dimension) : null;
        var sha = Convert.ToHexStringLower(SHA256.HashData(bytes.Span));
        return new(new OscilloscopeRecord(
            name, sha, columns.HasTitles ? channel.Title : "", channel.All, unit, times, values, halves,
            rows.RowCount, [.. remarks]), []);
    }

    private static void Describe(
        List<string> remarks, RecordNotation notation, RecordColumns columns, TimeColumn time,
        RecordOptions options, RecordChannel channel)
    {
        var parted = notation.Columns == 1 ? "one column" : $"{notation.Columns} columns parted by "
            + notation.DelimiterWord;
        remarks.Add(notation.Mark == ',' ? $"{parted}, decimal commas" : parted);
        if (!columns.HasTitles)
        {
            remarks.Add("no titles");
        }

        AddIf(remarks, time.Remark(options.Interval is not null));
        AddIf(remarks, channel.Remark);
    }

    private static void AddIf(List<string> remarks, string? remark)
    {
        if (remark is not null)
        {
            remarks.Add(remark);
        }
    }
}
