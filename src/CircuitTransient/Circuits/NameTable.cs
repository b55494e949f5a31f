using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>One name space: what is called how, and where it was named first.</summary>
/// <param name="noun">What the names name: <c>part</c>, <c>node</c>, <c>value</c>.</param>
internal sealed class NameTable<T>(string noun, Findings findings)
{
    private readonly Dictionary<string, Entry> entries = new(StringComparer.OrdinalIgnoreCase);
    private readonly List<string> names = [];
    private readonly string plural = noun.EndsWith('y') ? noun[..^1] + "ies" : noun + "s";

    public IReadOnlyList<string> Names => names;

    /// <summary>The same names, with what is not among them reported elsewhere.</summary>
    public NameTable<T> ReportingTo(Findings other)
    {
        var table = new NameTable<T>(noun, other);
        foreach (var name in names)
        {
            table.entries.Add(name, entries[name]);
            table.names.Add(name);
        }

        return table;
    }

    /// <summary>Gives a thing its name; a name that is taken, or differs from one only in case, is an
    /// error.</summary>
    public bool Declare(string name, TextSpan span, T item)
    {
        if (entries.TryGetValue(name, out var taken))
        {
            ReportTaken(name, span, taken);
            return false;
        }

        entries.Add(name, new Entry(name, span, item));
        names.Add(name);
        return true;
    }

    /// <summary>What has exactly that name.</summary>
    public bool TryGet(string name, out T item)
    {
        var isKnown = entries.TryGetValue(name, out var entry) && entry!.Name == name;
        item = isKnown ? entry!.Item : default!;
        return isKnown;
    }

    /// <summary>What has that name; letter case that differs is reported and the thing meant is
    /// returned.</summary>
    public bool TryGetAnyCase(string name, TextSpan span, out T item)
    {
        if (!entries.TryGetValue(name, out var entry))
        {
            item = default!;
            return false;
        }

        if (entry.Name != name)
        {
            ReportTaken(name, span, entry);
        }

        item = entry.Item;
        return true;
    }

    /// <summary>What has that name, or an error that offers the nearest known one.</summary>
    public bool Find(string name, TextSpan span, out T item, string? otherwise = null)
    {
        if (TryGet(name, out item))
        {
            return true;
        }

        var isMissedAlready = (findings.LacksNames && noun is ("part" or "node")) || findings.IsExcused(name);
        if (!isMissedAlready && findings.IsNew(span))
        {
            var nearest = NearestName.Find(name, names);
            findings.Error(span, $"there is no {noun} `{name}`",
                nearest is null ? otherwise ?? Known() : $"did you mean `{nearest}`?");
        }

        return false;
    }

    private string? Known() => names.Count is > 0 and <= 8
        ? $"the {plural} are {string.Join(", ", names.Select(n => $"`{n}`"))}"
        : null;

    private void ReportTaken(string name, TextSpan span, Entry taken)
    {
        var line = findings.LineOf(taken.Span);
        if (taken.Span == span)
        {
            findings.Error(span, $"the repetition makes a second {noun} named `{name}`",
                name.EndsWith(']') ? "let its index go with the counter"
                    : $"number them by the counter: `{name}[k]` where the block begins with `repeat … as k`");
        }
        else if (taken.Name == name)
        {
            findings.Error(span, $"there are two {plural} named `{name}`",
                $"the first stands in line {line}; give this one a name of its own");
        }
        else
        {
            findings.Error(span, $"the {plural} `{taken.Name}` and `{name}` differ only in case",
                $"line {line} has `{taken.Name}`; write both alike, or give one another name");
        }
    }

    private sealed record Entry(string Name, TextSpan Span, T Item);
}
