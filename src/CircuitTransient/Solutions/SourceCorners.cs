using System.Collections.Immutable;

namespace CircuitTransient.Solutions;

/// <summary>The instants at which a source's wave has a step or a corner.</summary>
internal static class SourceCorners
{
    /// <summary>The corners inside a stretch of time, with its ends.</summary>
    public static ImmutableArray<double> Between(ImmutableArray<Cause> causes, double from, double until)
    {
        var instants = new SortedSet<double> { from, until };
        foreach (var piece in causes.SelectMany(c => c.Pieces))
        {
            if (piece.Start > from && piece.Start < until)
            {
                instants.Add(piece.Start);
            }

            if (piece.End > from && piece.End < until)
            {
                instants.Add(piece.End);
            }
        }

        return [.. instants];
    }
}
