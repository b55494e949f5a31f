using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements;

/// <summary>Which real part would make an impulse finite.</summary>
internal static class ImpulseRemedy
{
    /// <summary>The remedy in words; null for parts that only pass on what another's lack of a loss
    /// makes.</summary>
    public static string? For(Part part, double? charge) => (part, charge) switch
    {
        (Switch, not null) =>
            "the resistance of the contact and its leads would make it finite: `closed resistance`, "
            + "milliohms for a power contact",
        (VoltageSource, not null) => "the source's inner resistance and lead inductance would make it finite",
        (Switch, null) =>
            "the capacitance across the open gap, tens of picofarads, or the arc would make it finite",
        (CurrentSource, null) => "the capacitance across the source would make it finite",
        (Inductor, null) => "the winding's own capacitance would make it finite",
        _ => null,
    };
}
