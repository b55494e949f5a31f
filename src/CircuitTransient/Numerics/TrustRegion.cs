namespace CircuitTransient.Numerics;

/// <summary>How far a linearised system is believed, and the step that it allows.</summary>
internal sealed class TrustRegion(double factor)
{
    private const int MostNewtonSteps = 10;

    private double damping;
    private bool isFirst = true;

    /// <summary>The largest ‖D p‖ allowed.</summary>
    public double Radius { get; private set; }

    /// <summary>The step p that minimises ‖r − J p‖ within the radius.</summary>
    public double[] Step(RowTriangle system, double[] scale, double[] x)
    {
        if (isFirst)
        {
            var size = LeastSquares.Norm(scale, x);
            Radius = factor * (size > 0 ? size : 1);
        }

        var free = TriangleSolver.Solve(system, []);
        var excess = free is null ? double.PositiveInfinity : LeastSquares.Norm(scale, free) - Radius;
        if (free is not null && excess <= 0.1 * Radius)
        {
            damping = 0;
            return free;
        }

        return Damped(system, scale, free, excess);
    }

    /// <summary>What a step reached against what was promised, as parts of Σ r²; adapts the radius.</summary>
    public (double Promised, double Reached, double Ratio) Judge(
        RowTriangle system, RowTriangle? next, double[] step, double[] scale)
    {
        var length = LeastSquares.Norm(scale, step);
        if (isFirst)
        {
            Radius = Math.Min(Radius, length);
            isFirst = false;
        }

        var cost = system.SquareSum;
        var linear = 0.0;
        for (var i = 0; i < step.Length; i++)
        {
            double row = 0;
            for (var j = i; j < step.Length; j++)
            {
                row += system[i, j] * step[j];
            }

            linear += row * row;
        }

        var damped = damping * length * length;
        var promised = cost > 0 ? (linear + (2 * damped)) / cost : 0;
        var reached = next is not null && cost > 0 && next.SquareSum < 100 * cost
            ? 1 - (next.SquareSum / cost)
            : -1;
        var slope = cost > 0 ? -(linear + damped) / cost : 0;
        var ratio = promised > 0 ? reached / promised : 0;
        Adapt(ratio, reached, slope, length);
        return (promised, reached, ratio);
    }

    private void Adapt(double ratio, double reached, double slope, double length)
    {
        if (ratio <= 0.25)
        {
            var shrink = reached >= 0 ? 0.5 : 0.5 * slope / (slope + (0.5 * reached));
            shrink = double.IsFinite(shrink) && shrink >= 0.1 ? shrink : 0.1;
            Radius = shrink * Math.Min(Radius, length / 0.1);
            damping /= shrink;
        }
        else if (damping == 0 || ratio >= 0.75)
        {
            Radius = length / 0.5;
            damping *= 0.5;
        }
    }

    /// <summary>The damping whose step has the radius to a tenth, by Newton's method on its length.</summary>
    private double[] Damped(RowTriangle system, double[] scale, double[]? free, double excess)
    {
        var lower = free is null ? 0 : excess / (Radius * Curvature(system, scale, free));
        var gradient = Gradient(system, scale);
        var upper = Math.Max(gradient / Radius, double.Epsilon);
        var now = Math.Clamp(damping, lower, Math.Max(lower, upper));
        now = now == 0 ? gradient / (free is null ? Radius : LeastSquares.Norm(scale, free)) : now;
        var step = new double[scale.Length];
        for (var k = 0; k < MostNewtonSteps; k++)
        {
            now = now == 0 ? Math.Max(double.Epsilon, 0.001 * upper) : now;
            var roots = Array.ConvertAll(scale, s => Math.Sqrt(now) * s);
            step = TriangleSolver.Solve(system, roots) ?? step;
            var left = LeastSquares.Norm(scale, step) - Radius;
            if (Math.Abs(left) <= 0.1 * Radius || (lower == 0 && left < 0 && left <= excess && k > 0))
            {
                break;
            }

            excess = left;
            (lower, upper) = left > 0 ? (Math.Max(lower, now), upper) : (lower, Math.Min(upper, now));
            var correction = left / (Radius * DampedCurvature(system, scale, step, roots));
            now = Math.Max(lower, now + correction);
        }

        damping = now;
        return step;
    }

    private static double Gradient(RowTriangle system, double[] scale)
    {
        double sum = 0;
        for (var j = 0; j < scale.Length; j++)
        {
            double dot = 0;
            for (var i = 0; i <= j; i++)
            {
                dot += system[i, j] * system.Right(i);
            }

            sum = double.Hypot(sum, scale[j] > 0 ? dot / scale[j] : 0);
        }

        return sum;
    }

    /// <summary>‖R⁻ᵀ D² p / ‖D p‖‖².</summary>
    private static double Curvature(RowTriangle system, double[] scale, double[] step)
    {
        var length = LeastSquares.Norm(scale, step);
        var y = TriangleSolver.Forward(system, [.. scale.Select((s, j) => s * s * step[j] / length)]);
        return y.Sum(v => v * v);
    }

    private static double DampedCurvature(
        RowTriangle system, double[] scale, double[] step, double[] roots)
    {
        var n = scale.Length;
        var damped = new RowTriangle(n);
        var row = new double[n];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                row[j] = system[i, j];
            }

            damped.Add(row, 0);
        }

        for (var i = 0; i < n; i++)
        {
            Array.Clear(row);
            row[i] = roots[i];
            damped.Add(row, 0);
        }

        return Curvature(damped.Reduced(), scale, step);
    }
}
