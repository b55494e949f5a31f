using CircuitTransient.Text;

namespace CircuitTransient.Studies;

/// <summary>What a study varies, as the user names it.</summary>
public abstract record StudyTarget
{
    /// <summary>Where the user wrote it, such as the text of an option; null where it was not
    /// written.</summary>
    public SourceText? Written { get; init; }

    /// <summary>The name's place in that text.</summary>
    public TextSpan Span { get; init; }
}

/// <summary>Every value that has a tolerance.</summary>
public sealed record EveryTolerance : StudyTarget;

/// <summary>A named value, wherever the circuit uses it.</summary>
public sealed record NamedValueTarget(string Name) : StudyTarget;

/// <summary>A part's own value: a resistance, inductance, capacitance, coupling, gain or level.</summary>
public sealed record PartValueTarget(string Name) : StudyTarget;

/// <summary>The phase at t = 0 of the one sine or cosine of a source, in radians.</summary>
public sealed record SourcePhaseTarget(string Name) : StudyTarget;

/// <summary>The instant of a switch's only closing or opening, in seconds: after t = 0, or after the event it
/// follows.</summary>
public sealed record EventTimeTarget(string Switch, bool Closes) : StudyTarget;
