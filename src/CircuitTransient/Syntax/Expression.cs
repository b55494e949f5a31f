using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>An expression as written.</summary>
public abstract record ExpressionSyntax(TextSpan Span);

/// <summary>A number with or without a unit, in SI.</summary>
/// <param name="Value">The number times its prefix, in the SI unit.</param>
/// <param name="Dimension">What the unit measures; <see cref="Text.Dimension.None"/> without a unit.</param>
/// <param name="HasUnit">Whether a unit was written (a degree, radian or per cent counts).</param>
/// <param name="Mark">The text, where it reads as a marking code of IEC 60062 such
/// as <c>4k7</c>, else null.</param>
public sealed record NumberSyntax(
    TextSpan Span, double Value, Dimension Dimension, bool HasUnit, string? Mark = null)
    : ExpressionSyntax(Span);

/// <summary>The name of a value, of a counter, or <c>pi</c>.</summary>
public sealed record NameExpressionSyntax(TextSpan Span, NameSyntax Name) : ExpressionSyntax(Span);

/// <summary>A minus sign before an operand.</summary>
public sealed record NegationSyntax(TextSpan Span, ExpressionSyntax Operand) : ExpressionSyntax(Span);

/// <summary>Two operands joined by one of <c>+ - * / ^</c>.</summary>
public sealed record BinarySyntax(TextSpan Span, char Operator, ExpressionSyntax Left, ExpressionSyntax Right)
    : ExpressionSyntax(Span);

/// <summary><c>sqrt(…)</c>, <c>exp(…)</c> or <c>ln(…)</c>.</summary>
public sealed record CallSyntax(
    TextSpan Span, string Function, ExpressionSyntax Argument) : ExpressionSyntax(Span);

/// <summary>A value with its tolerance, if one was written.</summary>
public sealed record ToleratedSyntax(ExpressionSyntax Value, ToleranceSyntax? Tolerance);

/// <summary>A tolerance as written: relative limits, or absolute ones (<c>between A and B</c>).</summary>
/// <param name="Lower">Lower limit: a signed fraction of the value (−0.05), or an absolute value.</param>
/// <param name="Upper">Upper limit, likewise.</param>
/// <param name="IsAbsolute">Whether the limits are values instead of fractions.</param>
/// <param name="IsNormal">Whether the range is ±3 sigma of a normal distribution cut there.</param>
public sealed record ToleranceSyntax(
    TextSpan Span, ExpressionSyntax Lower, ExpressionSyntax Upper, bool IsAbsolute, bool IsNormal);

/// <summary>A wave as written: signed pieces that add.</summary>
public sealed record WaveSyntax(
    TextSpan Span, ImmutableArray<WaveTermSyntax> Terms, ToleranceSyntax? Tolerance);

/// <summary>One piece of a wave with its sign.</summary>
public sealed record WaveTermSyntax(bool IsSubtracted, WavePieceSyntax Piece);

/// <summary>A piece of a wave.</summary>
public abstract record WavePieceSyntax(TextSpan Span);

/// <summary>A constant.</summary>
public sealed record ConstantSyntax(TextSpan Span, ExpressionSyntax Level) : WavePieceSyntax(Span);

/// <summary><c>step of V at T</c>.</summary>
public sealed record StepSyntax(
    TextSpan Span, ExpressionSyntax Level, TimeSyntax? At) : WavePieceSyntax(Span);

/// <summary><c>rectangular pulse of V from T1 to T2</c>.</summary>
public sealed record PulseSyntax(TextSpan Span, ExpressionSyntax Level, TimeSyntax? From, TimeSyntax To)
    : WavePieceSyntax(Span);

/// <summary><c>pulse train of V width W every P from T count N</c>.</summary>
public sealed record PulseTrainSyntax(
    TextSpan Span, ExpressionSyntax Level, ExpressionSyntax Width, ExpressionSyntax Every, TimeSyntax? From,
    ExpressionSyntax Count) : WavePieceSyntax(Span);

/// <summary><c>ramp of V from T1 to T2</c>.</summary>
public sealed record RampSyntax(TextSpan Span, ExpressionSyntax Level, TimeSyntax? From, TimeSyntax To)
    : WavePieceSyntax(Span);

/// <summary><c>sine|cosine of V [rms] at F phase A from T1 until T2 decaying in TAU</c>.</summary>
public sealed record SineSyntax(
    TextSpan Span, bool IsCosine, ExpressionSyntax Amplitude, bool IsRms, ExpressionSyntax Frequency,
    ExpressionSyntax? Phase, TimeSyntax? From, TimeSyntax? Until, ExpressionSyntax? TimeConstant)
    : WavePieceSyntax(Span);

/// <summary><c>decay of V in TAU from T</c>.</summary>
public sealed record DecaySyntax(
    TextSpan Span, ExpressionSyntax Level, ExpressionSyntax TimeConstant, TimeSyntax? From)
    : WavePieceSyntax(Span);

/// <summary><c>double exponential of V front T1 half-value T2 from T</c>, also written
/// <c>impulse of V 1.2/50 µs</c>.</summary>
public sealed record ImpulseSyntax(
    TextSpan Span, ExpressionSyntax Peak, ExpressionSyntax Front, ExpressionSyntax HalfValue,
    TimeSyntax? From)
    : WavePieceSyntax(Span);

/// <summary><c>straight lines (0 s, 0 V) (1 ms, 5 V)</c>.</summary>
public sealed record StraightLinesSyntax(
    TextSpan Span, ImmutableArray<PointSyntax> Points) : WavePieceSyntax(Span);

/// <summary>A point of straight lines.</summary>
public sealed record PointSyntax(TextSpan Span, ExpressionSyntax Time, ExpressionSyntax Level);

/// <summary><c>straight lines in file "surge.csv"</c>.</summary>
public sealed record StraightLinesFileSyntax(TextSpan Span, string Path) : WavePieceSyntax(Span);

/// <summary>An instant as written.</summary>
public abstract record TimeSyntax(TextSpan Span);

/// <summary>An instant given as a value.</summary>
public sealed record TimeValueSyntax(TextSpan Span, ExpressionSyntax Time) : TimeSyntax(Span);

/// <summary><c>T after NAME closes|opens</c>, or <c>when NAME closes|opens</c> (no delay).</summary>
public sealed record TimeAfterSyntax(TextSpan Span, ExpressionSyntax? Delay, NameSyntax Switch, bool Closes)
    : TimeSyntax(Span);

/// <summary>The window of an observation or requirement; null where an end is not said.</summary>
public sealed record WindowSyntax(TimeSyntax? From, TimeSyntax? To);
