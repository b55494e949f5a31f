using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements;

/// <summary>Which way a result errs where a part is driven beyond the range its value holds for.</summary>
internal static class LinearLimits
{
    /// <summary>The direction in words; null where the kind of part does not tell.</summary>
    public static string? Direction(Part part, LinearLimit limit) => part switch
    {
        Capacitor when limit.IsVoltage =>
            "a ceramic capacitor loses capacitance at voltage, so the true peak is higher than the one shown",
        Inductor when !limit.IsVoltage =>
            "a coil loses inductance as its core saturates, so the true current is higher than the one shown",
        _ => null,
    };
}
