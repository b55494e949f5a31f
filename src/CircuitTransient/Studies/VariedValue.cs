using CircuitTransient.Circuits;

namespace CircuitTransient.Studies;

/// <summary>A value that a study varies.</summary>
/// <param name="Name">The user's name for it: <c>Rpre</c>, <c>Cbus initial charge</c>, <c>phase of
/// Grid</c>, <c>Kmain closes</c>.</param>
/// <param name="Unit">Its SI unit.</param>
/// <param name="Nominal">What the circuit file says.</param>
/// <param name="Tolerance">Its tolerance; null where none is written.</param>
/// <param name="Kind">What it is.</param>
public sealed record VariedValue(
    string Name, string Unit, double Nominal, Tolerance? Tolerance, VariedKind Kind)
{
    /// <summary>Index in <see cref="Circuit.Parameters"/>; −1 for a phase or an instant.</summary>
    public int Parameter { get; init; } = -1;

    /// <summary>Index of the source in <see cref="Circuit.Parts"/> whose phase it is; else −1.</summary>
    public int Source { get; init; } = -1;

    /// <summary>The event whose instant it is; else null.</summary>
    public EventReference? Event { get; init; }
}

/// <summary>The kinds of values a study varies.</summary>
public enum VariedKind
{
    /// <summary>A parameter of the circuit that formulas read.</summary>
    Parameter,

    /// <summary>A named value that the text is read anew with, so that waves and instants follow it
    /// too.</summary>
    NamedValue,

    /// <summary>The phase of a source.</summary>
    SourcePhase,

    /// <summary>The instant of an event.</summary>
    EventTime,
}
