using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>The titles and units of a record's columns.</summary>
/// <param name="Titles">One for each column; <c>column 2</c> where the file has none.</param>
/// <param name="Units">One for each column; null where the file says none.</param>
/// <param name="Lines">How many lines above the rows hold them.</param>
/// <param name="HasTitles">Whether the file gives titles.</param>
internal sealed record RecordColumns(
    ImmutableArray<string> Titles, ImmutableArray<Unit?> Units, int Lines, bool HasTitles)
{
    private static readonly string[] WordsForTime = ["time", "t", "seconds", "zeit", "temps", "tempo"];

    private static readonly string[] WordsForCounts =
        ["index", "sample", "samples", "n", "no", "no.", "point", ""];

    /// <summary>Reads the lines just above the first row.</summary>
    public static RecordColumns Of(RecordHead head, RecordNotation notation)
    {
        var above = notation.FirstRow - 1;
        var last = above >= 0 ? Cells(head, above, notation) : null;
        if (last is null)
        {
            return new RecordColumns(Numbered(notation), [.. new Unit?[notation.Columns]], 0, false);
        }

        if (Array.TrueForAll(last, c => c.Trim('#', '%', ' ').Length == 0 || RecordUnit.Read(c) is not null)
            && Array.Exists(last, c => RecordUnit.Read(c) is not null))
        {
            var titles = above > 0 ? Cells(head, above - 1, notation) : null;
            return new RecordColumns(
                titles is null ? Numbered(notation) : [.. titles.Select(t => RecordUnit.Split(t).Title)],
                [.. last.Select(RecordUnit.Read)], titles is null ? 1 : 2, titles is not null);
        }

        var split = Array.ConvertAll(last, RecordUnit.Split);
        return new RecordColumns([.. split.Select(s => s.Title)], [.. split.Select(s => s.Unit)], 1, true);
    }

    /// <summary>The same with a unit for every column that has none and is no time; where it is null, as they
    /// are.</summary>
    public RecordColumns WithUnit(Unit? unit) => this with
    {
        Units = [.. Units.Select((own, c) => own ?? (IsTime(c) || IsCount(c) ? null : unit))],
    };

    /// <summary>Whether a column is titled as the time.</summary>
    public bool IsTime(int column) => Units[column] is { } unit
        ? unit.Dimension == Dimension.Time
        : HasTitles && (WordsForTime.Contains(Titles[column].ToLowerInvariant(), StringComparer.Ordinal)
            || Titles[column].StartsWith("time", StringComparison.OrdinalIgnoreCase));

    /// <summary>Whether a column is titled as the count of samples.</summary>
    public bool IsCount(int column) => HasTitles && Units[column] is null
        && WordsForCounts.Contains(Titles[column].Trim('#', '%', ' ').ToLowerInvariant(),
            StringComparer.Ordinal);

    private static string[]? Cells(RecordHead head, int line, RecordNotation notation)
    {
        var text = head.Text(line);
        var cells = notation.Delimiter switch
        {
            '\0' => text.AsSpan().ContainsAny(",;:=") ? [] : [text], // else it states something
            // A blank before a unit in brackets parts no columns.
            ' ' => text.TrimStart('#', '%').Replace(" (", "(").Replace(" [", "[")
                .Split([' ', '\t'], StringSplitOptions.RemoveEmptyEntries),
            _ => text.Split(notation.Delimiter),
        };
        return cells.Length == notation.Columns && Array.Exists(cells, c => c.Any(char.IsLetter))
            ? cells
            : null;
    }

    private static ImmutableArray<string> Numbered(RecordNotation notation) =>
        [.. Enumerable.Range(1, notation.Columns).Select(c => $"column {c}")];
}
