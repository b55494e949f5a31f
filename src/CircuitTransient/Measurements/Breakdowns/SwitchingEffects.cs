using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>Breaks extremes down by the switchings before them.</summary>
internal sealed class SwitchingEffects(CurveBuilder curves, CancellationToken cancellation)
{
    private readonly TransientSolution solution = curves.Solution;
    private readonly AnswersUpTo answers = new(curves.Solution, cancellation);
    private readonly Dictionary<TransientSolution, CurveBuilder> builders = [];

    /// <summary>The breakdowns of an observed quantity at both extremes.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="since">Since when an integral gathers, in seconds.</param>
    /// <param name="max">Its maximum.</param>
    /// <param name="min">Its minimum.</param>
    public SwitchingBreakdowns Of(Measurand quantity, double since, Extreme max, Extreme min) =>
        new(At(quantity, since, max), At(quantity, since, min));

    private SwitchingBreakdown? At(Measurand quantity, double since, Extreme extreme)
    {
        if (extreme.Value is not { } total)
        {
            return null;
        }

        var before = extreme.Side == InstantSide.Before;
        var acting = Enumerable.Range(0, solution.Intervals.Length)
            .Where(i => !solution.Intervals[i].StartsWith.IsEmpty
                && (before ? solution.Intervals[i].From < extreme.Time
                    : solution.Intervals[i].From <= extreme.Time))
            .ToArray();
        var levels = new List<(double? Value, string? Reason)>();
        foreach (var interval in acting)
        {
            cancellation.ThrowIfCancellationRequested();
            levels.Add(Without(interval, quantity, since, extreme.Time, before));
        }

        levels.Add((total, null));
        return Telescoped(acting, levels);
    }

    /// <summary>Takes the differences of the answers; where one is missing, its two neighbours' difference
    /// stands with the later switching.</summary>
    private SwitchingBreakdown Telescoped(int[] acting, List<(double? Value, string? Reason)> levels)
    {
        var first = levels.FindIndex(l => l.Value is not null);
        var words = first == 0
            ? "with no switching"
            : $"with the switchings up to {Words(acting[first - 1])}: {levels[first - 1].Reason}";
        var effects = ImmutableArray.CreateBuilder<SwitchingEffect>();
        var level = levels[first].Value!.Value;
        for (var k = first; k < acting.Length; k++)
        {
            var (next, reason) = levels[k + 1];
            effects.Add(new SwitchingEffect(
                Words(acting[k]), solution.Intervals[acting[k]].From, next - level,
                next is null ? $"stands with the next: {reason}" : null));
            level = next ?? level;
        }

        return new SwitchingBreakdown(words, levels[first].Value!.Value, effects.ToImmutable());

        string Words(int interval) => SwitchingWords.Of(solution, interval);
    }

    private (double? Value, string? Reason) Without(
        int interval, Measurand quantity, double since, double time, bool before)
    {
        var (answer, reason) = answers.Before(interval);
        if (answer is null)
        {
            return (null, reason);
        }

        var value = curves.IsAccumulated(quantity)
            ? Gathered(answer, quantity, since, time)
            : Instantaneous(answer.Segments[answer.SegmentAt(time, before)], quantity, time);
        return value is { } found && double.IsFinite(found)
            ? (found, null)
            : (null, "without it the equations leave the quantity open");
    }

    private double? Gathered(TransientSolution answer, Measurand quantity, double since, double time)
    {
        if (!builders.TryGetValue(answer, out var builder))
        {
            builders.Add(answer, builder = new CurveBuilder(answer, curves));
        }

        return builder.Of(quantity, from: since)?.ValueAt(answer, time);
    }

    private double? Instantaneous(Segment segment, Measurand quantity, double time)
    {
        var phi = new double[segment.Basis.Width];
        segment.Basis.Evaluate(Math.Clamp(time - segment.Start, 0, segment.Length), phi);
        return QuantityFactors.Of(solution.Circuit, quantity) is { } product
            ? product.Factor * Linear(product.First) * Linear(product.Second)
            : Linear(quantity);

        double? Linear(Measurand linear) =>
            segment.Coefficients(linear) is { } coefficients ? DotProduct.Of(coefficients, phi) : null;
    }
}
