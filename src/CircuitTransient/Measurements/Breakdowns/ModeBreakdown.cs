using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>An extreme's value taken apart by causes and by the modes of the network in the interval it
/// stands in: natural ones, and those the sources impose.</summary>
/// <param name="Modes">The modes that have a part in it, the largest first.</param>
/// <param name="Causes">What each cause has in each of them.</param>
/// <param name="Joint">What is left where the quantity is a product: it belongs to no single cause and mode;
/// zero for others.</param>
/// <param name="Energies">The energy of the fields at the instant; null where it was not asked for.</param>
public sealed record ModeBreakdown(
    ImmutableArray<ModeResult> Modes, ImmutableArray<CauseByMode> Causes, double Joint,
    EnergyByMode? Energies);

/// <summary>A mode by name, with what it has in the value.</summary>
/// <param name="Pace">Its natural frequency or time constant in words; of a forced one its source's
/// exponent.</param>
/// <param name="Holders">The parts that hold its energy, in words; null for a forced one.</param>
/// <param name="IsForced">Whether the sources impose it, rather than a motion of the network.</param>
/// <param name="IsDriven">Whether a natural one holds the part of the sources that follows it so closely,
/// over the interval, that the two cannot be told apart.</param>
/// <param name="Rate">Its pole or the exponent of the sources, in 1/s and rad/s; of poles that are not parted
/// their mean.</param>
/// <param name="Multiplicity">How many poles (or pairs) it holds; 1 for a forced one.</param>
/// <param name="Parts">The parts that hold its energy, with their shares, the largest first; empty for a
/// forced one.</param>
/// <param name="Value">What all causes have in it, in the quantity's unit.</param>
public sealed record ModeResult(
    string Pace, string? Holders, bool IsForced, bool IsDriven, Complex Rate, int Multiplicity,
    ImmutableArray<PartShare> Parts, double Value)
{
    /// <summary>Both: <c>25.01 kHz: Lcab with Cin</c>.</summary>
    public string Name => Holders is null ? Pace : $"{Pace}: {Holders}";
}

/// <summary>The energy of all fields at an instant, by modes.</summary>
/// <param name="Own">Joules each mode would hold if it were alone, in the order of
/// <see cref="ModeBreakdown.Modes"/>.</param>
/// <param name="Stored">Joules in all fields.</param>
/// <param name="Joint">Joules of them that no mode holds alone, those without a part in the value
/// included.</param>
public sealed record EnergyByMode(ImmutableArray<double> Own, double Stored, double Joint);

/// <summary>A part's share of a mode's stored energy, a fraction; the mutual part of coupled
/// coils is halved between them.</summary>
public sealed record PartShare(string Part, double Share);

/// <summary>What one cause has in each mode, in the order of <see cref="ModeBreakdown.Modes"/>.</summary>
public sealed record CauseByMode(string Cause, ImmutableArray<double> Values);

/// <summary>The breakdowns by mode at both extremes; null where an extreme is infinite or open, or the
/// quantity is an integral over time.</summary>
public sealed record ModeBreakdowns(ModeBreakdown? AtMax, ModeBreakdown? AtMin);
