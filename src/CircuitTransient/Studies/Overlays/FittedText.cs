using System.Globalization;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>The circuit file with the fitted values in it.</summary>
public static class FittedText
{
    private const int GuardDigits = 2; // behind the first digit that the standard error touches

    /// <summary>Writes it; tolerances of fitted values go, for the records have measured them.</summary>
    /// <param name="circuit">The circuit as the file has it.</param>
    /// <param name="targets">What was fitted.</param>
    /// <param name="fit">The fit, every value of which is determined.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <returns>The text, or which value has no place of its own in it.</returns>
    public static Outcome<string> Write(
        Circuit circuit, TargetList targets, FitResult fit, Func<string, Outcome<SourceText>> readBeside) =>
        VariedCircuit.Of(circuit, targets.Targets, readBeside).Then(varied => CircuitRewriting.Put(
            circuit, varied.Values.Index().ToDictionary(
                v => v.Item.Parameter, v => Rounded(fit.Values[v.Index])), keepsTolerances: false));

    /// <summary>As many digits as the standard error leaves room for.</summary>
    private static double Rounded(FittedValue value)
    {
        var digits = value.RelativeError > 0 ? GuardDigits - Math.Log10(value.RelativeError) : 15;
        var format = $"E{(int)Math.Clamp(digits, 2, 15) - 1}";
        return double.Parse(
            value.Value.ToString(format, CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
    }
}
