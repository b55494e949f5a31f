using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>A source's part on a segment: (amplitude + slope τ) e^(exponent τ), τ from the segment's start. A
/// sine is two of these with conjugate exponents.</summary>
/// <param name="Input">Index of the input.</param>
internal sealed record Forcing(
    int Input, DoubleDoubleComplex Exponent, DoubleDoubleComplex Amplitude, DoubleDoubleComplex Slope)
{
    /// <summary>The forcings of a cause's pieces that are on just after an instant.</summary>
    public static ImmutableArray<Forcing> Of(IEnumerable<WavePiece> pieces, int input, DoubleDouble scale,
        double start)
    {
        var sums = new Dictionary<DoubleDoubleComplex,
            (DoubleDoubleComplex Amplitude, DoubleDoubleComplex Slope)>();
        foreach (var piece in pieces)
        {
            if (piece.Start <= start && start < piece.End)
            {
                AddPiece(sums, piece, scale, start);
            }
        }

        return [.. sums.Where(s => !s.Value.Amplitude.IsZero || !s.Value.Slope.IsZero)
            .Select(s => new Forcing(input, s.Key, s.Value.Amplitude, s.Value.Slope))];
    }

    private static void AddPiece(
        Dictionary<DoubleDoubleComplex, (DoubleDoubleComplex Amplitude, DoubleDoubleComplex Slope)> sums,
        WavePiece piece,
        DoubleDouble scale,
        double start)
    {
        var elapsed = (DoubleDouble)start - piece.Start;
        var exponent = new DoubleDoubleComplex(-(DoubleDouble)piece.DecayRate, piece.AngularFrequency);
        var level = piece.Amplitude + (piece.Slope * elapsed);
        if (piece.AngularFrequency == 0)
        {
            var factor = scale * DoubleDouble.Exp(-piece.DecayRate * elapsed);
            if (piece.Phase != 0)
            {
                factor *= DoubleDouble.SinCos(piece.Phase).Cos;
            }

            Put(sums, exponent, level * factor, piece.Slope * factor);
        }
        else
        {
            var now = new DoubleDoubleComplex(exponent.Re * elapsed, (exponent.Im * elapsed) + piece.Phase);
            var half = DoubleDoubleComplex.Exp(now) * (scale * (DoubleDouble)0.5);
            Put(sums, exponent, half * level, half * (DoubleDouble)piece.Slope);
            Put(sums, exponent.Conjugate, half.Conjugate * level, half.Conjugate * (DoubleDouble)piece.Slope);
        }
    }

    private static void Put(
        Dictionary<DoubleDoubleComplex, (DoubleDoubleComplex Amplitude, DoubleDoubleComplex Slope)> sums,
        DoubleDoubleComplex exponent,
        DoubleDoubleComplex amplitude,
        DoubleDoubleComplex slope)
    {
        var (a, s) = sums.GetValueOrDefault(exponent);
        sums[exponent] = (a + amplitude, s + slope);
    }

    /// <summary>The same part seen from an instant a time later.</summary>
    public Forcing MovedBy(DoubleDouble time)
    {
        var growth = DoubleDoubleComplex.Exp(Exponent * time);
        return this with { Amplitude = (Amplitude + (Slope * time)) * growth, Slope = Slope * growth };
    }

    /// <summary>The k-th derivative at the segment's start; the real parts of a real source's
    /// two halves add up to its own.</summary>
    public DoubleDoubleComplex DerivativeAtStart(int k)
    {
        var (amplitude, slope) = (Amplitude, Slope);
        for (; k > 0; k--)
        {
            (amplitude, slope) = (slope + (Exponent * amplitude), Exponent * slope);
        }

        return amplitude;
    }
}
