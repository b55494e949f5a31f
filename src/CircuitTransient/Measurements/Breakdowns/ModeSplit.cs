using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>Breaks extremes down by causes and modes.</summary>
/// <param name="solution">The solved study.</param>
/// <param name="withEnergies">Whether the energy of the fields is wanted, which takes longest.</param>
internal sealed class ModeSplit(TransientSolution solution, bool withEnergies)
{
    private const double Rounding = 1e-12; // of the largest share: what is below is not there

    private readonly ModeEnergy energy = new(solution.Layout);
    private readonly Dictionary<(IntervalModel, int), ModeResult> natural = [];

    /// <summary>The breakdowns of an observed quantity at both extremes.</summary>
    public ModeBreakdowns Of(Measurand quantity, Extreme max, Extreme min) =>
        new(At(quantity, max), At(quantity, min));

    /// <summary>The breakdown at an extreme; null where it is infinite, or the quantity
    /// is an integral over time.</summary>
    public ModeBreakdown? At(Measurand quantity, Extreme extreme)
    {
        if (extreme.Value is not { } total)
        {
            return null;
        }

        var segment = solution.Segments[solution.SegmentAt(extreme.Time, extreme.Side == InstantSide.Before)];
        var columns = new ModeColumns(segment, Math.Clamp(extreme.Time - segment.Start, 0, segment.Length));
        if (Values(columns, quantity, Segment.Total) is not { } whole)
        {
            return null;
        }

        double[][] byCause =
            [.. Enumerable.Range(0, solution.Causes.Length).Select(c => Values(columns, quantity, c)!)];
        var sizes = Enumerable.Range(0, columns.Count)
            .Select(m => byCause.Append(whole).Max(v => Math.Abs(v[m]))).ToArray();
        var shown = Enumerable.Range(0, columns.Count)
            .Where(m => sizes[m] > Rounding * Math.Max(Math.Abs(total), sizes.Max()))
            .OrderByDescending(m => Math.Abs(whole[m])).ToArray();
        return new ModeBreakdown(
            [.. shown.Select(m => Mode(segment.Model, columns, m, whole[m]))],
            [.. byCause.Select((v, c) =>
                new CauseByMode(solution.Causes[c].Name, [.. shown.Select(m => v[m])]))],
            QuantityFactors.IsQuadratic(quantity) ? total - byCause.Sum(v => v.Sum()) : 0,
            withEnergies ? Energies(columns, shown) : null);
    }

    private EnergyByMode Energies(ModeColumns columns, int[] shown)
    {
        var (own, joint) = energy.At(columns);
        return new EnergyByMode([.. shown.Select(m => own[m])], own.Sum() + joint, joint);
    }

    /// <summary>What each column has in a quantity: of a product, the product of what
    /// it has in both factors.</summary>
    private double[]? Values(ModeColumns columns, Measurand quantity, int cause)
    {
        if (!QuantityFactors.IsQuadratic(quantity))
        {
            return columns.Of(quantity, cause);
        }

        return QuantityFactors.Of(solution.Circuit, quantity) is { } product
            && columns.Of(product.First, cause) is { } first
            && columns.Of(product.Second, cause) is { } second
            ? [.. first.Zip(second, (a, b) => product.Factor * a * b)]
            : null;
    }

    private ModeResult Mode(IntervalModel model, ModeColumns columns, int column, double value)
    {
        if (column >= model.Blocks.Length)
        {
            var exponent = (Complex)columns.Exponents[column - model.Blocks.Length];
            return new ModeResult(ModeNames.Forced(exponent), null, true, false, exponent, 1, [], value);
        }

        if (!natural.TryGetValue((model, column), out var mode))
        {
            natural.Add((model, column), mode = Natural(model, column));
        }

        return mode with { IsDriven = columns.IsJoined[column], Value = value };
    }

    private ModeResult Natural(IntervalModel model, int block)
    {
        var groups = PoleGroups.Of([.. model.Blocks.Where((_, b) => model.FirstAlike(b) == block)]);
        var count = groups.Sum(g => g.Multiplicity);
        var pole = groups.Aggregate(Complex.Zero, (sum, g) => sum + (g.Multiplicity * g.Value)) / count;
        var parts = energy.Shares(model, block)
            .OrderByDescending(p => Math.Round(p.Share, 2)).ToImmutableArray(); // halves stand as written
        return new ModeResult(
            ModeNames.Natural(pole, count), ModeNames.Holders(parts), false, false, pole, count, parts, 0);
    }
}
