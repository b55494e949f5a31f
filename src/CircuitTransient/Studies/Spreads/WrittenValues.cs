using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Spreads;

/// <summary>What has to stand in a value's place in the text so that it comes to what a study gave it: of a
/// value that follows from named values and has a tolerance of its own on top, the product of both.</summary>
internal static class WrittenValues
{
    /// <summary>The number to write for a parameter, in SI.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="parameter">Index in <see cref="Circuit.Parameters"/>.</param>
    /// <param name="values">What the study gives every parameter, in SI.</param>
    public static double Of(Circuit circuit, int parameter, double[] values)
    {
        var nominal = circuit.Parameters[parameter].Nominal;
        var onTop = circuit.Parts.SelectMany(Quantities).Concat(circuit.Couplings.Select(c => c.Value))
            .Select(q => OnTop(q?.Formula, parameter, nominal))
            .FirstOrDefault(formula => formula is not null);
        return onTop is null ? values[parameter] : FormulaValue.Of(onTop, values);
    }

    // The checker writes a tolerance on top as (what follows from named values) times (own draw over
    // nominal).
    private static Formula? OnTop(Formula? formula, int parameter, double nominal) => formula switch
    {
        BinaryFormula
        {
            Operator: '*',
            Right: BinaryFormula { Operator: '/', Left: ParameterFormula own, Right: NumberFormula number },
        } when own.Index == parameter && number.Value == nominal => formula,
        BinaryFormula binary =>
            OnTop(binary.Left, parameter, nominal) ?? OnTop(binary.Right, parameter, nominal),
        CallFormula call => OnTop(call.Argument, parameter, nominal),
        _ => null,
    };

    private static IEnumerable<Quantity?> Quantities(Part part) => part switch
    {
        Resistor r => [r.Resistance],
        Capacitor c => [c.Capacitance, c.InitialVoltage],
        Inductor l => [l.Inductance, l.InitialCurrent],
        VoltageSource s => [s.Wave.Scale],
        CurrentSource s => [s.Wave.Scale],
        DependentSource d => [d.Gain],
        Switch s => [s.ClosedResistance, s.OpenResistance],
        _ => [],
    };
}
