using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements;

/// <summary>Which way a result errs where a part is driven beyond the range its value holds for.</summary>
internal static class LinearLimits
{
    /// <summary>The direction in words; null where the kind of part does not tell.</summary>
    public static string? Direction(Part part, LinearLimit limit) => part switch
    {
        Capacitor when limit.IsVoltage =>
            "a class 2 ceramic loses capacitance with voltage, and then the true voltage peak is higher than "
            + "shown",
        Inductor when !limit.IsVoltage =>
            "a coil loses inductance as its core saturates, so the true current is higher than shown",
        _ => null,
    };

    /// <summary>What is to be said beside every requirement; null where every part stays in its
    /// range.</summary>
    public static string? Doubt(ImmutableArray<PartResult> parts)
    {
        var passed = parts.Where(p => p.LinearUpTo is { Holds: false }).Select(p => p.Name).ToArray();
        return passed.Length switch
        {
            0 => null,
            1 => $"{passed[0]} leaves the range its value is good for",
            _ => $"{passed[0]} and {passed.Length - 1} more leave the range their values are good for",
        };
    }
}
