using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies;

/// <summary>A circuit some of whose values vary.</summary>
public sealed class VariedCircuit
{
    private readonly CircuitSyntax? syntax;
    private readonly Func<string, Outcome<SourceText>> readBeside;

    private VariedCircuit(
        Circuit circuit, ImmutableArray<VariedValue> values, Func<string, Outcome<SourceText>> readBeside)
    {
        Circuit = circuit;
        Values = values;
        this.readBeside = readBeside;
        if (values.Any(v => v.Kind is VariedKind.NamedValue or VariedKind.EventTime))
        {
            syntax = CircuitParser.ParseWhatCanBe(circuit.Source).Syntax;
        }
    }

    /// <summary>The circuit with every value nominal.</summary>
    public Circuit Circuit { get; }

    /// <summary>What varies, in the order asked for.</summary>
    public ImmutableArray<VariedValue> Values { get; }

    /// <summary>Finds what is to vary.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="targets">What is to vary; a value named twice varies once.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <returns>The circuit, or which target is not in it.</returns>
    public static Outcome<VariedCircuit> Of(
        Circuit circuit, ImmutableArray<StudyTarget> targets, Func<string, Outcome<SourceText>> readBeside)
    {
        var values = ImmutableArray.CreateBuilder<VariedValue>();
        foreach (var target in targets)
        {
            var found = TargetSearch.Find(circuit, target);
            if (found.Mistake is { } mistake)
            {
                return new(null, [mistake]);
            }

            values.AddRange(found.Values.Where(f => !values.Any(v => v.Name == f.Name)));
        }

        return new(new VariedCircuit(circuit, values.ToImmutable(), readBeside), []);
    }

    /// <summary>The circuit with other values.</summary>
    /// <param name="values">One in SI for each of <see cref="Values"/>.</param>
    /// <returns>The circuit, or why there is none with these values.</returns>
    public Outcome<Circuit> At(ReadOnlySpan<double> values)
    {
        var given = values.ToArray();
        var reread = Reread(given);
        if (!reread.Succeeded)
        {
            return new(null, reread.Diagnostics);
        }

        var circuit = reread.Value;
        var parameters = circuit.Parameters.Select(p => p.Nominal).ToArray();
        for (var i = 0; i < given.Length; i++)
        {
            if (Values[i].Kind == VariedKind.Parameter)
            {
                parameters[Values[i].Parameter] = given[i];
            }
        }

        return ParameterSubstitution.Put(Turn(circuit, given), parameters);
    }

    /// <summary>The text read anew with other named values and instants, where any differ.</summary>
    private Outcome<Circuit> Reread(double[] given)
    {
        var overrides = CircuitOverrides.None;
        for (var i = 0; i < given.Length; i++)
        {
            var value = Values[i];
            if (given[i] == value.Nominal)
            {
                continue;
            }

            overrides = value switch
            {
                { Kind: VariedKind.NamedValue } => overrides with
                {
                    NamedValues = overrides.NamedValues.SetItem(value.Name, given[i]),
                },
                { Kind: VariedKind.EventTime, Event: { } e } => overrides with
                {
                    EventTimes = overrides.EventTimes.SetItem(TargetSearch.Switching(Circuit, e), given[i]),
                },
                _ => overrides,
            };
        }

        return ReferenceEquals(overrides, CircuitOverrides.None)
            ? new(Circuit, [])
            : CircuitChecker.Check(syntax!, [], readBeside, overrides);
    }

    private Circuit Turn(Circuit circuit, double[] given)
    {
        for (var i = 0; i < given.Length; i++)
        {
            if (Values[i].Kind == VariedKind.SourcePhase)
            {
                var source = Values[i].Source;
                circuit = circuit with
                {
                    Parts = circuit.Parts.SetItem(source, Turn(circuit.Parts[source], given[i])),
                };
            }
        }

        return circuit;
    }

    private static Part Turn(Part source, double phase)
    {
        return source switch
        {
            VoltageSource v => v with { Wave = Turned(v.Wave) },
            CurrentSource c => c with { Wave = Turned(c.Wave) },
            _ => throw new System.Diagnostics.UnreachableException($"{source.Name} has no wave"),
        };

        Wave Turned(Wave wave) => wave with
        {
            Pieces = [.. wave.Pieces.Select(p => p.StatedPhase is { } stated
                ? p with { Phase = p.Phase + (phase - stated), StatedPhase = phase }
                : p)],
        };
    }
}
