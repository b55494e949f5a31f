using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>The figures of a circuit as a function of its varied values, each solved exactly.</summary>
internal sealed class ScanFunction(
    VariedCircuit varied, ImmutableArray<StudyFigure> figures, CancellationToken cancellation)
{
    /// <summary>All figures at a point.</summary>
    /// <param name="values">A value for each that varies.</param>
    /// <param name="at">The scanned ones among them.</param>
    public ScanPoint Point(double[] values, ImmutableArray<double> at)
    {
        cancellation.ThrowIfCancellationRequested();
        var found = varied.At(values)
            .Then(circuit => StudySolver.At(circuit, figures, cancellation));
        return found.Succeeded
            ? new ScanPoint(at, found.Value, [], null)
            : new ScanPoint(at, null, [], Reason(found.Diagnostics));
    }

    /// <summary>When a figure stands at a point; null where there is no instant.</summary>
    public double? Time(double[] values, int figure) => Solve(values, figure).Found?.Times[0];

    /// <summary>One figure as a function of one of the values.</summary>
    public Func<double, SlopedSample> Along(int axis, double[] others, int figure) => x =>
    {
        var values = (double[])others.Clone();
        values[axis] = x;
        var (found, slope) = Solve(values, figure);
        return new SlopedSample(x, Judged(figures[figure], found, found?.Values[0]), slope);
    };

    private (StudyPoint? Found, double Slope) Solve(double[] values, int figure)
    {
        cancellation.ThrowIfCancellationRequested();
        var found = varied.At(values)
            .Then(circuit => StudySolver.At(circuit, [figures[figure]], cancellation));
        return (found.Value, double.NaN);
    }

    /// <summary>A figure as the searches take it: infinite where what is judged breaks without limit, NaN
    /// where there is none.</summary>
    public static double Judged(StudyFigure figure, StudyPoint? found, double? value) =>
        (found, value, figure.Kind) switch
        {
            (null, _, _) => double.NaN,
            (_, { } known, _) => known,
            (_, _, StudyFigureKind.Margin) => double.NegativeInfinity,
            (_, _, StudyFigureKind.RatingUsed) => double.PositiveInfinity,
            _ => double.NaN,
        };

    private static string Reason(ImmutableArray<Diagnostic> diagnostics) =>
        diagnostics.FirstOrDefault(d => d.Severity == Severity.Error)?.Message ?? "there is no solution";
}
