using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Studies.Draws;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Samples the observed waveforms of single draws at fixed instants, on one thread: fast where the
/// kernel can, else by the exact engine.</summary>
/// <param name="batch">Whose draws.</param>
/// <param name="observed">Indices of the observations.</param>
/// <param name="times">For each of them instants in seconds, in order.</param>
internal sealed class WaveSampler(PointBatch batch, int[] observed, double[][] times)
{
    private readonly DrawWorkspace? workspace = batch.Kernel?.CreateWorkspace();
    private readonly double[] values = new double[batch.Figures.Length];
    private readonly double[] instants = new double[batch.Figures.Length];

    /// <summary>The waveforms of a draw; NaN outside an observation's window. Null
    /// where the circuit has no unique solution.</summary>
    public double[][]? At(ReadOnlySpan<double> point)
    {
        double[][] waves = [.. times.Select(own => new double[own.Length])];
        var isFast = batch.Kernel is { } kernel
            && kernel.Evaluate(workspace!, point, values, instants) == DrawStatus.Reliable;
        var left = new List<int>();
        for (var o = 0; o < observed.Length; o++)
        {
            if (!isFast || !batch.Kernel!.Sample(
                workspace!, observed[o], times[o], waves[o]))
            {
                left.Add(o);
            }
        }

        return left.Count == 0 || TryExact(point, left, waves) ? waves : null;
    }

    /// <summary>The waveforms by the exact engine alone.</summary>
    public double[][]? Exact(ReadOnlySpan<double> point)
    {
        double[][] waves = [.. times.Select(own => new double[own.Length])];
        return TryExact(point, [.. Enumerable.Range(0, observed.Length)], waves) ? waves : null;
    }

    private bool TryExact(ReadOnlySpan<double> point, List<int> asked, double[][] waves)
    {
        if (batch.Varied.At(point).Value is not { } circuit
            || TransientSolver.Solve(circuit, CauseList.FromStart(circuit), batch.Cancellation).Value
                is not { } solution)
        {
            return false;
        }

        var curves = new CurveBuilder(solution);
        var windows = new WindowTimes(solution);
        foreach (var o in asked)
        {
            Sample(solution, curves, windows, circuit.Observations[observed[o]], times[o], waves[o]);
        }

        return true;
    }

    private static void Sample(
        TransientSolution solution, CurveBuilder curves, WindowTimes windows, Observation observation,
        double[] instants, double[] wave)
    {
        Array.Fill(wave, double.NaN);
        var window = windows.Of(observation.Window);
        var from = CurveBuilder.GatheredFrom(observation.Quantity, window?.From ?? 0);
        if (window is not { } open || curves.Of(observation.Quantity, from: from) is not { } curve)
        {
            return;
        }

        for (var t = 0; t < instants.Length; t++)
        {
            if (instants[t] >= open.From && instants[t] <= open.To)
            {
                wave[t] = curve.ValueAt(solution, instants[t]);
            }
        }
    }
}
