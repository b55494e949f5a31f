using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Items of two documents paired by their names; of several with one name, the first with the
/// first.</summary>
/// <param name="Pairs">In both.</param>
/// <param name="Gone">Only before.</param>
/// <param name="New">Only after.</param>
public sealed record NamedPairs<TItem>(
    ImmutableArray<(TItem Before, TItem After)> Pairs, ImmutableArray<TItem> Gone, ImmutableArray<TItem> New)
{
    /// <summary>Pairs two lists.</summary>
    public static NamedPairs<TItem> Of(
        IEnumerable<TItem> before, IEnumerable<TItem> after, Func<TItem, string> name)
    {
        var waiting = new Dictionary<string, Queue<TItem>>(StringComparer.Ordinal);
        var unpaired = after.ToList();
        foreach (var item in unpaired)
        {
            if (!waiting.TryGetValue(name(item), out var queue))
            {
                waiting[name(item)] = queue = new();
            }

            queue.Enqueue(item);
        }

        var pairs = ImmutableArray.CreateBuilder<(TItem, TItem)>();
        var gone = ImmutableArray.CreateBuilder<TItem>();
        foreach (var item in before)
        {
            if (waiting.TryGetValue(name(item), out var queue) && queue.TryDequeue(out var partner))
            {
                pairs.Add((item, partner));
            }
            else
            {
                gone.Add(item);
            }
        }

        // What still waits under a name are the last ones of that name.
        var left = waiting.ToDictionary(w => w.Key, w => w.Value.Count, StringComparer.Ordinal);
        unpaired.Reverse();
        var fresh = unpaired.Where(item => left[name(item)]-- > 0).Reverse();
        return new NamedPairs<TItem>(pairs.ToImmutable(), gone.ToImmutable(), [.. fresh]);
    }

    /// <summary>Pairs what is left by a second rule.</summary>
    /// <returns>The pairs of both rules, and what neither pairs.</returns>
    public NamedPairs<TItem> ThenBy(Func<TItem, string> name)
    {
        var more = Of(Gone, New, name);
        return new NamedPairs<TItem>([.. Pairs, .. more.Pairs], more.Gone, more.New);
    }

    /// <summary>What is left, by names.</summary>
    public NameChange Left(string kind, Func<TItem, string> name) =>
        new(kind, [.. Gone.Select(name)], [.. New.Select(name)]);

    /// <summary>Finds what is left under another name.</summary>
    /// <param name="kind">Of what.</param>
    /// <param name="name">An item's name.</param>
    /// <param name="agree">Whether two items have the same figures; one that agrees with several is none of
    /// them.</param>
    internal (NamedPairs<TItem> Left, ImmutableArray<Renaming> Found) Renamed(
        string kind, Func<TItem, string> name, Func<TItem, TItem, bool> agree)
    {
        var found = ImmutableArray.CreateBuilder<Renaming>();
        var (gone, fresh) = (Gone.ToList(), New.ToList());
        foreach (var old in Gone)
        {
            var alike = New.Where(item => agree(old, item)).ToArray();
            if (alike is [var single] && Gone.Count(item => agree(item, single)) == 1)
            {
                found.Add(new Renaming(kind, name(old), name(single)));
                gone.Remove(old);
                fresh.Remove(single);
            }
        }

        return (this with { Gone = [.. gone], New = [.. fresh] }, found.ToImmutable());
    }
}
