using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>How the rows of a record are written, and where they begin.</summary>
/// <param name="Delimiter">What parts the columns; 0 where there is one column.</param>
/// <param name="Mark">The decimal mark.</param>
/// <param name="Columns">Cells in a row.</param>
/// <param name="FirstRow">Index among the head's lines of the first row.</param>
internal sealed record RecordNotation(char Delimiter, char Mark, int Columns, int FirstRow)
{
    private const int Enough = 40; // rows by which a notation is judged

    private static readonly (char Delimiter, char Mark)[] Notations =
    [
        ('\t', '.'), ('\t', ','), (';', '.'), (';', ','), (',', '.'), (' ', '.'), (' ', ','), ('\0', '.'),
        ('\0', ','),
    ];

    /// <summary>The delimiter in words.</summary>
    public string DelimiterWord => Delimiter switch
    {
        '\t' => "tabs",
        ';' => "semicolons",
        ',' => "commas",
        _ => "blanks",
    };

    /// <summary>Finds the notation in which the most lines of the head are rows of numbers.</summary>
    public static Outcome<RecordNotation> Of(RecordHead head, char? mark)
    {
        RecordNotation? best = null;
        var length = 0;
        foreach (var (delimiter, decimals) in Notations)
        {
            if (mark is not null && decimals != mark)
            {
                continue;
            }

            var (notation, rows) = LongestRun(head, delimiter, decimals);
            if (rows > length || (rows == length && rows > 0 && notation.Columns > best!.Columns))
            {
                (best, length) = (notation, rows);
            }
        }

        if (best is null)
        {
            return new(null, [head.Fault(0, "no line of this record is a row of numbers",
                "give a table with a time and a value in each line")]);
        }

        return mark is null && IsAmbiguous(head, best)
            ? new(null, [head.Fault(best.FirstRow,
                "a comma here may part two columns or mark the decimals",
                "say which: `--decimal comma`, or `--decimal point` where commas part the columns")])
            : new(best, []);
    }

    /// <summary>The cells of a line.</summary>
    /// <param name="line">The line.</param>
    /// <param name="ends">Receives where each cell ends, as far as there is room.</param>
    /// <param name="starts">Receives where each cell begins.</param>
    /// <returns>How many cells there are.</returns>
    public int Split(ReadOnlySpan<byte> line, Span<int> starts, Span<int> ends)
    {
        var (count, place) = (0, 0);
        if (Delimiter == ' ')
        {
            return SplitAtBlanks(line, starts, ends);
        }

        while (true)
        {
            var length = Delimiter == '\0' ? -1 : line[place..].IndexOf((byte)Delimiter);
            var end = length < 0 ? line.Length : place + length;
            if (count < starts.Length)
            {
                (starts[count], ends[count]) = (place, end);
            }

            count++;
            if (length < 0)
            {
                return count;
            }

            place = end + 1;
        }
    }

    private static int SplitAtBlanks(ReadOnlySpan<byte> line, Span<int> starts, Span<int> ends)
    {
        var (count, place) = (0, 0);
        while (true)
        {
            var skip = line[place..].IndexOfAnyExcept((byte)' ', (byte)'\t');
            if (skip < 0)
            {
                return count;
            }

            var start = place + skip;
            var length = line[start..].IndexOfAny((byte)' ', (byte)'\t');
            var end = length < 0 ? line.Length : start + length;
            if (count < starts.Length)
            {
                (starts[count], ends[count]) = (start, end);
            }

            (count, place) = (count + 1, end);
        }
    }

    private static (RecordNotation Notation, int Rows) LongestRun(
        RecordHead head, char delimiter, char mark)
    {
        var notation = new RecordNotation(delimiter, mark, 0, 0);
        var (best, length) = (notation, 0);
        var (columns, first) = (0, 0);
        for (var i = 0; i <= head.Lines.Count; i++)
        {
            var cells = i < head.Lines.Count ? notation.CellsOfRow(head.Content(i)) : 0;
            if (cells != columns)
            {
                if (columns > 0 && i - first > length)
                {
                    (best, length) = (notation with { Columns = columns, FirstRow = first }, i - first);
                }

                (columns, first) = (cells, i);
            }

            if (columns > 0 && i - first >= Enough && i - first > length)
            {
                return (notation with { Columns = columns, FirstRow = first }, Enough);
            }
        }

        return (best, Math.Min(length, Enough));
    }

    /// <summary>How many cells a row of numbers has; 0 where the line is none.</summary>
    private int CellsOfRow(ReadOnlySpan<byte> line)
    {
        const int most = 256;
        Span<int> starts = stackalloc int[most];
        Span<int> ends = stackalloc int[most];
        var count = Split(line, starts, ends);
        if (count > most)
        {
            return 0;
        }

        var numbers = 0;
        for (var c = 0; c < count; c++)
        {
            var kind = RecordNumber.Read(line[starts[c]..ends[c]], Mark, out _);
            if (kind == CellKind.Text)
            {
                return 0;
            }

            numbers += kind == CellKind.Number ? 1 : 0;
        }

        return numbers > 0 ? count : 0;
    }

    /// <summary>Whether commas part whole numbers only, so that they may mark decimals as well, and no line
    /// of titles with as many cells tells.</summary>
    private static bool IsAmbiguous(RecordHead head, RecordNotation notation)
    {
        if (notation.Delimiter != ',')
        {
            return false;
        }

        var last = Math.Min(head.Lines.Count, notation.FirstRow + Enough);
        for (var i = notation.FirstRow; i < last; i++)
        {
            if (head.Content(i).IndexOfAny(".eE"u8) >= 0)
            {
                return false;
            }
        }

        return notation.FirstRow == 0
            || head.Content(notation.FirstRow - 1).Count((byte)',') != notation.Columns - 1;
    }
}
