using System.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Sparse complex elimination as a list of steps, found once and run for many matrices of one
/// pattern. Pivots have the least fill (Markowitz) among those not smaller than a tenth of their
/// column.</summary>
internal sealed class EliminationProgram
{
    private const double Threshold = 0.1; // of the column's largest, a usual compromise

    private readonly int size;
    private readonly int[,] slots; // place of each element in the array of values, −1 where there is none
    private readonly List<int>[] openInRow;
    private readonly List<int>[] openInColumn;
    private readonly List<Step> steps = [];

    private EliminationProgram(int size)
    {
        this.size = size;
        slots = new int[size, size];
        openInRow = new List<int>[size];
        openInColumn = new List<int>[size];
        for (var i = 0; i < size; i++)
        {
            (openInRow[i], openInColumn[i]) = ([], []);
            for (var j = 0; j < size; j++)
            {
                slots[i, j] = -1;
            }
        }
    }

    /// <summary>Number of values an elimination works on, fill included.</summary>
    public int ValueCount { get; private set; }

    /// <summary>Complex multiply-adds of one run.</summary>
    public long Cost => steps.Sum(step => (step.Rows.Length + 1L) * (step.PivotSlots.Length + 1));

    /// <summary>The steps for a matrix given by its elements (each place once, in the order of its values);
    /// null where it is singular.</summary>
    public static EliminationProgram? Of(
        int size, ReadOnlySpan<(int Row, int Column)> places, Complex[] values)
    {
        var program = new EliminationProgram(size);
        foreach (var (row, column) in places)
        {
            program.Open(row, column);
        }

        var work = new List<Complex>(values);
        for (var step = 0; step < size; step++)
        {
            if (program.Pivot(work) is not var (row, column))
            {
                return null;
            }

            program.Eliminate(work, row, column);
        }

        return program;
    }

    /// <summary>Solves for right-hand sides one after the other in <paramref name="right"/>, which becomes
    /// the solutions; <paramref name="values"/>, of length <see cref="ValueCount"/>, are used up.</summary>
    public void Solve(Complex[] values, Complex[] right, Complex[] work)
    {
        var count = right.Length / size;
        foreach (var step in steps)
        {
            var inverse = Complex.One / values[step.PivotSlot];
            values[step.PivotSlot] = inverse;
            for (var i = 0; i < step.Rows.Length; i++)
            {
                var factor = values[step.ColumnSlots[i]] * inverse;
                var targets = step.TargetSlots[i];
                for (var j = 0; j < targets.Length; j++)
                {
                    values[targets[j]] -= factor * values[step.PivotSlots[j]];
                }

                for (var k = 0; k < count; k++)
                {
                    right[(k * size) + step.Rows[i]] -= factor * right[(k * size) + step.PivotRow];
                }
            }
        }

        for (var k = 0; k < count; k++)
        {
            BackSubstitute(values, right.AsSpan(k * size, size), work);
        }
    }

    private void BackSubstitute(Complex[] values, Span<Complex> right, Complex[] work)
    {
        for (var s = steps.Count - 1; s >= 0; s--)
        {
            var step = steps[s];
            var sum = right[step.PivotRow];
            for (var j = 0; j < step.PivotSlots.Length; j++)
            {
                sum -= values[step.PivotSlots[j]] * work[step.Columns[j]];
            }

            work[step.PivotColumn] = sum * values[step.PivotSlot];
        }

        work.AsSpan(0, size).CopyTo(right);
    }

    private void Open(int row, int column)
    {
        slots[row, column] = ValueCount++;
        openInRow[row].Add(column);
        openInColumn[column].Add(row);
    }

    private (int Row, int Column)? Pivot(List<Complex> values)
    {
        (int Row, int Column)? best = null;
        var (leastFill, largest) = (long.MaxValue, 0.0);
        for (var j = 0; j < size; j++)
        {
            var most = 0.0;
            foreach (var i in openInColumn[j])
            {
                most = Math.Max(most, Size(values[slots[i, j]]));
            }

            foreach (var i in openInColumn[j])
            {
                var element = Size(values[slots[i, j]]);
                var fill = (openInRow[i].Count - 1L) * (openInColumn[j].Count - 1L);
                if (element > 0 && element >= Threshold * most
                    && (fill < leastFill || (fill == leastFill && element > largest)))
                {
                    (best, leastFill, largest) = ((i, j), fill, element);
                }
            }
        }

        return best;
    }

    private void Eliminate(List<Complex> values, int row, int column)
    {
        openInRow[row].Remove(column);
        openInColumn[column].Remove(row);
        int[] columns = [.. openInRow[row]];
        int[] rows = [.. openInColumn[column]];
        foreach (var j in columns)
        {
            openInColumn[j].Remove(row);
        }

        var targets = new int[rows.Length][];
        for (var i = 0; i < rows.Length; i++)
        {
            openInRow[rows[i]].Remove(column);
            var factor = values[slots[rows[i], column]] / values[slots[row, column]];
            targets[i] = new int[columns.Length];
            for (var j = 0; j < columns.Length; j++)
            {
                if (slots[rows[i], columns[j]] < 0)
                {
                    Open(rows[i], columns[j]);
                    values.Add(Complex.Zero);
                }

                targets[i][j] = slots[rows[i], columns[j]];
                values[targets[i][j]] -= factor * values[slots[row, columns[j]]];
            }
        }

        openInColumn[column].Clear();
        steps.Add(new Step(
            row, column, slots[row, column], rows, [.. rows.Select(i => slots[i, column])], columns,
            [.. columns.Select(j => slots[row, j])], targets));
    }

    private static double Size(Complex z) => Math.Abs(z.Real) + Math.Abs(z.Imaginary);

    private sealed record Step(
        int PivotRow, int PivotColumn, int PivotSlot, int[] Rows, int[] ColumnSlots, int[] Columns,
        int[] PivotSlots, int[][] TargetSlots);
}
