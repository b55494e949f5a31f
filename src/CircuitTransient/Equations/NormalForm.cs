using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>The equations of one interval solved for their state: z′ = A z + B u, z(0⁺) = B x₀, every unknown
/// a linear function of z, the inputs and their derivatives.</summary>
/// <param name="A">Square, one row for each state variable, 1/s.</param>
/// <param name="B">One column for each input: a source's drives z′, a stored quantity's sets z(0⁺).</param>
/// <param name="Unknowns">In the order of <see cref="NetworkLayout"/>.</param>
public sealed record NormalForm(
    NetworkLayout Layout, DoubleDoubleMatrix A, DoubleDoubleMatrix B, LinearOutput[] Unknowns)
{
    /// <summary>The number of state variables.</summary>
    public int Order => A.Rows;
}

/// <summary>Why an interval's equations have no unique solution.</summary>
/// <param name="Sets">Each a smallest set of written equations whose sum says nothing or a contradiction, as
/// rows of <see cref="NetworkEquations"/>: nodes first, then parts.</param>
/// <param name="Contradicts">Whether they contradict each other; else they say the same twice, and something
/// that matters is left open.</param>
public sealed record SingularEquations(ImmutableArray<int[]> Sets, bool Contradicts);
