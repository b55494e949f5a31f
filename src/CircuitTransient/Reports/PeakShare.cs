using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>What a cause, or both edges of a pulse together, has in an extreme; of a product the edges stand
/// alone, since what they have together is joint.</summary>
/// <param name="Name">The cause's name, or the pulse's.</param>
/// <param name="Value">Its value at the extreme.</param>
/// <param name="Kind">What it is; null for the term of a product that belongs to no single cause.</param>
/// <param name="Without">The extreme without it over the whole study; null for a pulse that has little in it
/// and for what belongs to no single cause.</param>
internal sealed record PeakShare(string Name, double Value, PeakShareKind Kind, double? Without)
{
    /// <summary>Whether an observation is a power, an energy or a Joule integral: part of it belongs to no
    /// single cause, and what is left without two causes is not the rest.</summary>
    public static bool IsProduct(TransientResult result, ObservationResult observed) =>
        observed.Contributions.Length > result.Causes.Length;

    /// <summary>The shares in an observation's maximum or minimum, the largest first,
    /// without what rounding leaves.</summary>
    public static ImmutableArray<PeakShare> In(TransientResult result, ObservationResult observed, bool atMax)
    {
        const double nothing = 1e-9; // of the value: what every figure is exact to
        var isProduct = IsProduct(result, observed);
        var total = Math.Abs((atMax ? observed.Max : observed.Min).Value ?? 0);
        return
        [
            .. observed.Contributions.Select((c, i) => Share(c, Cause(c, i))).GroupBy(s => s.Name)
                .Select(g => g.Count() == 1 ? g.First() : g.First() with { Value = g.Sum(s => s.Value) })
                .Where(s => Math.Abs(s.Value) > nothing * total)
                .OrderByDescending(s => Math.Abs(s.Value)),
        ];

        CauseName? Cause(Contribution contribution, int index) =>
            index < result.Causes.Length && result.Causes[index].Name == contribution.Cause
                ? result.Causes[index]
                : null;

        PeakShare Share(Contribution contribution, CauseName? cause)
        {
            var value = (atMax ? contribution.AtMax : contribution.AtMin) ?? 0;
            var without = (atMax ? contribution.MaxWithout : contribution.MinWithout)?.Value;
            var pulsed = observed.Pulses.FirstOrDefault(p => p.Pulse == cause?.Pulse);
            return cause switch
            {
                null => new("what no cause has alone", value, PeakShareKind.Joint, null),
                { Pulse: { } pulse } c => new(
                    isProduct ? c.Name : pulse, value, PeakShareKind.Pulse,
                    (atMax ? pulsed?.MaxWithout : pulsed?.MinWithout)?.Value),
                { Kind: CauseKind.Stored } c => new(c.Name, value, PeakShareKind.Stored, without),
                { Kind: CauseKind.Edge } c when c.Name != c.Of =>
                    new(c.Name, value, PeakShareKind.Edge, without),
                { } c => new(c.Name, value, PeakShareKind.Source, without),
            };
        }
    }
}

/// <summary>What has a share in an extreme.</summary>
internal enum PeakShareKind
{
    /// <summary>A source as a whole, or the one edge of it that has always been on.</summary>
    Source,

    /// <summary>A stored quantity.</summary>
    Stored,

    /// <summary>One edge of a source.</summary>
    Edge,

    /// <summary>Both edges of a pulse, or one of them in a product.</summary>
    Pulse,

    /// <summary>What belongs to no single cause.</summary>
    Joint,
}
