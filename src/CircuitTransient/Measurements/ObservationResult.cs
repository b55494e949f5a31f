using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Breakdowns;

namespace CircuitTransient.Measurements;

/// <summary>An observed quantity over the study.</summary>
/// <param name="Start">Value just after the window's start.</param>
/// <param name="End">Value at the window's end.</param>
/// <param name="Final">Limit for t → ∞ of the last interval with its sources as they stand; null where there
/// is none.</param>
/// <param name="EndsRising">Whether the greatest magnitude lies at the end of the study and still rises past
/// what it shows; never so for an integral over time.</param>
/// <param name="Contributions">One for each cause; quadratic quantities have one more, named
/// <c>joint</c>.</param>
/// <param name="After">The breakdown since an event; null where not asked for or not defined.</param>
/// <param name="Samples">The instants asked for with <c>--at</c>.</param>
/// <param name="Total">The waveform at <see cref="TransientResult.SampleTimes"/>; NaN where
/// undetermined.</param>
/// <param name="ByCause">The waveform of each contribution, in the order of
/// <paramref name="Contributions"/>.</param>
public sealed record ObservationResult(
    string Name,
    string Unit,
    double? Start,
    double? End,
    double? Final,
    Extreme Max,
    Extreme Min,
    bool EndsRising,
    ImmutableArray<Contribution> Contributions,
    ContributionsAfter? After,
    ImmutableArray<SampleAt> Samples,
    ImmutableArray<double> Total,
    ImmutableArray<ImmutableArray<double>> ByCause)
{
    /// <summary>The pulses that have a share worth naming in an extreme, where sources are broken down by
    /// edge; none of a product.</summary>
    public ImmutableArray<PulseShare> Pulses { get; init; } = [];

    /// <summary>What each switching has done to the extremes; null where not asked for.</summary>
    public SwitchingBreakdowns? BySwitching { get; init; }

    /// <summary>The extremes by causes and modes; null where the quantity is undetermined.</summary>
    public ModeBreakdowns? ByMode { get; init; }

    /// <summary>From when to when it was observed, in seconds; null for the whole study.</summary>
    public (double From, double To)? Window { get; init; }

    /// <summary>The extreme of greater magnitude.</summary>
    public Extreme Greatest => Math.Abs(Min.Value ?? 0) > Math.Abs(Max.Value ?? 0) ? Min : Max;
}

/// <summary>A waveform as a sum of terms, each of which grows with the scale of one cause or with those of
/// two.</summary>
/// <param name="From">Since when an integral gathers, in seconds.</param>
public sealed record FollowedWave(Measurand Quantity, double From, ImmutableArray<WaveTerm> Terms)
{
    /// <summary>Where the waveform is a product, what the product of two sums of terms is multiplied by: the
    /// first half of the terms is one factor, the second half the other; one term a cause, the sum is
    /// squared. Null where the terms add up to it.</summary>
    public double? Factor { get; init; }
}

/// <summary>A term of a waveform.</summary>
/// <param name="Cause">Index of the cause it grows with.</param>
/// <param name="WithCause">Index of the other cause it grows with; null where it grows with one only.</param>
/// <param name="Samples">Its values at <see cref="TransientResult.SampleTimes"/>.</param>
public sealed record WaveTerm(int Cause, int? WithCause, ImmutableArray<double> Samples);

/// <summary>What one cause has in an observation.</summary>
/// <param name="AtMax">Its value at the total's maximum.</param>
/// <param name="AtMin">Its value at the total's minimum.</param>
/// <param name="OwnMax">Its own greatest value.</param>
/// <param name="OwnMin">Its own least value.</param>
/// <param name="MaxWithout">Greatest value of the total without it.</param>
/// <param name="MinWithout">Least value of the total without it.</param>
public sealed record Contribution(
    string Cause, double? AtMax, double? AtMin, TimedValue? OwnMax, TimedValue? OwnMin,
    TimedValue? MaxWithout,
    TimedValue? MinWithout);

/// <summary>What the edges of one pulse have together in an observation.</summary>
/// <param name="Pulse">As the causes name it: <c>Feed pulse 3 from 131 µs</c>.</param>
/// <param name="AtMax">Its value at the total's maximum; null where that is infinite.</param>
/// <param name="AtMin">Its value at the total's minimum.</param>
/// <param name="MaxWithout">Greatest value of the total without the pulse.</param>
/// <param name="MinWithout">Least value of the total without the pulse.</param>
public sealed record PulseShare(
    string Pulse, double? AtMax, double? AtMin, TimedValue MaxWithout, TimedValue MinWithout);

/// <summary>The breakdown since an event, at both extremes; null where the event comes after the
/// extreme.</summary>
public sealed record ContributionsAfter(SinceEvent? AtMax, SinceEvent? AtMin);

/// <summary>What the stored quantities at an event and the sources from then on have in a value.</summary>
public sealed record SinceEvent(string Event, double Time, ImmutableArray<CauseValue> Parts);

/// <summary>A cause and its value.</summary>
public sealed record CauseValue(string Cause, double? Value)
{
    /// <summary>The cause's own size at the event: the source's value, or what the part held; null for what
    /// is no single cause.</summary>
    public double? Strength { get; init; }

    /// <summary>Unit of the strength: V or A.</summary>
    public string StrengthUnit { get; init; } = "V";
}

/// <summary>An exact value at an instant asked for; contributions in the order of the
/// observation's.</summary>
public sealed record SampleAt(double Time, double? Value, ImmutableArray<double?> ByCause);

/// <summary>A figure read off a waveform.</summary>
public sealed record FigureResult(string Name, string Unit, double? Value, string Definition);
