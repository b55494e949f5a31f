using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>A pole of an interval and its derivatives with respect to every value.</summary>
/// <param name="Pole">In 1/s and rad/s; of a conjugate pair the one with positive imaginary part.</param>
/// <param name="Multiplicity">How many poles are taken together: those too near to each other to be parted
/// move apart like roots, and only their mean has a derivative.</param>
/// <param name="Slopes">∂(pole, or mean of poles)/∂value, one for each value.</param>
public sealed record PoleSlope(Complex Pole, int Multiplicity, ImmutableArray<Complex> Slopes);

/// <summary>The derivatives of poles: ∂λ/∂p = w (∂A/∂p) v, of a block the mean of its diagonal.</summary>
internal static class PoleSlopes
{
    /// <summary>The poles of a network whose laws are disturbed, by magnitude.</summary>
    public static ImmutableArray<PoleSlope> Of(IntervalModel model, ImmutableArray<Variation> variations)
    {
        var poles = ImmutableArray.CreateBuilder<PoleSlope>();
        for (var b = 0; b < model.Blocks.Length; b++)
        {
            var block = model.Blocks[b];
            DoubleDoubleComplex mean = default;
            for (var i = 0; i < block.Size; i++)
            {
                mean += block.T[i, i];
            }

            poles.Add(new PoleSlope(
                (Complex)(mean / (DoubleDouble)block.Size), block.Size,
                [.. variations.Select(v => Slope(model, b, v))]));
        }

        return [.. poles.OrderBy(p => p.Pole.Magnitude)];
    }

    /// <summary>The derivative of a block's mean pole.</summary>
    public static Complex Slope(IntervalModel model, int b, Variation variation)
    {
        DoubleDoubleComplex sum = default;
        foreach (var term in variation.Terms(model.IsClosed))
        {
            var row = model.Project(term.Quantity).Rows[b];
            var drive = model.Drive(b, model.Form.Layout.Disturbance(term.Part));
            for (var i = 0; i < row.Length; i++)
            {
                sum += row[i] * drive[i] * term.Weight;
            }
        }

        return (Complex)(sum / (DoubleDouble)model.Blocks[b].Size);
    }
}
