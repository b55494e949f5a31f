using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Finds what bears another name in the second document and has the same figures to
/// rounding.</summary>
internal static class Renamings
{
    /// <summary>Observations of one unit whose extremes and limits agree.</summary>
    public static (NamedPairs<DocumentObservation> Left, ImmutableArray<Renaming> Found) Find(
        NamedPairs<DocumentObservation> pairs) =>
        Find(pairs, "observation", o => o.Name, (a, b) =>
            a.Unit == b.Unit && a.Magnitude > 0
            && Agree(
                a.Magnitude, (a.Max.Value, b.Max.Value), (a.Min.Value, b.Min.Value), (a.Final, b.Final)));

    /// <summary>Parts of one kind whose stresses agree.</summary>
    public static (NamedPairs<DocumentPart> Left, ImmutableArray<Renaming> Found) Find(
        NamedPairs<DocumentPart> pairs) =>
        Find(pairs, "part", p => p.Name, (a, b) =>
            a.Kind == b.Kind && a.Stresses.Any(stress => stress.Value is { } value && value != 0)
            && a.Stresses.Zip(b.Stresses).All(s =>
                Agree(Math.Abs(s.First.Value ?? 0), (s.First.Value, s.Second.Value))));

    // One that could be several others is none of them.
    private static (NamedPairs<T> Left, ImmutableArray<Renaming> Found) Find<T>(
        NamedPairs<T> pairs, string kind, Func<T, string> name, Func<T, T, bool> agree)
    {
        var found = ImmutableArray.CreateBuilder<Renaming>();
        var (gone, fresh) = (pairs.Gone.ToList(), pairs.New.ToList());
        foreach (var old in pairs.Gone)
        {
            var alike = pairs.New.Where(item => agree(old, item)).ToArray();
            if (alike is [var single] && pairs.Gone.Count(item => agree(item, single)) == 1)
            {
                found.Add(new Renaming(kind, name(old), name(single)));
                gone.Remove(old);
                fresh.Remove(single);
            }
        }

        return (pairs with { Gone = [.. gone], New = [.. fresh] }, found.ToImmutable());
    }

    private static bool Agree(double size, params ReadOnlySpan<(double? Before, double? After)> values)
    {
        foreach (var (before, after) in values)
        {
            if (before.HasValue != after.HasValue
                || Math.Abs((after ?? 0) - (before ?? 0)) > DocumentComparison.Rounding * size)
            {
                return false;
            }
        }

        return true;
    }
}
