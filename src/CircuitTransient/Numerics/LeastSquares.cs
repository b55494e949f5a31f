namespace CircuitTransient.Numerics;

/// <summary>How a minimisation ended.</summary>
/// <param name="X">The unknowns.</param>
/// <param name="Triangle">The linearised system there: of the residuals and of their slopes.</param>
/// <param name="Converged">Whether a minimum was reached.</param>
/// <param name="Steps">How often the system was linearised.</param>
public sealed record LeastSquaresResult(double[] X, RowTriangle Triangle, bool Converged, int Steps)
{
    /// <summary>Σ r².</summary>
    public double Cost => Triangle.SquareSum;
}

/// <summary>Nonlinear least squares by Levenberg and Marquardt's method in Moré's trust-region
/// form.</summary>
/// <remarks>J. J. Moré, The Levenberg-Marquardt algorithm: implementation and theory (1978), from memory:
/// scaling by the largest column norms seen, the damping found from the radius by a few Newton steps. Ends
/// with plain Gauss-Newton steps while they make the gradient smaller, which the sum of squares no longer
/// shows.</remarks>
public static class LeastSquares
{
    /// <summary>The relative reduction of Σ r² that is left in double precision.</summary>
    public const double Finest = 4e-16;

    private const double Accepted = 1e-4; // least part of the promised reduction that must come true (Moré)
    private const int Polishing = 50;
    private const double Unseen = 1e-9; // Σ r² may rise by rounding where the gradient still falls

    /// <summary>Minimises Σ r(x)².</summary>
    /// <param name="start">Where to start.</param>
    /// <param name="linearise">Residuals and slopes at x; null where x is outside what can be solved.</param>
    /// <param name="radius">First radius, in multiples of the scaled start.</param>
    /// <param name="mostSteps">The most linearisations.</param>
    /// <param name="tolerance">The relative reduction of Σ r² that is not worth a step.</param>
    public static LeastSquaresResult? Minimise(
        double[] start, Func<double[], RowTriangle?> linearise, double radius = 100, int mostSteps = 2000,
        double tolerance = Finest)
    {
        var x = (double[])start.Clone();
        if (linearise(x) is not { } system)
        {
            return null;
        }

        var scale = new double[x.Length];
        var region = new TrustRegion(radius);
        var steps = 1;
        var converged = false;
        while (!converged && steps < mostSteps)
        {
            for (var j = 0; j < scale.Length; j++)
            {
                scale[j] = Math.Max(scale[j], system.ColumnNorm(j));
                scale[j] = scale[j] > 0 ? scale[j] : 1;
            }

            var moved = false;
            while (!moved && !converged && steps < mostSteps)
            {
                var step = region.Step(system, scale, x);
                var trial = x.Zip(step, (a, b) => a - b).ToArray();
                var next = linearise(trial);
                steps++;
                var judged = region.Judge(system, next, step, scale);
                converged = judged.Promised <= tolerance && Math.Abs(judged.Reached) <= tolerance;
                converged |= region.Radius <= 1e-16 * Norm(scale, x);
                if (next is not null && judged.Ratio >= Accepted)
                {
                    (x, system, moved) = (trial, next, true);
                }
            }
        }

        (x, system) = tolerance > Finest ? (x, system) : Polish(x, system, linearise);
        return new LeastSquaresResult(x, system, converged, steps);
    }

    /// <summary>‖D x‖.</summary>
    internal static double Norm(double[] scale, double[] x)
    {
        double sum = 0;
        for (var j = 0; j < x.Length; j++)
        {
            sum = double.Hypot(sum, scale[j] * x[j]);
        }

        return sum;
    }

    private static (double[] X, RowTriangle System) Polish(
        double[] x, RowTriangle system, Func<double[], RowTriangle?> linearise)
    {
        var size = Slope(system);
        for (var k = 0; k < Polishing && size > 0; k++)
        {
            if (TriangleSolver.Solve(system, []) is not { } step)
            {
                break;
            }

            var trial = x.Zip(step, (a, b) => a - b).ToArray();
            if (linearise(trial) is not { } next || !(Slope(next) < size)
                || next.SquareSum > system.SquareSum * (1 + Unseen))
            {
                break;
            }

            (x, system, size) = (trial, next, Slope(next));
        }

        return (x, system);
    }

    /// <summary>The largest cosine between the residuals and a column.</summary>
    private static double Slope(RowTriangle system)
    {
        double largest = 0;
        for (var j = 0; j < system.Columns; j++)
        {
            double dot = 0;
            for (var i = 0; i <= j; i++)
            {
                dot += system[i, j] * system.Right(i);
            }

            var norm = system.ColumnNorm(j) * Math.Sqrt(system.SquareSum);
            largest = norm > 0 ? Math.Max(largest, Math.Abs(dot) / norm) : largest;
        }

        return largest;
    }
}
