using System.Collections.Immutable;
using CircuitTransient.Studies.Draws;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Works out a study's figures at one set of values, on one thread: fast where the kernel serves
/// them, else by the exact engine.</summary>
internal sealed class FigureEvaluator(
    VariedCircuit varied, ImmutableArray<StudyFigure> figures, DrawKernel? kernel)
{
    // What rounding left of nothing: beside the other extreme of the same observation it has no digits.
    private const double Rounding = 1e-11;

    private readonly DrawWorkspace? workspace = kernel?.CreateWorkspace();
    private readonly int[] unserved =
        [.. Enumerable.Range(0, figures.Length).Where(f => kernel?.Unserved[f] is not null)];

    /// <summary>Works them out.</summary>
    /// <param name="point">One value in SI for each varied value.</param>
    /// <param name="values">Gets the figures; NaN where there is none.</param>
    /// <param name="times">Gets their instants in seconds; NaN where there is none.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>Whether the circuit has a unique solution there.</returns>
    public bool TryAt(
        ReadOnlySpan<double> point, Span<double> values, Span<double> times, CancellationToken cancellation)
    {
        var isFast = kernel is not null
            && kernel.Evaluate(workspace!, point, values, times) == DrawStatus.Reliable;
        var isSolved = isFast
            ? unserved.Length == 0 || TryExact(point, unserved, values, times, cancellation)
            : TryExact(point, [.. Enumerable.Range(0, figures.Length)], values, times, cancellation);
        Clean(values);
        return isSolved;
    }

    private bool TryExact(
        ReadOnlySpan<double> point, int[] asked, Span<double> values, Span<double> times,
        CancellationToken cancellation)
    {
        var solved = varied.At(point).Value is { } circuit
            ? StudySolver.At(circuit, [.. asked.Select(f => figures[f])], cancellation).Value
            : null;
        for (var i = 0; i < asked.Length; i++)
        {
            values[asked[i]] = solved?.Values[i] ?? double.NaN;
            times[asked[i]] = solved?.Times[i] ?? double.NaN;
        }

        return solved is not null;
    }

    private void Clean(Span<double> values)
    {
        for (var f = 0; f + 1 < figures.Length; f++)
        {
            if (figures[f].Kind == StudyFigureKind.Maximum)
            {
                var size = Rounding * Math.Max(Math.Abs(values[f]), Math.Abs(values[f + 1]));
                values[f] = Math.Abs(values[f]) < size ? 0 : values[f];
                values[f + 1] = Math.Abs(values[f + 1]) < size ? 0 : values[f + 1];
            }
        }
    }
}
