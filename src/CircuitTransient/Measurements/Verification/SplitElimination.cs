using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Gaussian elimination on split matrices: rows and columns first brought to one size by powers of
/// two, then partial pivoting; a multiplier that is zero costs nothing.</summary>
internal static class SplitElimination
{
    private const double SmallestPivot = 1e-27; // equilibrated; rounding leaves 1e-31, real ones 1e-16

    /// <summary>Solves M X = R, where <paramref name="system"/> holds M beside R and is used up. Null where
    /// M is singular to rounding.</summary>
    /// <param name="equilibrates">Whether the elements are of many units and sizes; of a matrix near the unit
    /// matrix, where tiny elements mean nothing, it would spoil the scale.</param>
    public static SplitMatrix? Solve(SplitMatrix system, bool equilibrates)
    {
        var n = system.Rows;
        var columnScale = equilibrates ? Equilibrate(system) : new int[n];
        for (var k = 0; k < n; k++)
        {
            var pivotRow = PivotRow(system, k);
            system.SwapRows(k, pivotRow);
            var pivot = system[k, k];
            if (!(Math.Abs(pivot.Hi) > SmallestPivot))
            {
                return null;
            }

            for (var i = k + 1; i < n; i++)
            {
                var element = system[i, k];
                if (!element.IsZero)
                {
                    SplitMatrix.Subtract(system, i, element / pivot, system, k, k);
                    system[i, k] = DoubleDouble.Zero;
                }
            }
        }

        return BackSubstitute(system, columnScale);
    }

    private static SplitMatrix BackSubstitute(SplitMatrix system, ReadOnlySpan<int> columnScale)
    {
        var n = system.Rows;
        var solution = new SplitMatrix(n, system.Columns - n);
        for (var i = n - 1; i >= 0; i--)
        {
            for (var j = 0; j < solution.Columns; j++)
            {
                solution[i, j] = system[i, n + j];
            }

            for (var k = i + 1; k < n; k++)
            {
                var element = system[i, k];
                if (!element.IsZero)
                {
                    SplitMatrix.Subtract(solution, i, element, solution, k, 0);
                }
            }

            var pivot = system[i, i];
            for (var j = 0; j < solution.Columns; j++)
            {
                solution[i, j] /= pivot;
            }
        }

        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < solution.Columns; j++)
            {
                solution[i, j] = DoubleDouble.ScaleByPowerOfTwo(solution[i, j], columnScale[i]);
            }
        }

        return solution;
    }

    private static int PivotRow(SplitMatrix system, int k)
    {
        var best = k;
        for (var i = k + 1; i < system.Rows; i++)
        {
            if (Math.Abs(system[i, k].Hi) > Math.Abs(system[best, k].Hi))
            {
                best = i;
            }
        }

        return best;
    }

    // Columns to geometric mean one, then rows to largest element one, as exponents of two.
    private static int[] Equilibrate(SplitMatrix system)
    {
        var n = system.Rows;
        var columnScale = new int[n];
        var least = new int[n];
        var most = new int[n];
        Array.Fill(least, int.MaxValue);
        Array.Fill(most, int.MinValue);
        for (var i = 0; i < n; i++)
        {
            var row = system.HighWords(i)[..n];
            var (low, high) = ExponentRange(row);
            for (var j = 0; j < n; j++)
            {
                if (row[j] != 0)
                {
                    var exponent = Math.ILogB(row[j]) - ((low + high) / 2);
                    least[j] = Math.Min(least[j], exponent);
                    most[j] = Math.Max(most[j], exponent);
                }
            }
        }

        for (var j = 0; j < n; j++)
        {
            columnScale[j] = most[j] == int.MinValue ? 0 : -(least[j] + most[j]) / 2;
        }

        for (var i = 0; i < n; i++)
        {
            ScaleRow(system, i, columnScale);
        }

        return columnScale;
    }

    private static void ScaleRow(SplitMatrix system, int i, ReadOnlySpan<int> columnScale)
    {
        var n = system.Rows;
        for (var j = 0; j < n; j++)
        {
            if (!system[i, j].IsZero)
            {
                system[i, j] = DoubleDouble.ScaleByPowerOfTwo(system[i, j], columnScale[j]);
            }
        }

        var (_, high) = ExponentRange(system.HighWords(i)[..n]);
        for (var j = 0; j < system.Columns; j++)
        {
            if (!system[i, j].IsZero)
            {
                system[i, j] = DoubleDouble.ScaleByPowerOfTwo(system[i, j], -high);
            }
        }
    }

    private static (int Low, int High) ExponentRange(ReadOnlySpan<double> row)
    {
        var (low, high) = (int.MaxValue, int.MinValue);
        foreach (var value in row)
        {
            if (value != 0)
            {
                var exponent = Math.ILogB(value);
                low = Math.Min(low, exponent);
                high = Math.Max(high, exponent);
            }
        }

        return high == int.MinValue ? (0, 0) : (low, high);
    }
}
