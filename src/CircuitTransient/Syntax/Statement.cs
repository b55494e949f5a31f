using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>A circuit file as written: its statements in order, nothing looked up.</summary>
public sealed record CircuitSyntax(SourceText Source, ImmutableArray<Statement> Statements);

/// <summary>One statement as written.</summary>
/// <param name="Span">From its first character to its last.</param>
public abstract record Statement(TextSpan Span);

/// <summary>A name as written.</summary>
/// <param name="Text">The name without quotes and without its index.</param>
/// <param name="Span">Where it stands.</param>
/// <param name="Index">The bracketed index of a name in a repetition, such as <c>[k+1]</c>.</param>
/// <param name="IsQuoted">Whether it was written in quotes.</param>
/// <param name="Owner">The placed assembly it stands in: <c>Stage1</c> of <c>Stage1/R1</c>;
/// <paramref name="Text"/> is then the last name alone.</param>
public sealed record NameSyntax(
    string Text, TextSpan Span, IndexSyntax? Index = null, bool IsQuoted = false, NameSyntax? Owner = null);

/// <summary>A bracketed index: a number, or a counter with an offset (<c>[k-1]</c>).</summary>
public sealed record IndexSyntax(string? Counter, int Offset, TextSpan Span);

/// <summary>A statement that could not be read, kept so that nothing is said about
/// names it would have made.</summary>
/// <param name="KeyWord">Its first word, or the key word that one most likely meant: <c>resistor</c>.</param>
/// <param name="Name">The name it gives, if that far it could be read.</param>
/// <param name="Mentions">Every name and whole number in it: nodes it may
/// touch, parts it may speak of.</param>
public sealed record UnreadableStatement(
    TextSpan Span, string KeyWord, NameSyntax? Name, ImmutableArray<string> Mentions) : Statement(Span);

/// <summary><c>circuit "title"</c>.</summary>
public sealed record TitleStatement(TextSpan Span, string Title) : Statement(Span);

/// <summary><c>note "text"</c>.</summary>
public sealed record NoteStatement(TextSpan Span, string Note) : Statement(Span);

/// <summary><c>reference is NODE</c>.</summary>
public sealed record ReferenceStatement(TextSpan Span, NameSyntax Node) : Statement(Span);

/// <summary><c>value NAME : EXPRESSION TOLERANCE</c>.</summary>
public sealed record ValueStatement(TextSpan Span, NameSyntax Name, ToleratedSyntax Value) : Statement(Span);

/// <summary>The kinds of two-terminal parts that carry one value.</summary>
public enum SimplePartKind
{
    /// <summary>Has a resistance.</summary>
    Resistor,

    /// <summary>Has a capacitance.</summary>
    Capacitor,

    /// <summary>Has an inductance.</summary>
    Inductor,
}

/// <summary>Terminals of a two-terminal part; <paramref name="To"/> is null for <c>at N</c>.</summary>
public sealed record TerminalsSyntax(NameSyntax From, NameSyntax? To);

/// <summary>A resistor, capacitor or inductor.</summary>
public sealed record SimplePartStatement(
    TextSpan Span, SimplePartKind Kind, NameSyntax Name, TerminalsSyntax Terminals, ToleratedSyntax Value,
    ImmutableArray<ClauseSyntax> Clauses) : Statement(Span);

/// <summary>An independent source; its unit says voltage or current.</summary>
public sealed record SourceStatement(
    TextSpan Span, NameSyntax Name, TerminalsSyntax Terminals, WaveSyntax Wave,
    ImmutableArray<ClauseSyntax> Clauses) : Statement(Span);

/// <summary><c>dependent source NAME terminals : GAIN times QUANTITY</c>.</summary>
public sealed record DependentSourceStatement(
    TextSpan Span, NameSyntax Name, TerminalsSyntax Terminals, ExpressionSyntax Gain, QuantitySyntax Control,
    ImmutableArray<ClauseSyntax> Clauses) : Statement(Span);

/// <summary>A switch: its first position and its events in the order written.</summary>
public sealed record SwitchStatement(
    TextSpan Span, NameSyntax Name, TerminalsSyntax Terminals, bool IsClosed,
    ImmutableArray<ClauseSyntax> Clauses) : Statement(Span);

/// <summary><c>coupling NAME of COIL and COIL : factor or mutual inductance</c>.</summary>
public sealed record CouplingStatement(
    TextSpan Span, NameSyntax Name, NameSyntax First, NameSyntax Second, ToleratedSyntax Value)
    : Statement(Span);

/// <summary><c>transformer NAME primary from A to B, secondary from C to D : turns N1 to N2</c>.</summary>
public sealed record TransformerStatement(
    TextSpan Span, NameSyntax Name, TerminalsSyntax Primary, TerminalsSyntax Secondary,
    ExpressionSyntax PrimaryTurns, ExpressionSyntax SecondaryTurns,
    ImmutableArray<ClauseSyntax> Clauses) : Statement(Span);

/// <summary><c>observe QUANTITY as "label" from T to T</c>.</summary>
public sealed record ObserveStatement(
    TextSpan Span, QuantitySyntax Quantity, string? Label, WindowSyntax Window) : Statement(Span);

/// <summary><c>require QUANTITY BOUND from T to T because "reason"</c>.</summary>
public sealed record RequireStatement(
    TextSpan Span, QuantitySyntax Quantity, BoundSyntax Bound, WindowSyntax Window, string? Reason)
    : Statement(Span);

/// <summary><c>start as stated</c> or <c>start settled</c>.</summary>
public sealed record StartStatement(TextSpan Span, bool IsSettled) : Statement(Span);

/// <summary><c>until T</c>.</summary>
public sealed record UntilStatement(TextSpan Span, ExpressionSyntax Time) : Statement(Span);

/// <summary><c>repeat N as k … end</c>.</summary>
public sealed record RepeatStatement(
    TextSpan Span, ExpressionSyntax Count, string Counter, ImmutableArray<Statement> Body) : Statement(Span);

/// <summary><c>assembly NAME with terminals a, b … end</c>.</summary>
public sealed record AssemblyStatement(
    TextSpan Span, NameSyntax Name, ImmutableArray<NameSyntax> Terminals,
    ImmutableArray<Statement> Body) : Statement(Span);

/// <summary><c>place ASSEMBLY as NAME with terminal = node, value = expression</c>.</summary>
public sealed record PlaceStatement(
    TextSpan Span, NameSyntax Assembly, NameSyntax Name, ImmutableArray<AssignmentSyntax> Assignments)
    : Statement(Span);

/// <summary><c>inner = outer</c> of a placed assembly: a node for a terminal, an
/// expression for a value.</summary>
/// <param name="Node">The right side read as a name; null where it can only be an expression.</param>
/// <param name="Value">The right side read as an expression; null where it can only be a name.</param>
public sealed record AssignmentSyntax(
    TextSpan Span, NameSyntax Inner, NameSyntax? Node, ToleratedSyntax? Value);
