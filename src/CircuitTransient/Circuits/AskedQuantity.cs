using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Looks up a quantity that is asked for outside the circuit's file.</summary>
public static class AskedQuantity
{
    /// <summary>All quantities asked for; every waveform the file observes where none is.</summary>
    public static Outcome<IReadOnlyList<Observation>> FindAll(
        Circuit circuit, ImmutableArray<SourceText> asked)
    {
        if (asked.IsEmpty)
        {
            return new([.. circuit.Observations.Where(o => o.Quantity is not Figure)], []);
        }

        var found = asked.Select(text => Find(circuit, text)).ToArray();
        ImmutableArray<Diagnostic> diagnostics = [.. found.SelectMany(f => f.Diagnostics)];
        return found.All(f => f.Succeeded)
            ? new([.. found.Select(f => f.Value!)], diagnostics)
            : new(null, diagnostics);
    }

    /// <summary>The quantity as an observation over the whole study; an observation of the file by its own
    /// name or label. Errors point into the text asked.</summary>
    public static Outcome<Observation> Find(Circuit circuit, SourceText asked)
    {
        var name = asked.Content.Trim();
        if (circuit.Observations.FirstOrDefault(o => o.Name == name && o.Quantity is not Figure)
            is { } observed)
        {
            return new(observed, []);
        }

        return QuantityTextParser.Parse(asked).Then(syntax => LookUp(circuit, asked, syntax));
    }

    private static Outcome<Observation> LookUp(Circuit circuit, SourceText asked, QuantitySyntax syntax)
    {
        var findings = new Findings(asked);
        if (syntax is FigureSyntax figure)
        {
            findings.Error(syntax.Span, $"`{asked[syntax.Span]}` is one number, not a waveform",
                $"ask the waveform it is read off: `{asked[figure.Of.Span]}`");
            return new(null, findings.InOrder());
        }

        var names = CircuitChecker.NamesOf(circuit).ReportingTo(findings);
        var quantity = Measurands.Lower(names, syntax, Scope.Outermost(circuit.Nodes[0]));
        var everything = new Window(null, null);
        return new(
            quantity is null
                ? null
                : new Observation(quantity.Name, quantity.Unit, quantity.Quantity, everything, syntax.Span),
            findings.InOrder());
    }
}
