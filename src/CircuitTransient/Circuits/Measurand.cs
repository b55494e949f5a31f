using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A quantity that can be observed, required, rated or followed.</summary>
public abstract record Measurand;

/// <summary>Voltage of a node less that of another (0 is the reference).</summary>
public sealed record VoltageBetween(int From, int To) : Measurand;

/// <summary>Voltage across a part.</summary>
public sealed record VoltageAcross(int Part) : Measurand;

/// <summary>Current through a part; <paramref name="Delivered"/> turns the sign.</summary>
public sealed record CurrentThrough(int Part, bool Delivered = false) : Measurand;

/// <summary>Power into a part, voltage times current; <paramref name="Delivered"/> turns the sign.</summary>
public sealed record PowerIn(int Part, bool Delivered = false) : Measurand;

/// <summary>Energy in a part: stored in capacitors and inductors, else absorbed since t = 0;
/// <paramref name="Delivered"/> turns the sign.</summary>
public sealed record EnergyIn(int Part, bool Delivered = false) : Measurand;

/// <summary>Energy stored in a mutual inductance.</summary>
public sealed record CouplingEnergy(int Coupling) : Measurand;

/// <summary>∫ i² dt through a part since t = 0 or since the window's start.</summary>
public sealed record JouleIntegral(int Part) : Measurand;

/// <summary>Rate of change of a voltage or current.</summary>
public sealed record RateOfChange(Measurand Of) : Measurand;

/// <summary>A figure read off a waveform; its value is one number.</summary>
/// <param name="Kind">Which.</param>
/// <param name="Of">The waveform.</param>
/// <param name="Argument">Band (fraction) of a settling time, level of a time after which it stays below;
/// else null.</param>
public sealed record Figure(FigureOf Kind, Measurand Of, double? Argument) : Measurand;

/// <summary>The figures that are read off a waveform.</summary>
public enum FigureOf
{
    /// <summary>10–90 % rise time.</summary>
    RiseTime,

    /// <summary>Front time by IEC 60060-1 (voltage) or 1.25 times 10–90 % (current).</summary>
    FrontTime,

    /// <summary>Time to half-value from the virtual origin.</summary>
    TimeToHalfValue,

    /// <summary>Overshoot over the final value.</summary>
    Overshoot,

    /// <summary>Time from which it stays in a band about the final value.</summary>
    SettlingTime,

    /// <summary>Frequency of the complex mode with the largest amplitude.</summary>
    RingFrequency,

    /// <summary>Time of the peak.</summary>
    TimeOfPeak,

    /// <summary>Time after which the magnitude stays below a level.</summary>
    TimeStaysBelow,
}

/// <summary>A closed window of time; null where an end is the study's own.</summary>
public sealed record Window(Instant? From, Instant? To);

/// <summary>Something to observe.</summary>
/// <param name="Name">The label, or the quantity's own name.</param>
/// <param name="Unit">Unit of the value in SI: V, A, W, J, A²s, V/s, A/s, s, Hz; % in per cent.</param>
public sealed record Observation(string Name, string Unit, Measurand Quantity, Window Window, TextSpan Span)
{
    /// <summary>Whether nobody asked for it: with nothing observed, every node voltage is.</summary>
    public bool IsByDefault { get; init; }
}

/// <summary>Something required.</summary>
/// <param name="Statement">The requirement in one line of normalised words, without its reason.</param>
/// <param name="Reason">The user's reason, or null.</param>
/// <param name="Name">The name of the quantity.</param>
/// <param name="Unit">Its unit.</param>
public sealed record Requirement(
    string Statement, string? Reason, string Name, string Unit, Measurand Quantity, Bound Bound,
    Window Window,
    TextSpan Span)
{
    /// <summary>What is judged, without its bound: <c>settling of voltage of bus</c>.</summary>
    public string Judged => Bound is SettlesTo ? $"settling of {Name}" : Name;
}

/// <summary>The bound of a requirement.</summary>
public abstract record Bound;

/// <summary>Limits on the value in the quantity's unit (an overshoot's in per cent), each null where open; a
/// bound in magnitude has both.</summary>
public sealed record Limits(double? Lower, double? Upper) : Bound;

/// <summary>From <paramref name="By"/> on, the quantity stays within a fraction of the target.</summary>
public sealed record SettlesTo(double Target, double Within, Instant By) : Bound;
