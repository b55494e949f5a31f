using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>What stands after a part's value, between commas.</summary>
public abstract record ClauseSyntax(TextSpan Span);

/// <summary><c>charged to V</c>.</summary>
public sealed record ChargedToSyntax(TextSpan Span, ToleratedSyntax Voltage) : ClauseSyntax(Span);

/// <summary><c>carrying I</c>.</summary>
public sealed record CarryingSyntax(TextSpan Span, ToleratedSyntax Current) : ClauseSyntax(Span);

/// <summary><c>rated VALUE</c>.</summary>
public sealed record RatedSyntax(TextSpan Span, ExpressionSyntax Value) : ClauseSyntax(Span);

/// <summary><c>linear up to VALUE</c>.</summary>
public sealed record LinearUpToSyntax(TextSpan Span, ExpressionSyntax Value) : ClauseSyntax(Span);

/// <summary><c>closed resistance R</c>.</summary>
public sealed record ClosedResistanceSyntax(TextSpan Span, ToleratedSyntax Resistance) : ClauseSyntax(Span);

/// <summary><c>open resistance R</c>.</summary>
public sealed record OpenResistanceSyntax(TextSpan Span, ToleratedSyntax Resistance) : ClauseSyntax(Span);

/// <summary><c>closes …</c> or <c>opens …</c>.</summary>
/// <param name="Cut">Whether and how the parting waits for the current.</param>
public sealed record SwitchEventSyntax(TextSpan Span, bool Closes, TriggerSyntax Trigger, CutSyntax? Cut)
    : ClauseSyntax(Span);

/// <summary>What makes a switch act.</summary>
public abstract record TriggerSyntax(TextSpan Span);

/// <summary><c>at T</c>, <c>at T after NAME opens</c>, <c>when NAME closes</c>.</summary>
public sealed record AtInstantSyntax(TextSpan Span, TimeSyntax Time) : TriggerSyntax(Span);

/// <summary><c>when QUANTITY rises above|falls below LEVEL [in magnitude] [after T]</c>.</summary>
public sealed record WhenCrossesSyntax(
    TextSpan Span, QuantitySyntax Quantity, bool Rises, ExpressionSyntax Level, bool InMagnitude,
    TimeSyntax? After)
    : TriggerSyntax(Span);

/// <summary><c>at next current zero</c> (no limit) or <c>once its current is at most I</c>.</summary>
public sealed record CutSyntax(TextSpan Span, ExpressionSyntax? Limit);

/// <summary>The bound of a requirement.</summary>
public abstract record BoundSyntax(TextSpan Span);

/// <summary><c>at most X [in magnitude]</c>, <c>at least X</c>, <c>between X and Y</c>.</summary>
public sealed record LimitsSyntax(
    TextSpan Span, ExpressionSyntax? Lower, ExpressionSyntax? Upper, bool InMagnitude)
    : BoundSyntax(Span);

/// <summary><c>settling of Q to X within P by T</c>.</summary>
public sealed record SettlingSyntax(
    TextSpan Span, ExpressionSyntax Target, ExpressionSyntax Within, TimeSyntax By)
    : BoundSyntax(Span);

/// <summary>A measured quantity as written.</summary>
public abstract record QuantitySyntax(TextSpan Span);

/// <summary><c>voltage of N</c>, <c>voltage from A to B</c>.</summary>
public sealed record NodeVoltageSyntax(
    TextSpan Span, NameSyntax Node, NameSyntax? Against) : QuantitySyntax(Span);

/// <summary>The quantities that belong to one part.</summary>
public enum PartQuantityKind
{
    /// <summary><c>voltage across P</c>.</summary>
    VoltageAcross,

    /// <summary><c>current through P</c>.</summary>
    CurrentThrough,

    /// <summary><c>current delivered by S</c>.</summary>
    CurrentDelivered,

    /// <summary><c>power in P</c>.</summary>
    PowerIn,

    /// <summary><c>power delivered by S</c>.</summary>
    PowerDelivered,

    /// <summary><c>energy in P</c>.</summary>
    EnergyIn,

    /// <summary><c>energy delivered by S</c>.</summary>
    EnergyDelivered,

    /// <summary><c>I²t through P</c>.</summary>
    JouleIntegral,
}

/// <summary>A quantity of one part.</summary>
public sealed record PartQuantitySyntax(
    TextSpan Span, PartQuantityKind Kind, NameSyntax Part) : QuantitySyntax(Span);

/// <summary><c>rate of change of QUANTITY</c>.</summary>
public sealed record RateSyntax(TextSpan Span, QuantitySyntax Of) : QuantitySyntax(Span);

/// <summary>The figures that are read off a waveform.</summary>
public enum FigureKind
{
    /// <summary><c>rise time of</c>.</summary>
    RiseTime,

    /// <summary><c>front time of</c>.</summary>
    FrontTime,

    /// <summary><c>time to half-value of</c>.</summary>
    TimeToHalfValue,

    /// <summary><c>overshoot of</c>.</summary>
    Overshoot,

    /// <summary><c>settling time of Q within 2 %</c>.</summary>
    SettlingTime,

    /// <summary><c>ring frequency of</c>.</summary>
    RingFrequency,

    /// <summary><c>time of peak of</c>.</summary>
    TimeOfPeak,

    /// <summary><c>time after which Q stays below X</c>.</summary>
    TimeStaysBelow,
}

/// <summary>A figure read off a waveform.</summary>
/// <param name="Argument">The band of a settling time or the level of a time
/// after which it stays below.</param>
public sealed record FigureSyntax(
    TextSpan Span, FigureKind Kind, QuantitySyntax Of, ExpressionSyntax? Argument)
    : QuantitySyntax(Span);
