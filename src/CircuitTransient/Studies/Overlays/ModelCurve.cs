using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A voltage or current of a solved circuit with its slope, at any instants.</summary>
internal sealed class ModelCurve
{
    private const int Stretch = 8192; // instants a thread takes at once

    private readonly double[][] coefficients;
    private readonly double[][] slopes;

    private ModelCurve(TransientSolution solution, double[][] coefficients)
    {
        Solution = solution;
        this.coefficients = coefficients;
        slopes = [.. solution.Segments.Select((s, i) => s.Basis.Differentiate(coefficients[i]))];
    }

    public TransientSolution Solution { get; }

    public double Until => Solution.Until;

    /// <summary>Solves a circuit for one quantity; errors where it has no solution or leaves the quantity
    /// open.</summary>
    public static Outcome<ModelCurve> Solve(
        Circuit circuit, Observation observation, CancellationToken cancellation)
    {
        var solved = TransientSolver.Solve(circuit, CauseList.FromStart(circuit), cancellation);
        return solved.Succeeded ? Of(solved.Value, observation) : new(null, solved.Diagnostics);
    }

    /// <summary>Takes a quantity from a solution.</summary>
    public static Outcome<ModelCurve> Of(TransientSolution solution, Observation observation)
    {
        var rows = new double[solution.Segments.Length][];
        for (var s = 0; s < rows.Length; s++)
        {
            if (solution.Segments[s].Coefficients(observation.Quantity) is not { } known)
            {
                return new(null, [Diagnostic.Error(solution.Circuit.Source, observation.Span,
                    $"the equations leave `{observation.Name}` open", "observe another quantity")]);
            }

            rows[s] = known;
        }

        return new(new ModelCurve(solution, rows), []);
    }

    /// <summary>The coefficients of the functions of a segment.</summary>
    public ReadOnlySpan<double> Coefficients(int segment) => coefficients[segment];

    /// <summary>Values and slopes at ascending instants, at a jump after it; of an instant that stands twice,
    /// first before it. Outside the study those of its ends, without slope.</summary>
    public void Evaluate(double[] times, double[] values, double[]? rates)
    {
        var count = (times.Length + Stretch - 1) / Stretch;
        if (count <= 1)
        {
            Evaluate(times, values, rates, 0, times.Length);
            return;
        }

        Parallel.For(0, count, k =>
            Evaluate(times, values, rates, k * Stretch, Math.Min(times.Length, (k + 1) * Stretch)));
    }

    /// <summary>The value at one instant.</summary>
    public double At(double time)
    {
        var value = new double[1];
        Evaluate([time], value, null);
        return value[0];
    }

    private void Evaluate(double[] times, double[] values, double[]? rates, int from, int until)
    {
        var segments = Solution.Segments;
        var index = from < until ? Solution.SegmentAt(Math.Clamp(times[from], 0, Until), before: true) : 0;
        var phi = new double[segments.Max(s => s.Basis.Width)];
        for (var k = from; k < until; k++)
        {
            var time = Math.Clamp(times[k], 0, Until);
            var isBefore = k + 1 < times.Length && times[k + 1] == times[k];
            while (index + 1 < segments.Length
                && (segments[index].End < time || (!isBefore && segments[index].End == time)))
            {
                index++;
            }

            var segment = segments[index];
            var now = phi.AsSpan(0, segment.Basis.Width);
            segment.Basis.Evaluate(Math.Clamp(time - segment.Start, 0, segment.Length), now);
            values[k] = DotProduct.Of(coefficients[index], now);
            if (rates is not null)
            {
                rates[k] = time == times[k] ? DotProduct.Of(slopes[index], now) : 0;
            }
        }
    }
}
