using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>Finds what was observed under another name.</summary>
internal static class ObservedQuantity
{
    /// <summary>The observation of a quantity, or of the waveform a figure is read off; null where there
    /// is none.</summary>
    public static ObservationResult? Find(TransientResult result, Measurand quantity)
    {
        var sought = quantity is Figure figure ? figure.Of : quantity;
        var observed = result.Circuit.Observations.FirstOrDefault(o =>
            SameQuantity.Sign(result.Circuit, o.Quantity, sought) != 0);
        return observed is null ? null : result.Observations.FirstOrDefault(o => o.Name == observed.Name);
    }

    /// <summary>Every observation of a quantity, with 1 or −1 where its sign is turned.</summary>
    public static IEnumerable<(ObservationResult Observation, int Sign)> All(
        TransientResult result, Measurand quantity) =>
        from observed in result.Circuit.Observations
        let sign = SameQuantity.Sign(result.Circuit, observed.Quantity, quantity)
        where sign != 0
        let measured = result.Observations.FirstOrDefault(o => o.Name == observed.Name)
        where measured is not null
        select (measured, sign);
}
