namespace CircuitTransient.Numerics;

/// <summary>Solves with the triangle of a least-squares system.</summary>
public static class TriangleSolver
{
    /// <summary>x that minimises ‖R x − c‖² + ‖diag(damping) x‖², with c = Qᵀ r; null where R is singular
    /// and undamped.</summary>
    /// <param name="system">The reduced system.</param>
    /// <param name="damping">One factor for each unknown; empty for none.</param>
    public static double[]? Solve(RowTriangle system, ReadOnlySpan<double> damping)
    {
        var n = system.Columns;
        if (damping.IsEmpty)
        {
            return Back(system, system.Right);
        }

        var damped = new RowTriangle(n);
        var row = new double[n];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                row[j] = system[i, j];
            }

            damped.Add(row, system.Right(i));
        }

        for (var i = 0; i < n; i++)
        {
            Array.Clear(row);
            row[i] = damping[i];
            damped.Add(row, 0);
        }

        damped.Reduced();
        return Back(damped, damped.Right);
    }

    /// <summary>(RᵀR)⁻¹; null where R is singular.</summary>
    public static double[,]? InverseProduct(RowTriangle system)
    {
        var n = system.Columns;
        var inverse = new double[n, n];
        for (var k = 0; k < n; k++)
        {
            if (Back(system, i => i == k ? 1 : 0) is not { } column)
            {
                return null;
            }

            for (var i = 0; i < n; i++)
            {
                inverse[i, k] = column[i];
            }
        }

        var product = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                for (var k = 0; k < n; k++)
                {
                    product[i, j] += inverse[i, k] * inverse[j, k];
                }
            }
        }

        return product;
    }

    /// <summary>(RᵀR)⁻¹ with every unknown held where its column has nothing but rounding left: what the rows
    /// do not determine comes out huge, the others as they are.</summary>
    public static double[,] HeldInverseProduct(RowTriangle system)
    {
        const double smallest = 1e-13; // of a column: less than its rounding
        var n = system.Columns;
        var held = new RowTriangle(n);
        var row = new double[n];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                row[j] = system[i, j];
            }

            held.Add(row, 0);
        }

        for (var i = 0; i < n; i++)
        {
            Array.Clear(row);
            var norm = system.ColumnNorm(i);
            row[i] = smallest * (norm > 0 ? norm : 1);
            held.Add(row, 0);
        }

        return InverseProduct(held.Reduced())
            ?? throw new InvalidOperationException("a held system is singular");
    }

    /// <summary>Rᵀ y = c for y, with c in x's place.</summary>
    internal static double[] Forward(RowTriangle system, double[] c)
    {
        var y = new double[c.Length];
        for (var i = 0; i < y.Length; i++)
        {
            var sum = c[i];
            for (var k = 0; k < i; k++)
            {
                sum -= system[k, i] * y[k];
            }

            y[i] = sum / system[i, i];
        }

        return y;
    }

    private static double[]? Back(RowTriangle system, Func<int, double> right)
    {
        var n = system.Columns;
        var x = new double[n];
        for (var i = n - 1; i >= 0; i--)
        {
            var sum = right(i);
            for (var j = i + 1; j < n; j++)
            {
                sum -= system[i, j] * x[j];
            }

            x[i] = sum / system[i, i];
            if (!double.IsFinite(x[i]))
            {
                return null;
            }
        }

        return x;
    }
}
