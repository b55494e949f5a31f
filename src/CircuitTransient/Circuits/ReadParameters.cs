using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>Which parameters move anything in a circuit: those that <see cref="ParameterSubstitution"/> puts
/// somewhere.</summary>
public static class ReadParameters
{
    /// <summary>Their indices in <see cref="Circuit.Parameters"/>.</summary>
    public static ImmutableHashSet<int> Of(Circuit circuit)
    {
        var found = ImmutableHashSet.CreateBuilder<int>();
        foreach (var quantity in circuit.Parts.SelectMany(QuantitiesOf)
            .Concat(circuit.Couplings.Select(c => c.Value))
            .Concat(circuit.Observations.SelectMany(o => Delays(o.Window)))
            .Concat(circuit.Requirements.SelectMany(r => Delays(r.Window)))
            .Concat(circuit.Requirements.Select(r => (r.Bound as SettlesTo)?.By.Delay)))
        {
            found.UnionWith(In(quantity?.Formula));
        }

        return found.ToImmutable();
    }

    private static IEnumerable<Quantity?> QuantitiesOf(Part part) => part switch
    {
        Resistor r => [r.Resistance],
        Capacitor c => [c.Capacitance, c.InitialVoltage],
        Inductor l => [l.Inductance, l.InitialCurrent],
        VoltageSource s => QuantitiesOf(s.Wave),
        CurrentSource s => QuantitiesOf(s.Wave),
        DependentSource d => [d.Gain],
        Switch s =>
        [
            s.ClosedResistance, s.OpenResistance,
            .. s.Events.Select(e => e.Trigger switch
            {
                AtInstant at => at.Instant.Delay,
                WhenCrosses crossing => crossing.After?.Delay,
                _ => null,
            }),
        ],
        IdealTransformer => [],
        _ => throw new System.Diagnostics.UnreachableException($"no values of {part}"),
    };

    private static IEnumerable<Quantity?> QuantitiesOf(Wave wave) =>
        wave.Pieces.Select(piece => piece.Share?.Factor).Append(wave.Scale);

    private static Quantity?[] Delays(Window window) => [window.From?.Delay, window.To?.Delay];

    /// <summary>The indices of the parameters that a formula reads, in the order written; one that is read
    /// twice comes twice.</summary>
    public static IEnumerable<int> In(Formula? formula) => formula switch
    {
        ParameterFormula p => [p.Index],
        BinaryFormula b => In(b.Left).Concat(In(b.Right)),
        CallFormula c => In(c.Argument),
        _ => [],
    };
}
