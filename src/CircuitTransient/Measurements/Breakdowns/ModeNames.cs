using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>Names of modes: <c>25.01 kHz: Lcab with Cin</c>.</summary>
internal static class ModeNames
{
    /// <summary>The share of a mode's energy from which a part is named. A per cent of a
    /// capacitance or inductance moves a natural frequency by that share of a per cent, so what is
    /// below a tenth hardly sets it.</summary>
    public const double LeastShare = 0.1;

    private const int MostParts = 3; // more do not help to see which

    /// <summary>A natural mode by its poles.</summary>
    public static string Natural(Complex pole, int multiplicity)
    {
        var growing = pole.Real > 0 ? ", growing" : "";
        var rate = pole == Complex.Zero ? "held for ever"
            : pole.Imaginary != 0 ? EngineeringNumber.Format(pole.Magnitude / (2 * Math.PI), "Hz") + growing
            : EngineeringNumber.Format(Math.Abs(1 / pole.Real), "s") + growing;
        var times = multiplicity > 1 ? $" ({multiplicity} poles)" : "";
        return rate + times;
    }

    /// <summary>What the sources impose, by its exponent.</summary>
    public static string Forced(Complex exponent)
    {
        if (exponent == Complex.Zero)
        {
            return "steady";
        }

        var frequency = exponent.Imaginary == 0
            ? ""
            : $" at {EngineeringNumber.Format(Math.Abs(exponent.Imaginary) / (2 * Math.PI), "Hz")}";
        var decay = exponent.Real == 0 ? ""
            : $" decaying in {EngineeringNumber.Format(Math.Abs(1 / exponent.Real), "s")}";
        return $"source{frequency}{decay}";
    }

    /// <summary>The parts that hold a mode's energy.</summary>
    public static string Holders(ImmutableArray<PartShare> parts)
    {
        var named = parts.Where(p => p.Share >= LeastShare).Take(MostParts).Select(p => p.Part).ToArray();
        return named.Length switch
        {
            0 => "spread over many parts",
            1 => named[0],
            2 => $"{named[0]} with {named[1]}",
            _ => $"{named[0]} with {named[1]} and {named[2]}",
        };
    }
}
