using CircuitTransient.Numerics;
using CircuitTransient.Numerics.Sparse;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The equations of circuit and sources together, (sE + G) X = P q beside (s − S) W = w, solved for
/// given stored quantities and source states at one real s after another, in double-doubles.</summary>
internal sealed class SparsePencil
{
    private readonly DescriptorEquations equations;
    private readonly InputModel inputs;
    private readonly SparsePattern pattern;
    private readonly DoubleDouble[] g;
    private readonly DoubleDouble[] e;
    private readonly DoubleDouble[] values;
    private readonly double[] rounded;
    private readonly SparseLu<double> lu;

    /// <summary>The pencil of some equations.</summary>
    public SparsePencil(DescriptorEquations equations, InputModel inputs)
    {
        (this.equations, this.inputs) = (equations, inputs);
        MatrixElement[] constant = [.. AugmentedEquations.Constant(equations, inputs)];
        MatrixElement[] linear = [.. AugmentedEquations.Linear(equations, inputs)];
        pattern = SparsePattern.Of(
            equations.Unknowns.UnknownCount + inputs.StateCount,
            [.. constant.Concat(linear).Select(element => (element.Row, element.Column))]);
        (g, e) = (new DoubleDouble[pattern.Count], new DoubleDouble[pattern.Count]);
        for (var k = 0; k < constant.Length; k++)
        {
            g[pattern.Slots[k]] += constant[k].Value;
        }

        for (var k = 0; k < linear.Length; k++)
        {
            e[pattern.Slots[constant.Length + k]] += linear[k].Value;
        }

        (values, rounded) = (new DoubleDouble[pattern.Count], new double[pattern.Count]);
        lu = new SparseLu<double>(pattern);
    }

    /// <summary>X(s) and Q(s) = D Rᵀ X(s); null where the pencil is singular there, or nearly.</summary>
    public (DoubleDouble[] Unknowns, DoubleDouble[] Stored)? At(double s, ReadOnlySpan<DoubleDouble> states)
    {
        for (var p = 0; p < values.Length; p++)
        {
            values[p] = g[p] + (e[p] * s);
            rounded[p] = values[p].Hi;
        }

        var right = AugmentedEquations.RightSide(equations, inputs, states);
        return lu.Factorise(rounded) && SparseRefinement.Solve(lu, pattern, values, right) is { } x
            ? (x[..equations.Unknowns.UnknownCount], AugmentedEquations.StoredOf(equations, x))
            : null;
    }
}
