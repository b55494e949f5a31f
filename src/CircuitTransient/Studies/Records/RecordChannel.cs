using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>Which columns of a record are read.</summary>
/// <param name="Time">Index of the time's column; −1 where there is none.</param>
/// <param name="Value">Index of the channel's column.</param>
/// <param name="Second">Index of the column of the pair's other value; −1 where there is none.</param>
/// <param name="Title">The channel's title.</param>
/// <param name="All">The titles of all channels.</param>
/// <param name="Remark">What was chosen where the user did not say; null where nothing was to be
/// chosen.</param>
internal sealed record RecordChannel(
    int Time, int Value, int Second, string Title, ImmutableArray<string> All, string? Remark)
{
    private static readonly (string Low, string High)[] PairWords =
        [("minimum", "maximum"), ("min", "max"), ("lower", "upper"), ("low", "high")];

    /// <summary>Chooses the columns.</summary>
    /// <param name="head">The record's first lines.</param>
    /// <param name="notation">How its rows are written.</param>
    /// <param name="columns">Titles and units.</param>
    /// <param name="time">Index of the time's column; −1 where there is none.</param>
    /// <param name="asked">Title or number of the channel asked for.</param>
    public static Outcome<RecordChannel> Choose(
        RecordHead head, RecordNotation notation, RecordColumns columns, int time, string? asked)
    {
        var channels = new List<(string Title, int Column, int Second)>();
        for (var c = 0; c < notation.Columns; c++)
        {
            var isValue = c != time && !columns.IsCount(c) && !columns.IsTime(c);
            if (!isValue || channels.Exists(known => known.Second == c))
            {
                continue;
            }

            var second = OtherOfPair(columns, c, out var stem);
            channels.Add((second < 0 ? columns.Titles[c] : stem, c, second));
        }

        if (channels.Count == 0)
        {
            return new(null, [head.Fault(notation.FirstRow, "there is no column of values in this record",
                "give a table with a time and a value in each line")]);
        }

        var titles = channels.Select(c => c.Title).ToImmutableArray();
        var chosen = asked is null ? 0 : titles.IndexOf(asked);
        if (chosen < 0 && int.TryParse(asked, out var number) && number >= 1 && number <= channels.Count)
        {
            chosen = number - 1;
        }

        if (chosen < 0)
        {
            return new(null, [Unknown(head, notation, asked!, titles)]);
        }

        var remark = asked is not null || channels.Count == 1 ? null
            : $"{channels.Count} channels; the first, `{titles[0]}`, is read, another with "
                + $"`--channel \"{titles[1]}\"`";
        var (title, value, other) = channels[chosen];
        return new(new RecordChannel(time, value, other, title, titles, remark), []);
    }

    private static Diagnostic Unknown(
        RecordHead head, RecordNotation notation, string asked, ImmutableArray<string> titles)
    {
        var nearest = NearestName.Find(asked, titles);
        return head.Fault(Math.Max(0, notation.FirstRow - 1), $"there is no channel `{asked}` in this record",
            nearest is not null ? $"did you mean `{nearest}`?"
                : $"there are {string.Join(", ", titles.Take(12).Select(t => $"`{t}`"))}");
    }

    /// <summary>The column that holds the greatest values where this one holds the least.</summary>
    private static int OtherOfPair(RecordColumns columns, int column, out string stem)
    {
        stem = columns.Titles[column];
        if (!columns.HasTitles)
        {
            return -1;
        }

        foreach (var (low, high) in PairWords)
        {
            var mine = Without(columns.Titles[column], low) ?? Without(columns.Titles[column], high);
            if (mine is null)
            {
                continue;
            }

            for (var c = column + 1; c < columns.Titles.Length; c++)
            {
                var other = Without(columns.Titles[c], high) ?? Without(columns.Titles[c], low);
                if (string.Equals(other, mine, StringComparison.OrdinalIgnoreCase))
                {
                    stem = mine.Length > 0 ? mine : columns.Titles[column];
                    return c;
                }
            }
        }

        return -1;
    }

    private static string? Without(string title, string word)
    {
        var place = title.IndexOf(word, StringComparison.OrdinalIgnoreCase);
        return place < 0 ? null : title.Remove(place, word.Length).Trim(' ', '_', '-', '.', '/');
    }
}
