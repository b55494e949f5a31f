using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>The kinds of what a scan varies.</summary>
public enum ScannedKind
{
    /// <summary>A named value.</summary>
    Value,

    /// <summary>A part's own value.</summary>
    Part,

    /// <summary>The phase of a source's sines.</summary>
    Phase,

    /// <summary>The instant of a switch's event.</summary>
    Event,
}

/// <summary>What a scan varies and over which range, as written: <c>Rsn from 10 Ω to 1 kΩ in 50
/// steps</c>.</summary>
/// <param name="Source">The text it is written in.</param>
/// <param name="Name">The full name of the value, part, source or switch, without quotes.</param>
/// <param name="NameSpan">Where the name stands; of an event, its <c>closes</c> or <c>opens</c>
/// included.</param>
/// <param name="Closes">Whether the event is a closing; false for what is no event.</param>
/// <param name="Range">The range; null where only the name was written.</param>
public sealed record ScannedSyntax(
    SourceText Source, ScannedKind Kind, string Name, TextSpan NameSpan, bool Closes, RangeSyntax? Range);

/// <summary>A range and how finely it is divided.</summary>
public sealed record RangeSyntax(TextSpan Span, NumberSyntax From, NumberSyntax To, SpacingSyntax Spacing);

/// <summary>How a range is divided.</summary>
public abstract record SpacingSyntax(TextSpan Span);

/// <summary><c>in 50 steps</c>: equal ones, both ends included.</summary>
public sealed record StepCountSyntax(TextSpan Span, int Count) : SpacingSyntax(Span);

/// <summary><c>in 5° steps</c>: of one width, from the start on.</summary>
public sealed record StepWidthSyntax(TextSpan Span, NumberSyntax Width) : SpacingSyntax(Span);

/// <summary><c>in 20 steps a decade</c>: each the same factor.</summary>
public sealed record StepsADecadeSyntax(TextSpan Span, int Count) : SpacingSyntax(Span);

/// <summary><c>in E12</c>: the preferred values of IEC 60063 in the range.</summary>
/// <param name="Series">How many values a decade: 3, 6, 12, 24, 48, 96 or 192.</param>
public sealed record PreferredValuesSyntax(TextSpan Span, int Series) : SpacingSyntax(Span);

/// <summary>By how much the instant of an event scatters, as written: <c>Kmain closes by 0.5
/// ms</c>.</summary>
/// <param name="Switch">The switch; null where only the time was written.</param>
/// <param name="NameSpan">Where the event is named.</param>
/// <param name="By">How far to either side, in seconds.</param>
public sealed record ScatterSyntax(
    SourceText Source, string? Switch, TextSpan NameSpan, bool Closes, NumberSyntax By);
