using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Studies.Sensitivities;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>The figures of a circuit as a function of its varied values: each point solved exactly, and
/// differentiated exactly where the figure has a derivative.</summary>
internal sealed class ScanFunction
{
    private const double Alike = 1e-3; // slope and difference: the step is that short
    private const double Rounding = 1e-10; // of a figure

    private readonly VariedCircuit varied;
    private readonly ImmutableArray<StudyFigure> figures;
    private readonly CancellationToken cancellation;

    // A value that waves or bounds are made of moves more than the derivatives see.
    private readonly HashSet<(int Axis, int Figure)> distrusted = [];

    public ScanFunction(
        VariedCircuit varied, ImmutableArray<StudyFigure> figures, CancellationToken cancellation)
    {
        (this.varied, this.figures, this.cancellation) = (varied, figures, cancellation);
    }

    /// <summary>All figures at a point.</summary>
    /// <param name="values">A value for each that varies.</param>
    /// <param name="at">The scanned ones among them.</param>
    /// <param name="axis">The value whose slopes are wanted; −1 for none.</param>
    public ScanPoint Point(double[] values, ImmutableArray<double> at, int axis = -1)
    {
        var solved = Solve(values);
        if (solved.Value is not { } solution)
        {
            return new ScanPoint(at, null, [], Reason(solved.Diagnostics));
        }

        ImmutableArray<int> all = [.. Enumerable.Range(0, figures.Length)];
        var (found, slopes) = axis < 0
            ? (StudySolver.Read(solution, figures, cancellation), [])
            : Derived(solution, axis, all);
        return new ScanPoint(at, found, slopes, null);
    }

    /// <summary>When a figure stands at a point; null where there is no instant.</summary>
    public double? Time(double[] values, int figure) => Solve(values).Value is { } solution
        ? StudySolver.Read(solution, [figures[figure]], cancellation).Times[0]
        : null;

    /// <summary>One figure as a function of one of the values.</summary>
    public Func<double, SlopedSample> Along(int axis, double[] others, int figure) => x =>
    {
        var values = (double[])others.Clone();
        values[axis] = x;
        if (Solve(values).Value is not { } solution)
        {
            return new SlopedSample(x, double.NaN, double.NaN);
        }

        var (found, slopes) = Derived(solution, axis, [figure]);
        return new SlopedSample(x, Judged(figures[figure], found, found.Values[0]), slopes[0]);
    };

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

    /// <summary>Sets the slopes of figures aside that are not those of their differences: a named value may
    /// stand in waves, instants and bounds, of which the derivatives of parts know nothing.</summary>
    /// <param name="axis">The value along which slopes are wanted.</param>
    /// <param name="places">Some places at which they are compared.</param>
    /// <param name="step">A small change of the value.</param>
    /// <param name="nominal">The other values.</param>
    public void Compare(int axis, IEnumerable<double> places, double step, double[] nominal)
    {
        if (varied.Values[axis].Kind != VariedKind.NamedValue)
        {
            return;
        }

        foreach (var x in places)
        {
            var (below, here, above) = (At(x - step), At(x), At(x + step));
            for (var f = 0; f < figures.Length; f++)
            {
                var difference = (above.Found?.Values[f] - below.Found?.Values[f]) / (2 * step);
                var slope = here.Slopes.IsEmpty ? double.NaN : here.Slopes[f];
                if (double.IsFinite(slope)
                    && !(Math.Abs(slope - difference ?? double.NaN) <= Alike * Math.Abs(difference ?? 0)
                        + (Rounding * Math.Abs(here.Found?.Values[f] ?? 0) / step)))
                {
                    distrusted.Add((axis, f));
                }
            }
        }

        ScanPoint At(double x)
        {
            var values = (double[])nominal.Clone();
            values[axis] = x;
            return Point(values, [x], axis);
        }
    }

    private Outcome<TransientSolution> Solve(double[] values)
    {
        cancellation.ThrowIfCancellationRequested();
        return varied.At(values)
            .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
    }

    /// <summary>Figures with their slopes; what has no derivative is measured alone.</summary>
    private (StudyPoint Found, ImmutableArray<double> Slopes) Derived(
        TransientSolution solution, int axis, ImmutableArray<int> wanted)
    {
        var analysis = SensitivityAnalysis.Of(varied, solution, cancellation).Value;
        var derived = wanted.Select(f => analysis?.Of(figures[f])).ToArray();
        var others = StudySolver.Read(
            solution, [.. wanted.Where((_, k) => derived[k] is null).Select(f => figures[f])], cancellation);
        var values = ImmutableArray.CreateBuilder<double?>();
        var times = ImmutableArray.CreateBuilder<double?>();
        var slopes = ImmutableArray.CreateBuilder<double>();
        var next = 0;
        for (var k = 0; k < derived.Length; k++)
        {
            values.Add(derived[k] is { } known ? known.Value : others.Values[next]);
            times.Add(derived[k] is { } timed ? timed.Time : others.Times[next]);
            slopes.Add(distrusted.Contains((axis, wanted[k])) ? double.NaN
                : derived[k]?.Slopes[axis] ?? double.NaN);
            next += derived[k] is null ? 1 : 0;
        }

        return (new StudyPoint(values.ToImmutable(), times.ToImmutable()), slopes.ToImmutable());
    }

    private static string Reason(ImmutableArray<Diagnostic> diagnostics) =>
        diagnostics.FirstOrDefault(d => d.Severity == Severity.Error)?.Message ?? "there is no solution";
}
