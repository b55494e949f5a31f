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

        return solved is not null;
    }
}
