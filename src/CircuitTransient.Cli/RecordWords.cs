namespace CircuitTransient.Cli;

/// <summary>Words that may be meant for one record: <c>loaded.csv: voltage of x</c>; without a record's name
/// before a colon they are meant for all.</summary>
/// <param name="values">What was said, as often as it was.</param>
internal sealed class RecordWords(IReadOnlyList<string> values)
{
    /// <summary>What was said for a record, in the order said.</summary>
    public IReadOnlyList<string> For(string record, IReadOnlyList<string> records)
    {
        var found = new List<string>();
        foreach (var value in values)
        {
            var (name, rest) = Split(value, records);
            if (name is null || name == record)
            {
                found.Add(rest);
            }
        }

        return found;
    }

    /// <summary>The one thing said for a record, what names it before what does not; null for
    /// nothing.</summary>
    public string? OneFor(string record, IReadOnlyList<string> records)
    {
        var own = values.Select(v => Split(v, records)).Where(s => s.Name == record).ToArray();
        var general = values.Select(v => Split(v, records)).Where(s => s.Name is null).ToArray();
        return own.Length > 0 ? own[^1].Said : general.Length > 0 ? general[^1].Said : null;
    }

    private static (string? Name, string Said) Split(string value, IReadOnlyList<string> records)
    {
        for (var colon = value.IndexOf(':', StringComparison.Ordinal); colon >= 0;
            colon = value.IndexOf(':', colon + 1))
        {
            var before = value[..colon].Trim();
            var named = records.FirstOrDefault(r => r == before || Path.GetFileName(r) == before
                || Path.GetFileNameWithoutExtension(r) == before);
            if (named is not null)
            {
                return (named, value[(colon + 1)..].Trim());
            }
        }

        return (null, value);
    }
}
