using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>How the rows of a record are written, and where they begin.</summary>
/// <param name="Delimiter">What parts the columns; 0 where there is one column.</param>
/// <param name="Mark">The decimal mark.</param>
/// <param name="Columns">Cells in a row.</param>
/// <param name="FirstRow">Index among the head's lines of the first row.</param>
internal sealed record RecordNotation(char Delimiter, char Mark, int Columns, int FirstRow)
{
    private const int Enough = 40; // rows by which commas are judged
    private const int FewestAbove = 3; // numbers above a line of titles that are no rows yet
    private const int MostCells = 256;

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
        var most = 0;
        foreach (var (delimiter, decimals) in Notations)
        {
            if (mark is not null && decimals != mark)
            {
                continue;
            }

            var (notation, rows) = MostRows(head, new RecordNotation(delimiter, decimals, 0, 0));
            if (rows > most || (rows == most && rows > 0 && notation.Columns > best!.Columns))
            {
                (best, most) = (notation, rows);
            }
        }

        if (best is null)
        {
            return new(null, [head.Fault(0, "no line of this record is a row of numbers",
                "give a table with a time and a value in each line")]);
        }

        best = best.Columns == 1 ? best with { Delimiter = '\0' } : best;
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

    /// <summary>The count of cells that the most rows of numbers have, and the first of those rows.</summary>
    private static (RecordNotation Notation, int Rows) MostRows(RecordHead head, RecordNotation notation)
    {
        var cells = Enumerable.Range(0, head.Lines.Count)
            .Select(i => notation.CellsOfRow(head.Content(i))).ToArray();
        var usual = cells.Where(c => c > 0).GroupBy(c => c)
            .OrderByDescending(g => g.Count()).ThenByDescending(g => g.Key).FirstOrDefault();
        if (usual is null)
        {
            return (notation, 0);
        }

        var first = Array.IndexOf(cells, usual.Key);
        for (var (i, above) = (first, 0); i < cells.Length && above <= FewestAbove; i++)
        {
            above += cells[i] == usual.Key ? 1 : 0;
            var next = Array.IndexOf(cells, usual.Key, i);

            // A line of titles that stands below a few numbers tells that those are not rows yet.
            if (cells[i] == 0 && next > i && notation.IsOfTitles(head.Content(i), usual.Key))
            {
                first = next;
            }
        }

        return (notation with { Columns = usual.Key, FirstRow = first }, usual.Count());
    }

    /// <summary>Whether a line has a text in each of so many cells.</summary>
    private bool IsOfTitles(ReadOnlySpan<byte> line, int columns)
    {
        Span<int> starts = stackalloc int[MostCells];
        Span<int> ends = stackalloc int[MostCells];
        if (Split(line, starts, ends) != columns)
        {
            return false;
        }

        for (var c = 0; c < columns; c++)
        {
            if (RecordNumber.Read(line[starts[c]..ends[c]], Mark, out _) != CellKind.Text)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>How many cells a row of numbers has; 0 where the line is none.</summary>
    private int CellsOfRow(ReadOnlySpan<byte> line)
    {
        Span<int> starts = stackalloc int[MostCells];
        Span<int> ends = stackalloc int[MostCells];
        var count = Split(line, starts, ends);
        if (count > MostCells)
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
