using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A part between two nodes. Its voltage is that of <see cref="From"/> less that of
/// <see cref="To"/>; its current is positive flowing from <see cref="From"/> to <see cref="To"/> inside
/// it.</summary>
public abstract record Part
{
    /// <summary>The user's name.</summary>
    public required string Name { get; init; }

    /// <summary>Index of the first-named node.</summary>
    public required int From { get; init; }

    /// <summary>Index of the second-named node.</summary>
    public required int To { get; init; }

    /// <summary>Where the statement stands.</summary>
    public required TextSpan Span { get; init; }

    /// <summary>What the part is rated for.</summary>
    public ImmutableArray<Rating> Ratings { get; init; } = [];

    /// <summary>How far the value may be believed; null where nothing was said.</summary>
    public LinearLimit? LinearUpTo { get; init; }

    /// <summary>The kind as the language writes it.</summary>
    public abstract string Kind { get; }
}

/// <summary>A resistor.</summary>
/// <param name="Resistance">In ohms; negative for an incremental resistance.</param>
public sealed record Resistor(Quantity Resistance) : Part
{
    /// <inheritdoc/>
    public override string Kind => "resistor";
}

/// <summary>A capacitor.</summary>
/// <param name="Capacitance">In farads.</param>
/// <param name="InitialVoltage">What it is charged to at t = 0⁻, in volts; null where nothing was
/// stated.</param>
public sealed record Capacitor(Quantity Capacitance, Quantity? InitialVoltage) : Part
{
    /// <inheritdoc/>
    public override string Kind => "capacitor";
}

/// <summary>An inductor.</summary>
/// <param name="Inductance">In henries.</param>
/// <param name="InitialCurrent">What it carries at t = 0⁻, in amperes; null where nothing was stated.</param>
public sealed record Inductor(Quantity Inductance, Quantity? InitialCurrent) : Part
{
    /// <inheritdoc/>
    public override string Kind => "inductor";
}

/// <summary>An independent voltage source.</summary>
/// <param name="Wave">Its voltage over time, in volts.</param>
public sealed record VoltageSource(Wave Wave) : Part
{
    /// <inheritdoc/>
    public override string Kind => "source";
}

/// <summary>An independent current source.</summary>
/// <param name="Wave">Its current over time, in amperes.</param>
public sealed record CurrentSource(Wave Wave) : Part
{
    /// <inheritdoc/>
    public override string Kind => "source";
}

/// <summary>A source whose voltage or current is a multiple of another voltage or current.</summary>
/// <param name="SetsVoltage">Whether it sets its voltage (else its current).</param>
/// <param name="Gain">The multiple, in SI.</param>
/// <param name="Control">What it follows: a node voltage, a voltage between nodes or a part's
/// current.</param>
public sealed record DependentSource(bool SetsVoltage, Quantity Gain, Measurand Control) : Part
{
    /// <inheritdoc/>
    public override string Kind => "dependent source";
}

/// <summary>An ideal transformer; <see cref="Part.From"/> and <see cref="Part.To"/> are the
/// primary's.</summary>
/// <param name="SecondaryFrom">First node of the secondary.</param>
/// <param name="SecondaryTo">Second node of the secondary.</param>
/// <param name="Ratio">Primary voltage over secondary voltage.</param>
public sealed record IdealTransformer(int SecondaryFrom, int SecondaryTo, double Ratio) : Part
{
    /// <inheritdoc/>
    public override string Kind => "transformer";
}

/// <summary>A switch.</summary>
/// <param name="StartsClosed">Its position before its first event.</param>
/// <param name="ClosedResistance">In ohms; null for an ideal contact.</param>
/// <param name="OpenResistance">In ohms; null for an ideal gap.</param>
/// <param name="Events">Its events in time order, alternating.</param>
public sealed record Switch(
    bool StartsClosed, Quantity? ClosedResistance, Quantity? OpenResistance,
    ImmutableArray<SwitchEvent> Events) : Part
{
    /// <inheritdoc/>
    public override string Kind => "switch";

    /// <summary>Whether it acts at 0 s: that is a switching with its own impulse, before which nothing
    /// moves.</summary>
    public bool ActsAtStart() =>
        Events is [{ Trigger: AtInstant { Instant: { Delay.Nominal: 0, After: null } } }, ..];
}

/// <summary>A declared closing or opening.</summary>
/// <param name="Closes">Whether it closes.</param>
/// <param name="Trigger">When it acts.</param>
/// <param name="CutAtMost">Null: parts at once. Zero: at the next current zero. Else: once its current is at
/// most that many amperes in magnitude.</param>
/// <param name="Span">Where it stands.</param>
public sealed record SwitchEvent(bool Closes, Trigger Trigger, double? CutAtMost, TextSpan Span);

/// <summary>What makes a switch act.</summary>
public abstract record Trigger;

/// <summary>At a fixed instant, or a delay after an event of another switch.</summary>
public sealed record AtInstant(Instant Instant) : Trigger;

/// <summary>When a quantity passes a level.</summary>
/// <param name="Quantity">The watched quantity.</param>
/// <param name="Rises">Rises above, else falls below.</param>
/// <param name="Level">In SI.</param>
/// <param name="InMagnitude">Whether the magnitude is watched.</param>
/// <param name="After">Not watched before this instant.</param>
public sealed record WhenCrosses(
    Measurand Quantity, bool Rises, double Level, bool InMagnitude, Instant? After) : Trigger;

/// <summary>An instant: a delay after t = 0 or after an event.</summary>
/// <param name="Delay">In seconds.</param>
/// <param name="After">The event; null for t = 0.</param>
public sealed record Instant(Quantity Delay, EventReference? After);

/// <summary>One event of one switch.</summary>
/// <param name="Part">Index of the switch in <see cref="Circuit.Parts"/>.</param>
/// <param name="Event">Index of the event in <see cref="Switch.Events"/>.</param>
public sealed record EventReference(int Part, int Event);

/// <summary>A rating: what a part can bear.</summary>
/// <param name="Kind">What is rated.</param>
/// <param name="Limit">In SI.</param>
/// <param name="Span">Where it stands.</param>
public sealed record Rating(RatingKind Kind, double Limit, TextSpan Span);

/// <summary>What can be rated; the dimension of the value says which.</summary>
public enum RatingKind
{
    /// <summary>Peak voltage, magnitude, V.</summary>
    PeakVoltage,

    /// <summary>Peak current, magnitude, A.</summary>
    PeakCurrent,

    /// <summary>Mean power over the study, W.</summary>
    MeanPower,

    /// <summary>Energy absorbed or stored, J.</summary>
    Energy,

    /// <summary>Joule integral, A²s.</summary>
    JouleIntegral,

    /// <summary>Steepest voltage, V/s.</summary>
    VoltageRate,

    /// <summary>Steepest current, A/s.</summary>
    CurrentRate,
}

/// <summary>How far a part's value may be believed.</summary>
/// <param name="Limit">In volts or amperes.</param>
/// <param name="IsVoltage">Whether the limit is on the voltage (else the current).</param>
/// <param name="Span">Where it stands.</param>
public sealed record LinearLimit(double Limit, bool IsVoltage, TextSpan Span);
