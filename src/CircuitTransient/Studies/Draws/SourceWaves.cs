using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Draws;

/// <summary>The waves of all sources as sums of (α + β τ) e^(μ τ), real parts taken, over the exponents μ
/// that occur.</summary>
internal sealed class SourceWaves
{
    private readonly ImmutableArray<Piece> pieces;
    private readonly List<Quantity> scales = []; // of each source, then of pieces with one of their own
    private readonly ImmutableArray<int> sources;

    public SourceWaves(InstrumentedCircuit circuit)
    {
        var exponents = new List<Complex>();
        var found = ImmutableArray.CreateBuilder<Piece>();
        sources = [.. circuit.Layout.Sources.Take(circuit.SourceCount)];
        for (var s = 0; s < sources.Length; s++)
        {
            scales.Add(WaveOf(circuit, s).Scale);
        }

        for (var s = 0; s < sources.Length; s++)
        {
            foreach (var piece in WaveOf(circuit, s).Pieces)
            {
                var exponent = new Complex(-piece.DecayRate, piece.AngularFrequency);
                if (!exponents.Contains(exponent))
                {
                    exponents.Add(exponent);
                }

                found.Add(new Piece(s, FactorOf(piece) ?? s, exponents.IndexOf(exponent), piece.At(1)));
            }
        }

        pieces = found.ToImmutable();
        Exponents = [.. exponents];
    }

    /// <summary>The exponents μ, imaginary parts zero or positive.</summary>
    public ImmutableArray<Complex> Exponents { get; }

    /// <summary>How many sources there are.</summary>
    public int SourceCount => sources.Length;

    /// <summary>How many factors there are.</summary>
    public int FactorCount => scales.Count;

    /// <summary>The factor of every wave and of every piece with one of its own, and by how much the phase
    /// of each source is turned.</summary>
    public void PutFactors(
        DrawValues values, ReadOnlySpan<double> draw, ReadOnlySpan<double> parameters, Span<double> factors,
        Span<double> shifts)
    {
        for (var f = 0; f < scales.Count; f++)
        {
            factors[f] = FormulaValue.Of(scales[f], parameters);
        }

        for (var s = 0; s < sources.Length; s++)
        {
            shifts[s] = values.PhaseShift(sources[s], draw);
        }
    }

    /// <summary>α and β of every exponent and source just after an instant.</summary>
    /// <param name="time">The instant in seconds, τ = 0.</param>
    /// <param name="perpetual">Whether only what has been on for ever counts.</param>
    /// <param name="factors">The factors of the waves.</param>
    /// <param name="shifts">By how much the phases of stated sines are turned.</param>
    /// <param name="levels">α: exponents × sources.</param>
    /// <param name="slopes">β.</param>
    public void Put(
        double time, bool perpetual, ReadOnlySpan<double> factors, ReadOnlySpan<double> shifts,
        Span<Complex> levels, Span<Complex> slopes)
    {
        levels.Clear();
        slopes.Clear();
        foreach (var (source, own, exponent, wave) in pieces)
        {
            if (wave.Start > time || wave.End <= time || (perpetual && !wave.IsPerpetual))
            {
                continue;
            }

            var elapsed = time - wave.Start;
            var phase = wave.Phase + (wave.StatedPhase is null ? 0 : shifts[source])
                + (wave.AngularFrequency * elapsed);
            var size = factors[own]
                * (wave.DecayRate == 0 ? 1 : Math.Exp(-wave.DecayRate * elapsed));
            var (sin, cos) = phase == 0 ? (0.0, 1.0) : Math.SinCos(phase);
            // without a frequency only the cosine of the phase counts
            var factor = new Complex(size * cos, wave.AngularFrequency == 0 ? 0 : size * sin);
            var place = (exponent * sources.Length) + source;
            levels[place] += factor * (wave.Amplitude + (wave.Slope * elapsed));
            slopes[place] += factor * wave.Slope;
        }
    }

    /// <summary>What a source sets in with at an instant: all of it where an interval begins, else what it
    /// jumps by.</summary>
    public double Onset(
        double time, int source, bool beginsInterval, ReadOnlySpan<double> factors,
        ReadOnlySpan<double> shifts)
    {
        double sum = 0;
        foreach (var piece in pieces)
        {
            var wave = piece.Wave;
            if (piece.Source != source)
            {
                continue;
            }

            if (wave.Start == time || (beginsInterval && wave.Start < time && time < wave.End))
            {
                sum += factors[piece.Factor] * At(wave, time, shifts[source]);
            }
            else if (wave.End == time && !beginsInterval)
            {
                sum -= factors[piece.Factor] * At(wave, time, shifts[source]);
            }
        }

        return sum;
    }

    private static Wave WaveOf(InstrumentedCircuit circuit, int source) =>
        circuit.Original.Parts[circuit.Layout.Sources[source]] switch
        {
            VoltageSource v => v.Wave,
            CurrentSource c => c.Wave,
            _ => throw new System.Diagnostics.UnreachableException("not a source"),
        };

    /// <summary>The place of a piece's own factor, which pieces of one term share; null where it goes with
    /// its wave.</summary>
    private int? FactorOf(WavePiece piece)
    {
        if (piece.Share is not { } share)
        {
            return null;
        }

        var known = scales.FindIndex(s => ReferenceEquals(s, share.Factor));
        if (known < 0)
        {
            scales.Add(share.Factor);
        }

        return known < 0 ? scales.Count - 1 : known;
    }

    private static double At(WavePiece wave, double time, double shift)
    {
        var elapsed = time - wave.Start;
        var phase = wave.Phase + (wave.StatedPhase is null ? 0 : shift) + (wave.AngularFrequency * elapsed);
        return (wave.Amplitude + (wave.Slope * elapsed)) * Math.Exp(-wave.DecayRate * elapsed)
            * Math.Cos(phase);
    }

    private readonly record struct Piece(int Source, int Factor, int Exponent, WavePiece Wave);
}
