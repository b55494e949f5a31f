using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sizes;

/// <summary>What a sizing is asked for.</summary>
/// <param name="Parts">The one or two parts whose values are sought.</param>
/// <param name="Series">The series the values are to be of; null for any value.</param>
/// <param name="Aim">Which of the values that hold is proposed.</param>
/// <param name="WithSpread">Whether everything must hold at every corner of the tolerances too.</param>
public sealed record SizeRequest(
    ImmutableArray<SizedPartSyntax> Parts, PreferredSeries? Series, SizeAim Aim, bool WithSpread);

/// <summary>Which of the values that hold is proposed.</summary>
public abstract record SizeAim;

/// <summary>The one whose nearest bound is farthest, as a fraction of that bound.</summary>
public sealed record MostRoom : SizeAim;

/// <summary>The one that makes something least, or greatest.</summary>
/// <param name="Of">A sized part's name, for its value, or a quantity such as <c>energy in Rsn</c>.</param>
/// <param name="IsGreatest">Whether it is made greatest instead.</param>
public sealed record Extremal(SourceText Of, bool IsGreatest) : SizeAim;
