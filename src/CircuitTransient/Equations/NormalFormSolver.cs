using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>The last step of the reduction: from rows with a regular E to z′ = A z + B u. A right side that
/// is a polynomial in s is divided by s E + G: the quotient acts on the unknowns directly, the remainder
/// drives the state.</summary>
internal static class NormalFormSolver
{
    public static NormalForm Solve(
        NetworkLayout layout,
        List<EquationRow> rows,
        List<(int Unknown, EquationRow Row)> substitutions,
        int[] state,
        List<SparseVector> open)
    {
        var n = state.Length;
        var e = Dense(rows, state, r => r.E);
        var g = Dense(rows, state, r => r.G);
        var lu = LuFactorization.Of(e);
        var degree = rows.Count == 0 ? 0 : rows.Max(r => r.R.Length) - 1;
        var right = new DoubleDoubleMatrix[degree + 1];
        for (var k = 0; k <= degree; k++)
        {
            right[k] = Right(rows, layout.InputCount, k);
        }

        var quotients = new DoubleDoubleMatrix[degree];
        for (var k = degree; k >= 1; k--)
        {
            quotients[k - 1] = lu.Solve(right[k]);
            right[k - 1].AddProduct(-1, g, quotients[k - 1]);
        }

        var a = lu.Solve(g);
        Negate(a);
        var unknowns = new LinearOutput[layout.UnknownCount];
        for (var i = 0; i < n; i++)
        {
            var c = new DoubleDouble[n];
            c[i] = DoubleDouble.One;
            unknowns[state[i]] = new LinearOutput(c, [.. quotients.Select(q => RowOf(q, i))], []);
        }

        new BackSubstitution(layout, n, unknowns, open).Run(substitutions);
        return new NormalForm(layout, a, lu.Solve(right[0]), unknowns);
    }

    private static DoubleDoubleMatrix Dense(List<EquationRow> rows, int[] state, Func<EquationRow,
        SparseVector> part)
    {
        var matrix = new DoubleDoubleMatrix(rows.Count, state.Length);
        for (var i = 0; i < rows.Count; i++)
        {
            foreach (var term in part(rows[i]).Terms)
            {
                var column = Array.BinarySearch(state, term.Index);
                if (column >= 0)
                {
                    matrix[i, column] = term.Value;
                }
            }
        }

        return matrix;
    }

    private static DoubleDoubleMatrix Right(List<EquationRow> rows, int inputs, int power)
    {
        var matrix = new DoubleDoubleMatrix(rows.Count, inputs);
        for (var i = 0; i < rows.Count; i++)
        {
            if (power < rows[i].R.Length)
            {
                foreach (var term in rows[i].R[power].Terms)
                {
                    matrix[i, term.Index] = term.Value;
                }
            }
        }

        return matrix;
    }

    private static DoubleDouble[] RowOf(DoubleDoubleMatrix matrix, int row)
    {
        var values = new DoubleDouble[matrix.Columns];
        for (var j = 0; j < values.Length; j++)
        {
            values[j] = matrix[row, j];
        }

        return values;
    }

    private static void Negate(DoubleDoubleMatrix a)
    {
        for (var i = 0; i < a.Rows; i++)
        {
            for (var j = 0; j < a.Columns; j++)
            {
                a[i, j] = -a[i, j];
            }
        }
    }
}
