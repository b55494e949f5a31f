using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Works out a study's figures at one set of values, on one thread.</summary>
internal sealed class FigureEvaluator(VariedCircuit varied, ImmutableArray<StudyFigure> figures)
{
    /// <summary>Works them out.</summary>
    /// <param name="point">One value in SI for each varied value.</param>
    /// <param name="values">Gets the figures; NaN where there is none.</param>
    /// <param name="times">Gets their instants in seconds; NaN where there is none.</param>
    /// <returns>Whether the circuit has a unique solution there.</returns>
    public bool TryAt(
        ReadOnlySpan<double> point, Span<double> values, Span<double> times, CancellationToken cancellation)
    {
        var circuit = varied.At(point);
        var solved = circuit.Succeeded ? StudySolver.At(circuit.Value, figures, cancellation).Value : null;
        for (var f = 0; f < figures.Length; f++)
        {
            values[f] = solved?.Values[f] ?? double.NaN;
            times[f] = solved?.Times[f] ?? double.NaN;
        }

        Clean(values);
        return solved is not null;
    }

    // What rounding left of nothing is nothing: beside the other extreme of the same observation it has no
    // digits.
    private void Clean(Span<double> values)
    {
        const double rounding = 1e-11;
        for (var f = 0; f + 1 < figures.Length; f++)
        {
            if (figures[f].Kind == StudyFigureKind.Maximum
                && figures[f + 1].Kind == StudyFigureKind.Minimum
                && figures[f].Index == figures[f + 1].Index)
            {
                var size = Math.Max(Math.Abs(values[f]), Math.Abs(values[f + 1]));
                values[f] = Math.Abs(values[f]) < rounding * size ? 0 : values[f];
                values[f + 1] = Math.Abs(values[f + 1]) < rounding * size ? 0 : values[f + 1];
            }
        }
    }
}
