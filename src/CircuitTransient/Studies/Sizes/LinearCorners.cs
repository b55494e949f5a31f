namespace CircuitTransient.Studies.Sizes;

/// <summary>Linear programs in two or three unknowns, solved by looking at every corner: small ones have few,
/// and nothing can cycle.</summary>
internal static class LinearCorners
{
    private const double Slack = 1e-9; // of a row's own size: corners lie on their rows to rounding

    /// <summary>The x with the greatest c·x among those with a·x ≤ b for every row; null where there is no
    /// corner.</summary>
    /// <param name="objective">The letters c.</param>
    /// <param name="rows">The letters a and b.</param>
    public static double[]? Maximise(double[] objective, IReadOnlyList<(double[] A, double B)> rows)
    {
        double[]? best = null;
        var greatest = double.NegativeInfinity;
        foreach (var corner in Corners(objective.Length, rows))
        {
            var value = Product(objective, corner);
            if (value > greatest && rows.All(row => Product(row.A, corner) <= row.B + (Slack * Size(row))))
            {
                (best, greatest) = (corner, value);
            }
        }

        return best;
    }

    private static double Size((double[] A, double B) row) => row.A.Sum(Math.Abs) + Math.Abs(row.B);

    private static IEnumerable<double[]> Corners(int count, IReadOnlyList<(double[] A, double B)> rows)
    {
        for (var i = 0; i < rows.Count; i++)
        {
            for (var j = i + 1; j < rows.Count; j++)
            {
                if (count == 2)
                {
                    if (Meet(rows[i], rows[j]) is { } corner)
                    {
                        yield return corner;
                    }

                    continue;
                }

                for (var k = j + 1; k < rows.Count; k++)
                {
                    if (Meet(rows[i], rows[j], rows[k]) is { } corner)
                    {
                        yield return corner;
                    }
                }
            }
        }
    }

    // Cramer's rule: the systems are of two and three unknowns, and the search corrects itself.
    private static double[]? Meet((double[] A, double B) p, (double[] A, double B) q)
    {
        var determinant = (p.A[0] * q.A[1]) - (p.A[1] * q.A[0]);
        double[] corner =
        [
            ((p.B * q.A[1]) - (p.A[1] * q.B)) / determinant,
            ((p.A[0] * q.B) - (p.B * q.A[0])) / determinant,
        ];
        return corner.All(double.IsFinite) ? corner : null;
    }

    private static double[]? Meet(
        (double[] A, double B) p, (double[] A, double B) q, (double[] A, double B) r)
    {
        var determinant = Determinant(p.A, q.A, r.A);
        var corner = new double[3];
        for (var i = 0; i < 3; i++)
        {
            corner[i] = Determinant(Put(p, i), Put(q, i), Put(r, i)) / determinant;
        }

        return corner.All(double.IsFinite) ? corner : null;
    }

    private static double[] Put((double[] A, double B) row, int place)
    {
        double[] put = [.. row.A];
        put[place] = row.B;
        return put;
    }

    private static double Determinant(double[] p, double[] q, double[] r) =>
        (p[0] * ((q[1] * r[2]) - (q[2] * r[1]))) - (p[1] * ((q[0] * r[2]) - (q[2] * r[0])))
        + (p[2] * ((q[0] * r[1]) - (q[1] * r[0])));

    private static double Product(double[] a, double[] x)
    {
        var sum = 0.0;
        for (var i = 0; i < a.Length; i++)
        {
            sum += a[i] * x[i];
        }

        return sum;
    }
}
