using System.Globalization;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The text of the worst case: the circuit with the worst values in place of the nominal ones, and
/// without tolerances, for it is one circuit and no longer a range of them.</summary>
public static class WorstCircuit
{
    private const double Agreement = 1e-9; // what the exact engine owes

    /// <summary>Writes the text, and reads and solves it again to see that it is the worst case.</summary>
    /// <param name="spread">What was found.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <returns>The text, or why there is none.</returns>
    public static Outcome<string> Write(SpreadResult spread, Func<string, Outcome<SourceText>> readBeside)
    {
        var worst = spread.Worst
            ?? throw new ArgumentException("there is no worst case", nameof(spread));
        var circuit = spread.Varied.Circuit;
        var given = circuit.Parameters.Select(p => p.Nominal).ToArray();
        for (var i = 0; i < spread.Varied.Values.Length; i++)
        {
            given[spread.Varied.Values[i].Parameter] = worst.Point.Point[i];
        }

        var values = spread.Varied.Values.ToDictionary(
            v => v.Parameter, v => Rounded(WrittenValues.Of(circuit, v.Parameter, given)));
        var rewritten = CircuitRewriting.Put(
            circuit, values, keepsTolerances: false, writesOut: true);
        if (!rewritten.Succeeded)
        {
            return rewritten;
        }

        var figure = spread.Figures[worst.Figure].Figure;
        var file = OneLine(Path.GetFileName(circuit.Source.Name));
        var text = $"# The worst case of {file} with every tolerance, "
            + $"for the {OneLine(figure.Name)}.\n# SHA-256 of that file: {circuit.Source.Sha256}\n"
            + rewritten.Value;
        return Figure(spread, text, figure, readBeside) is { } found
            && (found == worst.Point.Value
                || Math.Abs(found - worst.Point.Value) <= Agreement * Math.Abs(worst.Point.Value))
            ? new(text, [])
            : new(null, [Diagnostic.Error(
                circuit.Source, circuit.Parameters[spread.Varied.Values[0].Parameter].Span,
                "the worst case cannot be written by putting other values in the places of these",
                "give each value that has a tolerance a number of its own")]);
    }

    private static double? Figure(
        SpreadResult spread, string text, StudyFigure figure, Func<string, Outcome<SourceText>> readBeside)
    {
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(
            new SourceText(spread.Varied.Circuit.Source.Name, text));
        return CircuitChecker.Check(syntax, mistakes, readBeside).Value is { } circuit
            ? StudySolver.At(circuit, [figure]).Value?.Values[0]
            : null;
    }

    /// <summary>The end of a tolerance without the rounding of its product: 13.5 mΩ, not 13.499999999999998
    /// mΩ.</summary>
    private static double Rounded(double value) =>
        double.Parse(value.ToString("E11", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    private static string OneLine(string text) => text.ReplaceLineEndings(" ");
}
