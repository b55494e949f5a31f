using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>A segment's motion at one instant, column by column: each block of poles, then each
/// exponent of the sources. What a source drives so near a block's own rate that the two are kept
/// together counts to the block.</summary>
public sealed class ModeColumns
{
    private readonly Segment segment;
    private readonly DoubleDoubleComplex[][] carriers;
    private readonly int[] columns;

    /// <summary>Evaluates the functions of a segment.</summary>
    /// <param name="segment">The segment.</param>
    /// <param name="tau">The instant, in seconds from its start.</param>
    public ModeColumns(Segment segment, double tau)
    {
        this.segment = segment;
        var modes = segment.Basis.Modes;
        carriers = [.. modes.Select(m => ModeEvaluation.EvaluateExactly(m, tau))];
        columns = new int[modes.Length];
        var forced = ImmutableArray.CreateBuilder<DoubleDoubleComplex>();
        for (var m = 0; m < modes.Length; m++)
        {
            columns[m] = modes[m].Block < 0 ? -1 : segment.Model.FirstAlike(modes[m].Block);
            if (modes[m].Kind == ModeKind.Forced)
            {
                columns[m] = segment.Model.Blocks.Length + forced.Count;
                forced.Add(modes[m].Triangle[0, 0]);
            }
        }

        Exponents = forced.ToImmutable();
        IsJoined = [.. segment.Model.Blocks.Select((_, b) =>
            modes.Any(m => m.Kind == ModeKind.Joined && m.Block == b))];
    }

    /// <summary>How many columns there are.</summary>
    public int Count => segment.Model.Blocks.Length + Exponents.Length;

    /// <summary>The sources' exponents, in 1/s and rad/s, in the order of their
    /// columns after the blocks.</summary>
    public ImmutableArray<DoubleDoubleComplex> Exponents { get; }

    /// <summary>For each block, whether a source is kept together with it.</summary>
    public ImmutableArray<bool> IsJoined { get; }

    /// <summary>What each column has in a linear quantity, for a cause or the total; null where the
    /// equations leave the quantity open.</summary>
    public double[]? Of(Measurand quantity, int cause = Segment.Total)
    {
        if (segment.CoefficientsByMode(quantity, cause) is not { } coefficients)
        {
            return null;
        }

        var sums = new DoubleDouble[Count];
        for (var m = 0; m < coefficients.Length; m++)
        {
            for (var k = 0; k < coefficients[m].Length; k++)
            {
                sums[columns[m]] += (coefficients[m][k] * carriers[m][k]).Re;
            }
        }

        return [.. sums.Select(s => (double)s)];
    }
}
