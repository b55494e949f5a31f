using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Items of two documents paired by their names; of several with one name, the first with the
/// first.</summary>
/// <param name="Pairs">In both.</param>
/// <param name="Gone">Only before.</param>
/// <param name="New">Only after.</param>
public sealed record NamedPairs<T>(
    ImmutableArray<(T Before, T After)> Pairs, ImmutableArray<T> Gone, ImmutableArray<T> New)
{
    /// <summary>Pairs two lists.</summary>
    public static NamedPairs<T> Of(IEnumerable<T> before, IEnumerable<T> after, Func<T, string> name)
    {
        var waiting = new Dictionary<string, Queue<T>>(StringComparer.Ordinal);
        var unpaired = after.ToList();
        foreach (var item in unpaired)
        {
            if (!waiting.TryGetValue(name(item), out var queue))
            {
                waiting[name(item)] = queue = new();
            }

            queue.Enqueue(item);
        }

        var pairs = ImmutableArray.CreateBuilder<(T, T)>();
        var gone = ImmutableArray.CreateBuilder<T>();
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
        return new NamedPairs<T>(pairs.ToImmutable(), gone.ToImmutable(), [.. fresh]);
    }

    /// <summary>Pairs what is left by a second rule.</summary>
    /// <returns>The pairs of both rules, and what neither pairs.</returns>
    public NamedPairs<T> ThenBy(Func<T, string> name)
    {
        var more = Of(Gone, New, name);
        return new NamedPairs<T>([.. Pairs, .. more.Pairs], more.Gone, more.New);
    }

    /// <summary>What is left, by names.</summary>
    public NameChange Left(string kind, Func<T, string> name) =>
        new(kind, [.. Gone.Select(name)], [.. New.Select(name)]);
}
