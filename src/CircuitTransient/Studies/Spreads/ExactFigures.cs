using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Single figures by the exact engine.</summary>
internal sealed class ExactFigures(ImmutableArray<StudyFigure> figures, CancellationToken cancellation)
{
    private const double Rounding = 1e-12; // the engine owes 1e-11 of the observation's scale

    /// <summary>A figure and its instant; null where there is none.</summary>
    public (double? Value, double? Time) At(Circuit circuit, int figure)
    {
        var other = figures[figure].Kind switch
        {
            StudyFigureKind.Maximum => figure + 1,
            StudyFigureKind.Minimum => figure - 1,
            _ => figure,
        };
        var solved = StudySolver.At(circuit, [figures[figure], figures[other]], cancellation).Value;
        var isRounding = Math.Abs(solved?.Values[0] ?? 1) < Rounding * Math.Abs(solved?.Values[1] ?? 0);
        return (isRounding ? 0 : solved?.Values[0], solved?.Times[0]);
    }
}
