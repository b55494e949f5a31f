using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements;

/// <summary>Which real part would make an impulse finite, and of what order it is (common practice, no
/// source).</summary>
internal static class ImpulseRemedy
{
    /// <summary>The remedy in words; null for parts that only pass on what another's lack of a loss
    /// makes.</summary>
    public static string? For(Part part, bool isCharge) => (part, isCharge) switch
    {
        (Switch, true) =>
            "the resistance of the contact and its leads would make it finite: `closed resistance`, "
            + "milliohms for a power contact",
        (VoltageSource or DependentSource, true) =>
            "the source's inner resistance, milliohms to an ohm, and the inductance of its leads, about 1 "
            + "µH a metre, "
            + "would make it finite",
        (Switch, false) =>
            "the capacitance across the open gap, tens of picofarads, or the arc would make it finite",
        (CurrentSource or DependentSource, false) =>
            "the capacitance across the source, tens of picofarads, would make it finite",
        (Inductor, false) =>
            "the winding's own capacitance, tens to hundreds of picofarads, would make it finite",
        _ => null,
    };

    /// <summary>The remedy where nothing but stores takes part: capacitors that start in contradiction, coils
    /// likewise.</summary>
    public static string? OfStore(Part part, bool isCharge) => (part, isCharge) switch
    {
        (Capacitor, true) =>
            "the capacitor's series resistance would make it finite: milliohms for a film, tenths of an ohm "
            + "for an "
            + "electrolytic capacitor",
        (Inductor, true) =>
            "the winding's leakage inductance, some per cent of its own, would make it finite",
        _ => null,
    };
}
