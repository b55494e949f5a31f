using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>When an instant of the circuit file came to be in the result.</summary>
internal static class DeclaredInstant
{
    /// <summary>The instant in seconds; null where none was declared or its event never came.</summary>
    public static double? Seconds(TransientResult result, Instant? instant)
    {
        if (instant?.After is not { } reference)
        {
            return instant?.Delay.Nominal;
        }

        var part = result.Circuit.Parts[reference.Part];
        var acted = result.Events.Where(e => e.Switch == part.Name).ElementAtOrDefault(reference.Event);
        return acted?.Time + instant.Delay.Nominal;
    }
}
