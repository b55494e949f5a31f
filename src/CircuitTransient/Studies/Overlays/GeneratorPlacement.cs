using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Gives a source the resistance of the generator that stands for it.</summary>
internal static class GeneratorPlacement
{
    private const string Option = "--generator";

    /// <summary>Puts a resistance in series with a voltage source, or across a current source.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="bench">Its text.</param>
    /// <param name="written"><c>50 Ω</c>, or <c>Edge: 50 Ω</c> where there are several sources.</param>
    public static Outcome<BenchText> Put(Circuit circuit, BenchText bench, string written)
    {
        var text = new SourceText(Option, written);
        var colon = written.IndexOf(':', StringComparison.Ordinal);
        var name = colon < 0 ? null : written[..colon].Trim().Trim('"');
        var value = written[(colon + 1)..].Trim();
        var sources = circuit.Parts.Where(p => p is VoltageSource or CurrentSource).ToArray();
        if (name is null && sources.Length != 1)
        {
            var names = string.Join(", ", sources.Take(10).Select(s => $"`{s.Name}`"));
            return Mistake(text, $"there are {sources.Length} sources; which is the generator?",
                sources.Length == 0 ? "leave it out"
                    : $"write `{sources[0].Name}: {value}`; there are {names}");
        }

        var source = name is null ? sources[0] : Array.Find(sources, s => s.Name == name);
        if (source is null)
        {
            return Mistake(text, $"there is no source `{name}`",
                NearestName.Find(name!, sources.Select(s => s.Name)) is { } nearest
                    ? $"did you mean `{nearest}`?" : "name a source of the circuit");
        }

        var statement = CircuitParser.ParseWhatCanBe(circuit.Source).Syntax.Statements
            .OfType<SourceStatement>()
            .FirstOrDefault(s => s.Name is { Index: null, Owner: null } own && own.Text == source.Name);
        if (statement is null)
        {
            return Mistake(text, $"`{source.Name}` stands in a repetition or an assembly",
                "write the resistance into the circuit file");
        }

        var (from, to) = (
            BenchText.Name(circuit.Nodes[source.From]), BenchText.Name(circuit.Nodes[source.To]));
        if (source is CurrentSource)
        {
            return new(bench.With(Option, value,
                $"resistor \"{source.Name} generator\" from {from} to {to} : {value}"), []);
        }

        var inner = $"\"{source.Name} inside\"";
        return new(bench.Edited(statement.Terminals.From.Span, inner).With(Option, value,
            $"resistor \"{source.Name} generator\" from {inner} to {from} : {value}"), []);
    }

    private static Outcome<BenchText> Mistake(SourceText text, string message, string advice) =>
        new(null, [Diagnostic.Error(text, new TextSpan(0, text.Content.Length), message, advice)]);
}
