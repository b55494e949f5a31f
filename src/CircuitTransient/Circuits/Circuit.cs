using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A checked circuit: every name looked up, every value in SI, ready for equations.</summary>
/// <param name="Source">The text it came from.</param>
/// <param name="Title">The title, if one was given.</param>
/// <param name="Notes">The notes in order.</param>
/// <param name="Nodes">Node names; the reference conductor is node 0.</param>
/// <param name="Parts">All parts, in the order written.</param>
/// <param name="Couplings">Mutual inductances.</param>
/// <param name="Parameters">Named values with a tolerance and every other toleranced value: what a study may
/// vary.</param>
/// <param name="Observations">What is observed; never empty (every node voltage where nothing was
/// asked).</param>
/// <param name="Requirements">What is required.</param>
/// <param name="StartsSettled">Whether constants and sines have been on for ever before t = 0.</param>
/// <param name="Until">End of the study in seconds; null where it follows from the slowest mode.</param>
public sealed record Circuit(
    SourceText Source,
    string? Title,
    ImmutableArray<string> Notes,
    ImmutableArray<string> Nodes,
    ImmutableArray<Part> Parts,
    ImmutableArray<Coupling> Couplings,
    ImmutableArray<Parameter> Parameters,
    ImmutableArray<Observation> Observations,
    ImmutableArray<Requirement> Requirements,
    bool StartsSettled,
    double? Until);

/// <summary>A value a study may vary: a named value or a part's own value that has a tolerance.</summary>
/// <param name="Name">The user's name: a value's, or a part's with what of it (<c>Rpre</c>, <c>Cbus initial
/// charge</c>).</param>
/// <param name="Unit">Its SI unit.</param>
/// <param name="Nominal">Nominal value in SI.</param>
/// <param name="Tolerance">Its tolerance; null where none is written.</param>
/// <param name="Span">Where its owner's name stands.</param>
/// <param name="ValueSpan">Where the value itself is written, without its tolerance.</param>
/// <param name="ToleranceSpan">Where its tolerance is written; null where none is.</param>
public sealed record Parameter(
    string Name, string Unit, double Nominal, Tolerance? Tolerance, TextSpan Span, TextSpan ValueSpan,
    TextSpan? ToleranceSpan)
{
    /// <summary>The name of the value or part it belongs to.</summary>
    public required string Owner { get; init; }

    /// <summary>What of a part it is, <c>initial charge</c>; null for a part's or a named value
    /// itself.</summary>
    public string? Aspect { get; init; }

    /// <summary>Whether it is a named value, not a part's.</summary>
    public bool IsNamedValue { get; init; }

    /// <summary>Whether it is a named value from which nothing in the circuit follows.</summary>
    public bool IsUsedNowhere { get; init; }
}

/// <summary>The range of a value: absolute limits in SI, and the distribution between them.</summary>
public sealed record Tolerance(double Lowest, double Highest, bool IsNormal);

/// <summary>A number that may depend on parameters.</summary>
/// <param name="Nominal">Its value with all parameters nominal, in SI.</param>
/// <param name="Formula">How it follows from parameters; null where it depends on none.</param>
public sealed record Quantity(double Nominal, Formula? Formula = null)
{
    /// <summary>A quantity that depends on no parameter.</summary>
    public static implicit operator Quantity(double value) => new(value);
}

/// <summary>How a number follows from parameters.</summary>
public abstract record Formula;

/// <summary>A fixed number.</summary>
public sealed record NumberFormula(double Value) : Formula;

/// <summary>The value of the parameter with that index in <see cref="Circuit.Parameters"/>.</summary>
public sealed record ParameterFormula(int Index) : Formula;

/// <summary>Two operands joined by one of <c>+ - * / ^</c>.</summary>
public sealed record BinaryFormula(char Operator, Formula Left, Formula Right) : Formula;

/// <summary><c>sqrt</c>, <c>exp</c> or <c>ln</c> of a formula.</summary>
public sealed record CallFormula(string Function, Formula Argument) : Formula;

/// <summary>A mutual inductance between two coils, the dot at each coil's first-named terminal.</summary>
/// <param name="Name">The user's name.</param>
/// <param name="First">Index of the first coil in <see cref="Circuit.Parts"/>.</param>
/// <param name="Second">Index of the second coil.</param>
/// <param name="Value">Coupling factor, or mutual inductance in henries.</param>
/// <param name="IsFactor">Whether <paramref name="Value"/> is a factor: M = k √(L1 L2).</param>
/// <param name="Span">Where it stands.</param>
public sealed record Coupling(
    string Name, int First, int Second, Quantity Value, bool IsFactor, TextSpan Span);
