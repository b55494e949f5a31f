using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>How one cause, or a sum of causes, moves a network over a segment: the state at the segment's
/// start, block by block, and what drives it.</summary>
/// <param name="State">ζ for each block at the segment's start.</param>
/// <param name="Forcings">The sources' parts that are on.</param>
internal sealed record Motion(DoubleDoubleComplex[][] State, ImmutableArray<Forcing> Forcings)
{
    /// <summary>The sum of motions.</summary>
    public static Motion Sum(IReadOnlyList<Motion> motions)
    {
        var state = new DoubleDoubleComplex[motions[0].State.Length][];
        for (var b = 0; b < state.Length; b++)
        {
            state[b] = new DoubleDoubleComplex[motions[0].State[b].Length];
            foreach (var motion in motions)
            {
                for (var i = 0; i < state[b].Length; i++)
                {
                    state[b][i] += motion.State[b][i];
                }
            }
        }

        return new Motion(state, [.. motions.SelectMany(m => m.Forcings)]);
    }
}
