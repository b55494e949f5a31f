using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The exact derivatives of a circuit's solution with respect to values: the solution itself
/// differentiated, no differences taken. One thread at a time.</summary>
public sealed class SensitivityAnalysis
{
    private readonly TransientSolution solution;
    private readonly ImmutableArray<Variation> variations;
    private readonly SlopeMarch march;
    private readonly FigureSlopeFinder figures;

    private SensitivityAnalysis(
        TransientSolution solution, ImmutableArray<Variation> variations, SlopeMarch march)
    {
        this.solution = solution;
        this.variations = variations;
        this.march = march;
        figures = new FigureSlopeFinder(solution, variations, march);
    }

    /// <summary>Solves a varied circuit at some values and derives the solution there.</summary>
    /// <param name="varied">The circuit.</param>
    /// <param name="values">One in SI for each of its values.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The derivatives, or why some interval has no unique solution.</returns>
    public static Outcome<SensitivityAnalysis> Of(
        VariedCircuit varied, ReadOnlySpan<double> values, CancellationToken cancellation = default)
    {
        var at = varied.At(values);
        if (!at.Succeeded)
        {
            return new(null, at.Diagnostics);
        }

        var solved = TransientSolver.Solve(at.Value, CauseList.FromStart(at.Value), cancellation);
        return solved.Succeeded
            ? Of(varied, values, solved.Value, cancellation) : new(null, solved.Diagnostics);
    }

    /// <summary>Derives a solution of a varied circuit.</summary>
    /// <param name="varied">The circuit.</param>
    /// <param name="values">One in SI for each of its values.</param>
    /// <param name="solution">The solution with these values.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static Outcome<SensitivityAnalysis> Of(
        VariedCircuit varied, ReadOnlySpan<double> values, TransientSolution solution,
        CancellationToken cancellation = default)
    {
        var moving = ImmutableArray.CreateBuilder<Variation>();
        for (var v = 0; v < values.Length; v++)
        {
            moving.Add(Variation.Of(
                solution.Circuit, varied.Values[v], HiddenReach.Of(varied, solution.Circuit, values, v)));
        }

        return SlopeMarch.Of(solution, moving.ToImmutable(), cancellation) is { } derived
            ? new(new SensitivityAnalysis(solution, moving.ToImmutable(), derived), [])
            : new(null, [Diagnostic.Error(
                solution.Circuit.Source, default,
                "the solution has no derivatives: a value decides whether the equations have a solution",
                "vary other values")]);
    }

    /// <summary>The solution that is derived.</summary>
    public TransientSolution Solution => solution;

    /// <summary>For every value, from when on its derivatives do not exist, and why; null where they all
    /// do.</summary>
    public IReadOnlyList<Refusal?> Refusals => march.Refusals;

    /// <summary>A figure with the derivatives of its value and of its instant; null where the figure has no
    /// value.</summary>
    public FigureSlopes? Of(StudyFigure figure) => figures.Of(figure);

    /// <summary>∂(quantity)/∂value at a fixed instant, one for each value; null where it is not
    /// known.</summary>
    /// <param name="quantity">A voltage, a current, the rate of one, or a product of two such.</param>
    /// <param name="time">In seconds.</param>
    /// <param name="before">At a jump, whether before it.</param>
    public ImmutableArray<double?> ValueSlopes(Measurand quantity, double time, bool before = false)
    {
        var segment = solution.SegmentAt(time, before);
        var tau = Math.Clamp(time - solution.Segments[segment].Start, 0, solution.Segments[segment].Length);
        return [.. Enumerable.Range(0, variations.Length)
            .Select(v => march.Reading.ValueSlope(quantity, segment, tau, v))];
    }

    /// <summary>The poles of an interval with their derivatives.</summary>
    public ImmutableArray<PoleSlope> Poles(int interval) =>
        PoleSlopes.Of(march.ModelOf(interval), variations);

    /// <summary>A linear quantity and its derivatives at many instants; at a jump after it.</summary>
    /// <param name="quantity">A voltage, a current, or the rate of one.</param>
    /// <param name="times">In seconds, ascending or not.</param>
    /// <param name="values">Gets the quantity at each instant.</param>
    /// <param name="jacobian">Gets for each instant the derivatives with respect to every value, row by
    /// row.</param>
    /// <returns>Whether the quantity and all its derivatives are known.</returns>
    public bool Samples(
        Measurand quantity, ReadOnlySpan<double> times, Span<double> values, Span<double> jacobian)
    {
        var count = variations.Length;
        var rows = new double[]?[solution.Segments.Length][];
        double[] functions = [];
        for (var k = 0; k < times.Length; k++)
        {
            var s = solution.SegmentAt(times[k]);
            rows[s] ??= [march.Reading.NominalIn(s, quantity),
                .. Enumerable.Range(0, count).Select(v => march.Reading.SlopesIn(s, quantity, v))];
            if (Array.Exists(rows[s]!, r => r is null))
            {
                return false;
            }

            var basis = march.Reading.FrameOf(s).Driven.Basis;
            functions = functions.Length == basis.Width ? functions : new double[basis.Width];
            basis.Evaluate(Math.Clamp(
                times[k] - solution.Segments[s].Start, 0, solution.Segments[s].Length), functions);
            values[k] = DotProduct.Of(rows[s]![0], functions);
            for (var v = 0; v < count; v++)
            {
                jacobian[(k * count) + v] = DotProduct.Of(rows[s]![v + 1], functions);
            }
        }

        return true;
    }
}
