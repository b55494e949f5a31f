using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Studies.Sensitivities;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>The figures of a circuit as a function of its varied values: each point solved exactly, and
/// differentiated exactly where the figure has a derivative.</summary>
internal sealed class ScanFunction
{
    private readonly VariedCircuit varied;
    private readonly ImmutableArray<StudyFigure> figures;
    private readonly ScanMemory memory;
    private readonly CancellationToken cancellation;
    private readonly LinearRanges linear;

    // Derivatives of integrals cost more than all else of a point: they are taken only where they matter.
    private readonly ImmutableArray<bool> isIntegrated;

    public ScanFunction(
        VariedCircuit varied, ImmutableArray<StudyFigure> figures, ScanMemory memory,
        CancellationToken cancellation)
    {
        (this.varied, this.figures, this.memory, this.cancellation) = (varied, figures, memory, cancellation);
        linear = new LinearRanges(varied.Circuit);
        isIntegrated = [.. figures.Select(f => IsIntegrated(varied.Circuit, f))];
    }

    /// <summary>All figures at a point.</summary>
    /// <param name="values">A value for each that varies.</param>
    /// <param name="at">The scanned ones among them.</param>
    /// <param name="axis">The value whose slopes are wanted; −1 for none.</param>
    public ScanPoint Point(double[] values, ImmutableArray<double> at, int axis = -1)
    {
        if (Recalled(values, at, axis) is { } known)
        {
            return known;
        }

        var point = Solved(values, at, axis);
        memory.Keep(values, axis, point);
        return point;
    }

    /// <summary>A point that was solved before; null where it was not.</summary>
    public ScanPoint? Recalled(double[] values, ImmutableArray<double> at, int axis = -1) =>
        memory.Point(values, axis) is { } known ? known with { At = at } : null;

    private ScanPoint Solved(double[] values, ImmutableArray<double> at, int axis)
    {
        var solved = Solve(values);
        if (solved.Value is not { } solution)
        {
            return new ScanPoint(at, null, [], Reason(solved.Diagnostics));
        }

        ImmutableArray<int> all = [.. Enumerable.Range(0, figures.Length)];
        var (found, slopes) = axis < 0
            ? (StudySolver.Read(solution, figures, cancellation), [])
            : Derived(solution, values, axis, all, f => !isIntegrated[f]);
        return new ScanPoint(at, found, slopes, null) { LinearUsed = linear.Used(solution) };
    }

    /// <summary>The stated linear ranges.</summary>
    public LinearRanges Linear => linear;

    /// <summary>What is used of a stated linear range as a function of one of the values.</summary>
    public Func<double, SlopedSample> LinearAlong(int axis, double[] others, int index) => x =>
    {
        var values = (double[])others.Clone();
        values[axis] = x;
        return memory.Look(values, axis, -1 - index, () => new SlopedSample(
            x, Solve(values).Value is { } solution ? linear.Used(solution)[index] : double.NaN, double.NaN));
    };

    /// <summary>Whether at a point some part is past the range its value is good for.</summary>
    public bool IsInDoubt(double[] values) => linear.Count > 0
        && Solve(values).Value is { } solution && linear.Used(solution).Any(used => used > 1);

    /// <summary>When a figure stands at a point; null where there is no instant.</summary>
    public double? Time(double[] values, int figure) => Solve(values).Value is { } solution
        ? StudySolver.Read(solution, [figures[figure]], cancellation).Times[0]
        : null;

    /// <summary>One figure as a function of one of the values.</summary>
    public Func<double, SlopedSample> Along(int axis, double[] others, int figure) => x =>
    {
        var values = (double[])others.Clone();
        values[axis] = x;
        return memory.Look(values, axis, figure, () => Look(values, axis, figure));
    };

    private SlopedSample Look(double[] values, int axis, int figure)
    {
        if (Solve(values).Value is not { } solution)
        {
            return new SlopedSample(values[axis], double.NaN, double.NaN);
        }

        var (found, slopes) = Derived(solution, values, axis, [figure], _ => true);
        return new SlopedSample(
            values[axis], Judged(figures[figure], found, found.Values[0]), slopes[0]);
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

    private Outcome<TransientSolution> Solve(double[] values)
    {
        cancellation.ThrowIfCancellationRequested();
        return varied.At(values)
            .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
    }

    /// <summary>Figures with their slopes; what has no derivative is measured alone.</summary>
    private (StudyPoint Found, ImmutableArray<double> Slopes) Derived(
        TransientSolution solution, double[] values, int axis, ImmutableArray<int> wanted,
        Func<int, bool> isDerived)
    {
        var analysis = SensitivityAnalysis.Of(varied, values, solution, cancellation).Value;
        var derived = wanted.Select(f => isDerived(f) ? analysis?.Of(figures[f]) : null).ToArray();
        var others = StudySolver.Read(
            solution, [.. wanted.Where((_, k) => derived[k] is null).Select(f => figures[f])], cancellation);
        var found = ImmutableArray.CreateBuilder<double?>();
        var times = ImmutableArray.CreateBuilder<double?>();
        var slopes = ImmutableArray.CreateBuilder<double>();
        var next = 0;
        for (var k = 0; k < derived.Length; k++)
        {
            found.Add(derived[k] is { } known ? known.Value : others.Values[next]);
            times.Add(derived[k] is { } timed ? timed.Time : others.Times[next]);
            slopes.Add(derived[k]?.Slopes[axis] ?? double.NaN);
            next += derived[k] is null ? 1 : 0;
        }

        return (new StudyPoint(found.ToImmutable(), times.ToImmutable()), slopes.ToImmutable());
    }

    private static bool IsIntegrated(Circuit circuit, StudyFigure figure)
    {
        var part = figure.Kind == StudyFigureKind.RatingUsed ? circuit.Parts[figure.Index] : null;
        var quantity = figure.Kind switch
        {
            StudyFigureKind.Maximum or StudyFigureKind.Minimum => circuit.Observations[figure.Index].Quantity,
            StudyFigureKind.Margin => circuit.Requirements[figure.Index].Quantity,
            _ => null,
        };
        return part is not null
            ? part.Ratings[figure.Rating].Kind is RatingKind.JouleIntegral or RatingKind.MeanPower
                || (part.Ratings[figure.Rating].Kind == RatingKind.Energy
                    && part is not (Capacitor or Inductor))
            : quantity is not null and not Circuits.Figure
                && QuantityFactors.OfAny(circuit, quantity) is { IsIntegrated: true };
    }

    private static string Reason(ImmutableArray<Diagnostic> diagnostics) =>
        diagnostics.FirstOrDefault(d => d.Severity == Severity.Error)?.Message ?? "there is no solution";
}
