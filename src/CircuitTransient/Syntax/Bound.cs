using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

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
