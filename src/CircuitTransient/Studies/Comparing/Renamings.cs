using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Finds what bears another name in the second document and has the same figures to
/// rounding.</summary>
internal static class Renamings
{
    /// <summary>Observations of one unit whose extremes and limits agree.</summary>
    public static (NamedPairs<DocumentObservation> Left, ImmutableArray<Renaming> Found) Find(
        NamedPairs<DocumentObservation> pairs) =>
        pairs.Renamed("observation", o => o.Name, (a, b) =>
            a.Unit == b.Unit && a.Magnitude > 0
            && Agree(
                a.Magnitude, (a.Max.Value, b.Max.Value), (a.Min.Value, b.Min.Value), (a.Final, b.Final)));

    /// <summary>Parts of one kind whose stresses agree.</summary>
    public static (NamedPairs<DocumentPart> Left, ImmutableArray<Renaming> Found) Find(
        NamedPairs<DocumentPart> pairs) =>
        pairs.Renamed("part", p => p.Name, (a, b) =>
            a.Kind == b.Kind && a.Stresses.Any(stress => stress.Value is { } value && value != 0)
            && a.Stresses.Zip(b.Stresses).All(s =>
                Agree(Math.Abs(s.First.Value ?? 0), (s.First.Value, s.Second.Value))));

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
