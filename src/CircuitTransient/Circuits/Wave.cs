using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>A source's value over time: the sum of its pieces.</summary>
/// <param name="Pieces">In the order written; a pulse is a rise and a delayed fall.</param>
/// <param name="Scale">A factor on the whole wave that carries what its level follows from; nominally 1, or 0
/// where the level is zero and the pieces are those of a level of 1.</param>
public sealed record Wave(ImmutableArray<WavePiece> Pieces, Quantity Scale)
{
    /// <summary>The value just after t = 0, in volts or amperes.</summary>
    public double AtStart() => Scale.Nominal * Pieces.Where(p => p is { Start: <= 0, End: > 0 })
        .Sum(p => p.Amplitude * Math.Cos(p.Phase));
}

/// <summary>One piece of a wave: (A + S·τ)·e^(−d·τ)·cos(ω·τ + φ) with τ = t − Start, for Start ≤ t
/// &lt; End; zero elsewhere. A step, a corner, a sine, a decay are all of this form. Ramps and
/// straight lines are stretches with an end each, then the last value held: sums of unending ramps
/// would lose digits long after the corner.</summary>
/// <param name="Start">In seconds; negative infinity is not allowed, see
/// <paramref name="IsPerpetual"/>.</param>
/// <param name="End">In seconds; positive infinity where it never ends.</param>
/// <param name="Amplitude">A, in volts or amperes.</param>
/// <param name="Slope">S, in volts or amperes per second.</param>
/// <param name="DecayRate">d in 1/s, zero or more.</param>
/// <param name="AngularFrequency">ω in rad/s, zero for a piece that does not oscillate.</param>
/// <param name="Phase">φ in radians at τ = 0.</param>
/// <param name="Label">What the piece is in the user's words: <c>step at 2 ms</c>.</param>
/// <param name="IsPerpetual">Whether it has been on for ever in a settled start (a
/// constant or a sine without a start).</param>
public sealed record WavePiece(
    double Start,
    double End,
    double Amplitude,
    double Slope,
    double DecayRate,
    double AngularFrequency,
    double Phase,
    string Label,
    bool IsPerpetual = false)
{
    /// <summary>Whether it goes on from the piece before it in the wave: the next of several straight lines,
    /// the level held after a ramp, the other exponential of an impulse.</summary>
    public bool Continues { get; init; }

    /// <summary>The pulse whose rise or fall it is, <c>pulse 3 from 131 µs</c>;
    /// null for what is none.</summary>
    public string? Pulse { get; init; }

    /// <summary>The phase at t = 0 as stated for a sine or cosine, in radians;
    /// null for other waves.</summary>
    public double? StatedPhase { get; init; }

    /// <summary>How the piece alone follows from parameters, as a term of a sum; null where only the wave's
    /// scale moves it.</summary>
    public WaveShare? Share { get; init; }

    /// <summary>The piece with its share's factor at another value.</summary>
    public WavePiece At(double factor) => Share is null ? this : this with
    {
        Amplitude = factor * Share.Amplitude,
        Slope = factor * Share.Slope,
        Share = Share with { Factor = Share.Factor with { Nominal = factor } },
    };
}

/// <summary>What a piece follows from, apart from the other pieces of its wave.</summary>
/// <param name="Factor">On the piece as written; nominally 1.</param>
/// <param name="Amplitude">A at a factor of 1.</param>
/// <param name="Slope">S at a factor of 1.</param>
public sealed record WaveShare(Quantity Factor, double Amplitude, double Slope);
