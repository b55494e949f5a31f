using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>The functions of time that every voltage and current of a segment is a sum of.</summary>
public sealed class SegmentBasis
{
    private readonly int[] places;

    internal SegmentBasis(ImmutableArray<Mode> modes)
    {
        Modes = modes;
        places = new int[modes.Length];
        for (var i = 0; i < modes.Length; i++)
        {
            places[i] = Width;
            Width += modes[i].Width;
            Fastest = Math.Max(Fastest, modes[i].Speed);
        }
    }

    /// <summary>The modes.</summary>
    public ImmutableArray<Mode> Modes { get; }

    /// <summary>How many real numbers hold all functions at an instant.</summary>
    public int Width { get; }

    /// <summary>The speed of the fastest mode, 1/s.</summary>
    public double Fastest { get; }

    /// <summary>Where a mode's numbers begin.</summary>
    public int Place(int mode) => places[mode];

    /// <summary>All functions at τ.</summary>
    public void Evaluate(double tau, Span<double> values)
    {
        for (var i = 0; i < Modes.Length; i++)
        {
            ModeEvaluation.Evaluate(Modes[i], tau, values.Slice(places[i], Modes[i].Width));
        }
    }

    /// <summary>An upper bound of each function's magnitude for a ≤ τ ≤ b; a complex one's stands in both its
    /// places.</summary>
    public void Envelope(double a, double b, Span<double> bounds)
    {
        Span<double> carriers = stackalloc double[128];
        for (var i = 0; i < Modes.Length; i++)
        {
            var mode = Modes[i];
            var own = mode.CarrierCount <= 128 ? carriers[..mode.CarrierCount]
                : new double[mode.CarrierCount];
            ModeEnvelope.Bound(mode, a, b, own);
            for (var k = 0; k < own.Length; k++)
            {
                if (mode.IsReal)
                {
                    bounds[places[i] + k] = own[k];
                }
                else
                {
                    bounds[places[i] + (2 * k)] = own[k];
                    bounds[places[i] + (2 * k) + 1] = own[k];
                }
            }
        }
    }

    /// <summary>The coefficients of the derivative: with X′ = X T, c′ᵢⱼ = Σₖ Tⱼₖ cᵢₖ.</summary>
    public double[] Differentiate(ReadOnlySpan<double> coefficients)
    {
        var derivative = new double[Width];
        for (var m = 0; m < Modes.Length; m++)
        {
            var mode = Modes[m];
            for (var i = 0; i < mode.Rows; i++)
            {
                for (var j = i; j < mode.Order; j++)
                {
                    var sum = Complex.Zero;
                    for (var k = j; k < mode.Order; k++)
                    {
                        sum += mode.Rounded[j, k] * Coefficient(coefficients, m, mode.Carrier(i, k));
                    }

                    Put(derivative, m, mode.Carrier(i, j), sum);
                }
            }
        }

        return derivative;
    }

    /// <summary>The complex coefficient of a function: the sum takes the real part of the product.</summary>
    public Complex Coefficient(ReadOnlySpan<double> coefficients, int mode, int carrier) =>
        Modes[mode].IsReal
            ? coefficients[places[mode] + carrier]
            : new Complex(
                coefficients[places[mode] + (2 * carrier)], -coefficients[places[mode] + (2 * carrier) + 1]);

    internal void Put(double[] coefficients, int mode, int carrier, Complex value)
    {
        if (Modes[mode].IsReal)
        {
            coefficients[places[mode] + carrier] = value.Real;
        }
        else
        {
            coefficients[places[mode] + (2 * carrier)] = value.Real;
            coefficients[places[mode] + (2 * carrier) + 1] = -value.Imaginary;
        }
    }
}
