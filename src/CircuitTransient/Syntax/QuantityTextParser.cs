using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads one quantity given outside a circuit, such as <c>voltage of bus</c>.</summary>
public static class QuantityTextParser
{
    /// <summary>Reads a quantity or a figure of one; errors point into its own text.</summary>
    public static Outcome<QuantitySyntax> Parse(SourceText source) => OptionText.Parse(
        source, "no quantity is given", "such as `voltage of bus` or `current through L1`",
        QuantityParser.ReadWithFigures);
}
