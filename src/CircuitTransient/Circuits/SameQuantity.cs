namespace CircuitTransient.Circuits;

/// <summary>Finds a quantity under another name: it may be named by its node, its nodes or its part, with
/// either sign.</summary>
internal static class SameQuantity
{
    /// <summary>1 where both are the same quantity, −1 where one is the other's negative, 0 where they
    /// differ.</summary>
    public static int Sign(Circuit circuit, Measurand first, Measurand second)
    {
        var (one, signOfOne) = Normalised(circuit, first);
        var (other, signOfOther) = Normalised(circuit, second);
        return one == other ? signOfOne * signOfOther : 0;
    }

    private static (Measurand Quantity, int Sign) Normalised(Circuit circuit, Measurand quantity)
    {
        switch (quantity)
        {
            case VoltageAcross across:
                var part = circuit.Parts[across.Part];
                return Normalised(circuit, new VoltageBetween(part.From, part.To));
            case VoltageBetween between when between.From < between.To:
                return (new VoltageBetween(between.To, between.From), -1);
            case CurrentThrough current:
                return (current with { Delivered = false }, current.Delivered ? -1 : 1);
            case PowerIn power:
                return (power with { Delivered = false }, power.Delivered ? -1 : 1);
            case EnergyIn energy:
                return (energy with { Delivered = false }, energy.Delivered ? -1 : 1);
            case RateOfChange rate:
                var (of, sign) = Normalised(circuit, rate.Of);
                return (new RateOfChange(of), sign);
            default:
                return (quantity, 1);
        }
    }
}
