namespace CircuitTransient.Numerics.Sparse;

/// <summary>Powers of two for the rows and columns of a sparse matrix: columns to elements round one, then
/// rows to a largest element of one.</summary>
internal sealed class SparseScale(SparsePattern pattern)
{
    private readonly double[] rows = new double[pattern.Size];
    private readonly double[] columns = new double[pattern.Size];
    private readonly int[] least = new int[pattern.Size];
    private readonly int[] most = new int[pattern.Size];

    /// <summary>The factor of a row.</summary>
    public double Row(int i) => rows[i];

    /// <summary>The factor of a column.</summary>
    public double Column(int j) => columns[j];

    /// <summary>Chooses factors for the magnitudes of a matrix's elements.</summary>
    public void Choose(ReadOnlySpan<double> magnitudes)
    {
        Range(magnitudes);
        var middle = new int[pattern.Size];
        for (var i = 0; i < middle.Length; i++)
        {
            middle[i] = most[i] == int.MinValue ? 0 : (least[i] + most[i]) / 2;
        }

        Array.Fill(least, int.MaxValue);
        Array.Fill(most, int.MinValue);
        for (var j = 0; j < columns.Length; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                if (magnitudes[p] > 0 && double.IsFinite(magnitudes[p]))
                {
                    Widen(j, Math.ILogB(magnitudes[p]) - middle[pattern.Rows[p]]);
                }
            }

            columns[j] = most[j] == int.MinValue ? 1 : Math.ScaleB(1, -(least[j] + most[j]) / 2);
        }

        Array.Clear(rows);
        for (var j = 0; j < columns.Length; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                rows[pattern.Rows[p]] = Math.Max(rows[pattern.Rows[p]], magnitudes[p] * columns[j]);
            }
        }

        for (var i = 0; i < rows.Length; i++)
        {
            rows[i] = rows[i] > 0 && double.IsFinite(rows[i]) ? Math.ScaleB(1, -Math.ILogB(rows[i])) : 1;
        }
    }

    private void Range(ReadOnlySpan<double> magnitudes)
    {
        Array.Fill(least, int.MaxValue);
        Array.Fill(most, int.MinValue);
        for (var j = 0; j < columns.Length; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                if (magnitudes[p] > 0 && double.IsFinite(magnitudes[p]))
                {
                    Widen(pattern.Rows[p], Math.ILogB(magnitudes[p]));
                }
            }
        }
    }

    private void Widen(int k, int exponent)
    {
        least[k] = Math.Min(least[k], exponent);
        most[k] = Math.Max(most[k], exponent);
    }
}
