using System.Collections.Immutable;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Sensitivities;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The exact derivatives of every figure and every pole with every value nominal.</summary>
/// <param name="Figures">In the order of the figures; null where a figure has no value.</param>
/// <param name="Poles">The poles of each interval between switchings.</param>
/// <param name="WhyNone">Why there are none; null where there are.</param>
public sealed record SensitivityFindings(
    ImmutableArray<FigureSlopes?> Figures, ImmutableArray<ImmutableArray<PoleSlope>> Poles, string? WhyNone)
{
    /// <summary>Derives the solution.</summary>
    /// <param name="varied">The circuit.</param>
    /// <param name="figures">The figures.</param>
    /// <param name="cancellation">Stops the work.</param>
    internal static SensitivityFindings Of(
        VariedCircuit varied, ImmutableArray<StudyFigure> figures, CancellationToken cancellation)
    {
        var analysis = SensitivityAnalysis.Of(
            varied, [.. varied.Values.Select(v => v.Nominal)], cancellation);
        return analysis.Value is { } derived
            ? new SensitivityFindings(
                [.. figures.Select(derived.Of)],
                [.. Enumerable.Range(0, derived.Solution.Intervals.Length).Select(derived.Poles)],
                null)
            : new SensitivityFindings([], [], analysis.Diagnostics[0].Message);
    }

    /// <summary>Of each value, what it has in the variance of a figure by first order: (slope · deviation)²
    /// over the sum of all; null where a slope is not known or nothing varies.</summary>
    public static ImmutableArray<double?> Shares(FigureSlopes slopes, ImmutableArray<VariedValue> values)
    {
        double?[] parts =
        [
            .. values.Select((v, i) =>
                slopes.Slopes[i] * slopes.Slopes[i] * ToleranceLaw.Variance(v.Tolerance!)),
        ];
        var sum = parts.Sum(part => part ?? double.NaN);
        return [.. parts.Select(part => sum > 0 ? part / sum : null)];
    }
}
