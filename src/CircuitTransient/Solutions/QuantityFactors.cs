using CircuitTransient.Circuits;
using CircuitTransient.Equations;

namespace CircuitTransient.Solutions;

/// <summary>A quantity that is a product of two linear ones: a power, a stored energy, or the rate of an
/// integral.</summary>
/// <param name="Factor">What the product is multiplied by.</param>
/// <param name="First">One linear quantity.</param>
/// <param name="Second">The other.</param>
/// <param name="IsIntegrated">Whether the quantity is the product's integral over time.</param>
public sealed record QuantityFactors(double Factor, Measurand First, Measurand Second, bool IsIntegrated)
{
    /// <summary>Whether a quantity is made of products, so that causes have a joint part in it.</summary>
    public static bool IsQuadratic(Measurand quantity) =>
        quantity is PowerIn or EnergyIn or CouplingEnergy or JouleIntegral;

    /// <summary>The factors of a product at one instant; null for linear quantities and for
    /// integrals.</summary>
    public static QuantityFactors? Of(Circuit circuit, Measurand quantity) =>
        OfAny(circuit, quantity) is { IsIntegrated: false } factors ? factors : null;

    /// <summary>The factors of a product or of an integral's rate; null for linear quantities.</summary>
    public static QuantityFactors? OfAny(Circuit circuit, Measurand quantity)
    {
        switch (quantity)
        {
            case PowerIn p:
                return Product(p.Delivered ? -1
                    : 1, new VoltageAcross(p.Part), new CurrentThrough(p.Part), false);
            case JouleIntegral j:
                return Product(1, new CurrentThrough(j.Part), new CurrentThrough(j.Part), true);
            case CouplingEnergy k:
                var coupling = circuit.Couplings[k.Coupling];
                return Product(
                    (double)MutualInductances.Mutual(circuit, coupling),
                    new CurrentThrough(coupling.First), new CurrentThrough(coupling.Second), false);
            case EnergyIn e when circuit.Parts[e.Part] is Capacitor c:
                return Square(Sign(e) * c.Capacitance.Nominal / 2, new VoltageAcross(e.Part));
            case EnergyIn e when circuit.Parts[e.Part] is Inductor l:
                return Square(Sign(e) * l.Inductance.Nominal / 2, new CurrentThrough(e.Part));
            case EnergyIn e:
                return Product(Sign(e), new VoltageAcross(e.Part), new CurrentThrough(e.Part), true);
            default:
                return null;
        }
    }

    private static QuantityFactors Product(double factor, Measurand first, Measurand second,
        bool isIntegrated) =>
        new(factor, first, second, isIntegrated);

    private static QuantityFactors Square(double factor, Measurand quantity) =>
        new(factor, quantity, quantity, false);

    private static double Sign(EnergyIn energy) => energy.Delivered ? -1 : 1;
}
