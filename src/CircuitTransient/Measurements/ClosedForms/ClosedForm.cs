using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.ClosedForms;

/// <summary>A linear quantity written out: on every stretch of the study a sum of terms.</summary>
/// <param name="Name">The quantity's name or label.</param>
/// <param name="Unit">Its unit in SI.</param>
/// <param name="Stretches">In order, without gaps within the window asked for.</param>
public sealed record ClosedForm(string Name, string Unit, ImmutableArray<ClosedStretch> Stretches);

/// <summary>A stretch of time without a switching or a source's corner.</summary>
/// <param name="From">Its start in seconds, from which τ counts.</param>
/// <param name="Until">Its end in seconds.</param>
/// <param name="Interval">Index of the interval between switchings that holds it.</param>
/// <param name="StartsInterval">Whether it is the first of that interval.</param>
/// <param name="Total">All causes together; null where the equations leave the quantity open.</param>
/// <param name="ByCause">Each cause alone; empty where the quantity is left open.</param>
public sealed record ClosedStretch(
    double From, double Until, int Interval, bool StartsInterval, ClosedSum? Total,
    ImmutableArray<ClosedSum> ByCause);

/// <summary>What one cause, or all together, contribute on a stretch.</summary>
/// <param name="Cause">The cause's name; null for all together.</param>
/// <param name="Terms">The value is the sum of them.</param>
/// <param name="Impulse">Weight of an impulse at the start, the quantity's unit times seconds.</param>
/// <param name="IsBeyondImpulse">Whether the start carries more than an impulse: its derivative.</param>
/// <param name="Scale">The largest magnitude seen at a few dozen instants.</param>
public sealed record ClosedSum(
    string? Cause, ImmutableArray<ClosedTerm> Terms, double Impulse, bool IsBeyondImpulse, double Scale);

/// <summary>A term of a closed form: the real part of an amplitude times e_τ[p₁, …, pₖ], the divided
/// difference of e^(p τ) over the rates: e^(p τ) of one rate, τ^(k−1)/(k−1)! e^(p τ) of k equal ones, and
/// (e^(p₁ τ) − e^(p₂ τ))/(p₁ − p₂) of two.</summary>
/// <param name="Amplitude">In the quantity's unit, times 1/s for each rate after the first.</param>
/// <param name="Rates">In 1/s and rad/s.</param>
/// <param name="Origin">Where the rates come from.</param>
/// <param name="Bound">The term's magnitude stays below it on the stretch.</param>
public sealed record ClosedTerm(
    Complex Amplitude, ImmutableArray<Complex> Rates, TermOrigin Origin, double Bound);

/// <summary>Where the rates of a term come from.</summary>
public enum TermOrigin
{
    /// <summary>Poles of the network: its natural motion.</summary>
    Network,

    /// <summary>The sources: what they force.</summary>
    Source,

    /// <summary>A pole and a source so near each other that the two stay together.</summary>
    Both,
}

/// <summary>A quadratic quantity: the product of two linear ones, whose closed forms are given.</summary>
/// <param name="Name">Its name or label.</param>
/// <param name="Unit">Its unit in SI.</param>
/// <param name="Factor">What the product is multiplied by.</param>
/// <param name="FactorUnit">Its unit.</param>
/// <param name="First">Name of one linear quantity.</param>
/// <param name="Second">Name of the other; the same one of a square.</param>
/// <param name="IsIntegrated">Whether it is the product's integral since t = 0.</param>
public sealed record ClosedProduct(
    string Name, string Unit, double Factor, string FactorUnit,
    string First, string Second, bool IsIntegrated);

/// <summary>An interval between switchings with the network's own modes.</summary>
/// <param name="From">In seconds.</param>
/// <param name="Until">In seconds.</param>
/// <param name="StartsWith">The switchings at its start: <c>Kmain closes</c>.</param>
/// <param name="Poles">All poles of the network.</param>
public sealed record ClosedInterval(
    double From, double Until, ImmutableArray<string> StartsWith, ImmutableArray<Pole> Poles);

/// <summary>The closed forms asked of a study.</summary>
/// <param name="Circuit">The circuit.</param>
/// <param name="Until">End of the study in seconds.</param>
/// <param name="Causes">The causes, in the order of <see cref="ClosedStretch.ByCause"/>.</param>
/// <param name="Intervals">The intervals between switchings.</param>
/// <param name="Forms">The linear quantities written out.</param>
/// <param name="Products">The quadratic ones, by their factors.</param>
/// <param name="SelfChecks">What the solution checked of itself.</param>
/// <param name="NotJudged">The checks that could not judge it.</param>
public sealed record ClosedFormStudy(
    Circuit Circuit, double Until, ImmutableArray<CauseName> Causes, ImmutableArray<ClosedInterval> Intervals,
    ImmutableArray<ClosedForm> Forms, ImmutableArray<ClosedProduct> Products,
    ImmutableArray<SelfCheck> SelfChecks, ImmutableArray<NotJudged> NotJudged);
