using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Sources that follow a voltage or current elsewhere; the dimension of the product says what they
/// set.</summary>
internal static class DependentSources
{
    public static DependentSource? Lower(CheckState state, PartDeclaration part,
        DependentSourceStatement syntax)
    {
        var control = Measurands.Lower(state, syntax.Control, part.Scope);
        var gain = state.Evaluator.Evaluate(syntax.Gain, part.Scope);
        if (control is null || gain is not { } value)
        {
            return null;
        }

        if (control.Quantity is not (VoltageBetween or VoltageAcross or CurrentThrough))
        {
            state.Findings.Error(syntax.Control.Span, $"`{control.Name}` cannot control a source",
                "a dependent source follows a voltage or a current");
            return null;
        }

        var product = value.Dimension * control.Dimension;
        if (product != Dimension.Voltage && product != Dimension.Current)
        {
            var (v, i) = (Measure.Of(Dimension.Voltage / control.Dimension).Phrase,
                Measure.Of(Dimension.Current / control.Dimension).Phrase);
            state.Findings.Error(TextSpan.Between(syntax.Gain.Span, syntax.Control.Span),
                $"`{part.Name}` would set {Measure.Of(product).Phrase}, not a voltage or a current",
                $"to set a voltage the gain is {v}, to set a current {i}");
            return null;
        }

        var toleranced = new ToleratedSyntax(syntax.Gain, null);
        var parameter = Tolerances.Apply(value, toleranced, part.Scope, state.Evaluator, state.Findings,
            state.Parameters, part.Name, part.NameSyntax.Span);
        return new DependentSource(product == Dimension.Voltage, parameter!.Value.AsQuantity,
            control.Quantity)
        {
            Name = part.Name,
            From = part.From,
            To = part.To,
            Span = syntax.Span,
        };
    }
}
