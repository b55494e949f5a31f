using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

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
/// <param name="Argument">The band of a settling time or the level of a time after which it stays
/// below.</param>
public sealed record FigureSyntax(
    TextSpan Span, FigureKind Kind, QuantitySyntax Of, ExpressionSyntax? Argument)
    : QuantitySyntax(Span);
