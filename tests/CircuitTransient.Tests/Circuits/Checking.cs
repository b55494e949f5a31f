using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Reads and checks circuits written in tests.</summary>
internal static class Checking
{
    /// <summary>All mistakes and warnings as the user sees them, one after the other.</summary>
    public static string Messages(string text, string? table = null) =>
        string.Join('\n', Check(text, table).Diagnostics.Select(DiagnosticText.Render)).TrimEnd('\n');

    /// <summary>The circuit of a text without mistakes.</summary>
    public static Circuit Circuit(string text, string? table = null)
    {
        var outcome = Check(text, table);
        Assert.True(outcome.Succeeded, string.Join('\n', outcome.Diagnostics.Select(DiagnosticText.Render)));
        return outcome.Value;
    }

    /// <summary>A part by its name.</summary>
    public static T Part<T>(this Circuit circuit, string name)
        where T : Part => Assert.IsType<T>(circuit.Parts.Single(p => p.Name == name));

    /// <summary>The pieces of a source called Feed that stands alone with a resistor.</summary>
    public static ImmutableArray<WavePiece> Wave(string wave) =>
        Circuit($"source Feed at a : {wave}\nresistor R1 at a : 1 kΩ").Part<VoltageSource>("Feed")
            .Wave.Pieces;

    /// <summary>The value of a quantity with parameters as given instead of nominal.</summary>
    public static double At(this Quantity quantity, params ReadOnlySpan<double> parameters) =>
        quantity.Formula is null ? quantity.Nominal : At(quantity.Formula, parameters);

    private static double At(Formula formula, ReadOnlySpan<double> parameters) => formula switch
    {
        NumberFormula n => n.Value,
        ParameterFormula p => parameters[p.Index],
        CallFormula { Function: "sqrt" } c => Math.Sqrt(At(c.Argument, parameters)),
        CallFormula { Function: "exp" } c => Math.Exp(At(c.Argument, parameters)),
        CallFormula c => Math.Log(At(c.Argument, parameters)),
        BinaryFormula { Operator: '+' } b => At(b.Left, parameters) + At(b.Right, parameters),
        BinaryFormula { Operator: '-' } b => At(b.Left, parameters) - At(b.Right, parameters),
        BinaryFormula { Operator: '*' } b => At(b.Left, parameters) * At(b.Right, parameters),
        BinaryFormula { Operator: '/' } b => At(b.Left, parameters) / At(b.Right, parameters),
        BinaryFormula b => Math.Pow(At(b.Left, parameters), At(b.Right, parameters)),
        _ => throw new InvalidOperationException($"{formula}"),
    };

    private static Outcome<Circuit> Check(string text, string? table)
    {
        var (syntax, diagnostics) = CircuitParser.ParseWhatCanBe(new SourceText("plant.cause", text));
        return CircuitChecker.Check(syntax, diagnostics, path =>
            new Outcome<SourceText>(table is null ? null : new SourceText(path, table), []));
    }
}
