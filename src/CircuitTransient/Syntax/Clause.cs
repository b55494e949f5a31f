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
