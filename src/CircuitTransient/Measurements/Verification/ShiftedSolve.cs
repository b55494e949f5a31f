using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The equations of circuit and sources together, solved once at a real shift s: with E = P D Rᵀ,
/// X = (sE + G)⁻¹ P and K = D Rᵀ X. By the resolvent identity K(z) = K (I + (z − s) K)⁻¹, so this one solve
/// holds the whole transform, whatever the index of the pencil.</summary>
/// <param name="Shift">s in 1/s, a power of two beyond every pole.</param>
/// <param name="Unknowns">Xᵀ: a row for each stored quantity and source state.</param>
/// <param name="Storage">Kᵀ, in the same scale.</param>
/// <param name="Scale">Exponent of two for each state: stored quantities are measured in the root of an
/// energy, and source states so that they do not dwarf the rest.</param>
internal sealed record ShiftedSolve(double Shift, SplitMatrix Unknowns, SplitMatrix Storage, int[] Scale)
{
    private const double LargestCoupling = 0.25; // of s K from a source state, so that s K − I stays small

    /// <summary>Solves at a shift; null where the pencil is singular.</summary>
    public static ShiftedSolve? At(DescriptorEquations equations, InputModel inputs, double shift)
    {
        var n = equations.Unknowns.UnknownCount;
        var m = equations.Storage.Count;
        var scale = new int[m + inputs.StateCount];
        foreach (var element in equations.Storage.Values)
        {
            if (element.Row == element.Column)
            {
                scale[element.Row] = Math.ILogB(element.Value.Hi) / 2;
            }
        }

        var system = new SplitMatrix(n + inputs.StateCount, n + inputs.StateCount + scale.Length);
        FillPencil(system, equations, inputs, shift);
        foreach (var row in equations.StorageRows)
        {
            system[row.Place, n + inputs.StateCount + row.Index] = Math.ScaleB(row.Sign, scale[row.Index]);
        }

        for (var state = 0; state < inputs.StateCount; state++)
        {
            system[n + state, n + inputs.StateCount + m + state] = 1;
        }

        if (SplitElimination.Solve(system, equilibrates: true) is not { } x)
        {
            return null;
        }

        var solve = new ShiftedSolve(shift, Transposed(x), StorageOf(x, equations, scale, n), scale);
        foreach (var group in inputs.Groups)
        {
            solve.ScaleDown(m + group.First, group.Oscillates ? 2 : 1);
            if (group.HasSlope)
            {
                solve.ScaleDown(m + group.First + (group.StateCount / 2), group.Oscillates ? 2 : 1);
            }
        }

        return solve;
    }

    /// <summary>X(s) and Q(s) for the quantities stored and the source states of one instant alone, which
    /// costs one right-hand side; null where the pencil is singular.</summary>
    public static (DoubleDouble[] Unknowns, DoubleDouble[] Stored)? Of(
        DescriptorEquations equations, InputModel inputs, double shift, ReadOnlySpan<DoubleDouble> states)
    {
        var n = equations.Unknowns.UnknownCount;
        var system = new SplitMatrix(n + inputs.StateCount, n + inputs.StateCount + 1);
        FillPencil(system, equations, inputs, shift);
        foreach (var (place, value) in AugmentedEquations.RightSide(equations, inputs, states).Index())
        {
            system[place, system.Rows] = value;
        }

        if (SplitElimination.Solve(system, equilibrates: true) is not { } solution)
        {
            return null;
        }

        DoubleDouble[] x = [.. Enumerable.Range(0, n).Select(i => solution[i, 0])];
        return (x, AugmentedEquations.StoredOf(equations, x));
    }

    private static void FillPencil(
        SplitMatrix system, DescriptorEquations equations, InputModel inputs, double shift)
    {
        foreach (var element in AugmentedEquations.Constant(equations, inputs))
        {
            system[element.Row, element.Column] += element.Value;
        }

        foreach (var element in AugmentedEquations.Linear(equations, inputs))
        {
            system[element.Row, element.Column] += element.Value * shift;
        }
    }

    private static SplitMatrix StorageOf(SplitMatrix x, DescriptorEquations equations, int[] scale, int n)
    {
        var m = equations.Storage.Count;
        var voltages = new SplitMatrix(m, scale.Length);
        foreach (var column in equations.StorageColumns)
        {
            SplitMatrix.Subtract(voltages, column.Index, -column.Sign, x, column.Place, 0);
        }

        var stored = new SplitMatrix(scale.Length, scale.Length);
        foreach (var element in equations.Storage.Values)
        {
            var factor = DoubleDouble.ScaleByPowerOfTwo(-element.Value, -scale[element.Row]);
            SplitMatrix.Subtract(stored, element.Row, factor, voltages, element.Column, 0);
        }

        for (var state = m; state < scale.Length; state++)
        {
            SplitMatrix.Subtract(stored, state, -1, x, n + state - m, 0);
        }

        return Transposed(stored);
    }

    private static SplitMatrix Transposed(SplitMatrix a)
    {
        var transposed = new SplitMatrix(a.Columns, a.Rows);
        for (var i = 0; i < a.Rows; i++)
        {
            for (var j = 0; j < a.Columns; j++)
            {
                transposed[j, i] = a[i, j];
            }
        }

        return transposed;
    }

    // Makes the unit of some source states smaller where their effect would outgrow the other elements of s
    // K.
    private void ScaleDown(int first, int count)
    {
        var norm = 0.0;
        for (var state = first; state < first + count; state++)
        {
            var row = Storage.HighWords(state);
            var sum = 0.0;
            for (var j = 0; j < row.Length; j++)
            {
                sum += j >= first && j < first + count ? 0 : Math.Abs(row[j]);
            }

            norm = Math.Max(norm, sum * Shift);
        }

        var exponent = norm > LargestCoupling ? -Math.ILogB(norm / LargestCoupling) - 1 : 0;
        for (var state = first; state < first + count; state++)
        {
            Scale[state] = exponent;
            for (var j = 0; j < Storage.Columns; j++)
            {
                Storage[state, j] = DoubleDouble.ScaleByPowerOfTwo(Storage[state, j], exponent);
            }

            for (var j = 0; j < Unknowns.Columns; j++)
            {
                Unknowns[state, j] = DoubleDouble.ScaleByPowerOfTwo(Unknowns[state, j], exponent);
            }

            for (var i = 0; i < Storage.Rows; i++)
            {
                Storage[i, state] = DoubleDouble.ScaleByPowerOfTwo(Storage[i, state], -exponent);
            }
        }
    }
}
