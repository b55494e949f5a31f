using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Studies;

/// <summary>Finds in a circuit what a study is to vary.</summary>
internal static class TargetSearch
{
    /// <summary>The values a target means, or why it means none.</summary>
    public static (ImmutableArray<VariedValue> Values, Diagnostic? Mistake) Find(
        Circuit circuit, StudyTarget target) => target switch
        {
            EveryTolerance => (Toleranced(circuit), null),
            NamedValueTarget named => NamedValue(circuit, named),
            PartValueTarget part => PartValue(circuit, part),
            SourcePhaseTarget source => Phase(circuit, source),
            EventTimeTarget e => EventTime(circuit, e),
            _ => throw new System.Diagnostics.UnreachableException($"no values of {target}"),
        };

    /// <summary>An event as overrides name it.</summary>
    public static (string Switch, bool Closes) Switching(Circuit circuit, EventReference reference)
    {
        var part = (Switch)circuit.Parts[reference.Part];
        return (part.Name, part.Events[reference.Event].Closes);
    }

    // A value that stays nominal, in a bound say, or is used nowhere would be drawn for nothing.
    private static ImmutableArray<VariedValue> Toleranced(Circuit circuit)
    {
        var read = ReadParameters.Of(circuit);
        return
        [
            .. Enumerable.Range(0, circuit.Parameters.Length)
                .Where(i => circuit.Parameters[i].Tolerance is { } t && t.Highest > t.Lowest)
                .Where(read.Contains)
                .Select(i => Parameter(circuit, i, VariedKind.Parameter)),
        ];
    }

    private static VariedValue Parameter(Circuit circuit, int index, VariedKind kind)
    {
        var parameter = circuit.Parameters[index];
        return new VariedValue(
            parameter.Name, parameter.Unit, parameter.Nominal, parameter.Tolerance, kind)
        { Parameter = index };
    }

    private static (ImmutableArray<VariedValue>, Diagnostic?) NamedValue(
        Circuit circuit, NamedValueTarget target)
    {
        var name = target.Name;
        for (var i = 0; i < circuit.Parameters.Length; i++)
        {
            if (circuit.Parameters[i] is { IsNamedValue: true } named && named.Owner == name)
            {
                if (named.IsUsedNowhere)
                {
                    var (source, span) = Place(target, name);
                    return ([], Diagnostic.Error(
                        source, span, UnusedValues.Headline(name),
                        UnusedValues.Advice(name, named.Unit, circuit.Parameters)));
                }

                return ([Parameter(circuit, i, VariedKind.NamedValue) with { Name = name }], null);
            }
        }

        var names = circuit.Parameters.Where(p => p.IsNamedValue).Select(p => p.Owner).ToArray();
        return Missing(target, name, $"there is no named value `{name}` that has a number of its own", names,
            circuit.Parts.Any(p => p.Name == name) || circuit.Couplings.Any(c => c.Name == name)
                ? $"`{name}` is a part: vary it with `--part`"
                : "no value of the circuit has a name; parts are varied with `--part`");
    }

    private static (ImmutableArray<VariedValue>, Diagnostic?) PartValue(
        Circuit circuit, PartValueTarget target)
    {
        var name = target.Name;
        var formula = circuit.Parts.FirstOrDefault(p => p.Name == name) is { } part ? OwnValue(part)
            : circuit.Couplings.FirstOrDefault(c => c.Name == name) is { } coupling ? coupling.Value
            : null;
        if (formula?.Formula is { } own)
        {
            for (var i = 0; i < circuit.Parameters.Length; i++)
            {
                if (circuit.Parameters[i] is { IsNamedValue: false, Aspect: null } value
                    && value.Owner == name && ReadParameters.In(own).Contains(i))
                {
                    return ([Parameter(circuit, i, VariedKind.Parameter)], null);
                }
            }

            return ([], Diagnostic.Error(
                circuit.Source, SpanOf(circuit, name),
                $"the value of `{name}` follows from named values", "vary those: `--value NAME`"));
        }

        if (formula is not null || circuit.Parts.Any(p => p.Name == name))
        {
            return ([], Diagnostic.Error(
                circuit.Source, SpanOf(circuit, name), $"`{name}` has no single value that could vary",
                "name a resistor, an inductor, a capacitor, a coupling, a gain or a source of one constant "
                + "level"));
        }

        string[] names = [.. circuit.Parts.Where(p => OwnValue(p)?.Formula is not null).Select(p => p.Name),
            .. circuit.Couplings.Select(c => c.Name)];
        return Missing(target, name, $"there is no part `{name}`", names);
    }

    private static Quantity? OwnValue(Part part) => part switch
    {
        Resistor r => r.Resistance,
        Capacitor c => c.Capacitance,
        Inductor l => l.Inductance,
        DependentSource d => d.Gain,
        VoltageSource s => s.Wave.Scale,
        CurrentSource s => s.Wave.Scale,
        Switch or IdealTransformer => null,
        _ => throw new System.Diagnostics.UnreachableException($"no value of {part}"),
    };

    private static (ImmutableArray<VariedValue>, Diagnostic?) Phase(
        Circuit circuit, SourcePhaseTarget target)
    {
        var name = target.Name;
        var index = Enumerable.Range(0, circuit.Parts.Length)
            .FirstOrDefault(i => circuit.Parts[i].Name == name && Pieces(circuit.Parts[i]) is not null, -1);
        if (index < 0)
        {
            string[] names = [.. circuit.Parts.Where(p => Pieces(p) is not null).Select(p => p.Name)];
            return Missing(target, name, $"there is no source `{name}`", names);
        }

        var pieces = Pieces(circuit.Parts[index])!.Value;
        double[] phases = [.. pieces.Select(p => p.StatedPhase).OfType<double>()];
        return phases is [var phase]
            ? ([new VariedValue($"phase of {name}", "rad", phase, null, VariedKind.SourcePhase)
            {
                Source = index,
            }], null)
            : ([], Diagnostic.Error(
                circuit.Source, circuit.Parts[index].Span,
                phases.Length == 0
                    ? $"`{name}` is no sine, so it has no phase"
                    : $"`{name}` is made of {phases.Length} sines; a phase is that of one",
                "name a source that is one sine or cosine"));
    }

    private static ImmutableArray<WavePiece>? Pieces(Part part) => part switch
    {
        VoltageSource s => s.Wave.Pieces,
        CurrentSource s => s.Wave.Pieces,
        _ => null,
    };

    private static (ImmutableArray<VariedValue>, Diagnostic?) EventTime(
        Circuit circuit, EventTimeTarget target)
    {
        var acts = target.Closes ? "closes" : "opens";
        var index = Enumerable.Range(0, circuit.Parts.Length)
            .FirstOrDefault(i => circuit.Parts[i] is Switch && circuit.Parts[i].Name == target.Switch, -1);
        if (index < 0)
        {
            string[] names = [.. circuit.Parts.OfType<Switch>().Select(s => s.Name)];
            return Missing(target, target.Switch, $"there is no switch `{target.Switch}`", names);
        }

        var part = (Switch)circuit.Parts[index];
        int[] matching = [.. Enumerable.Range(0, part.Events.Length)
            .Where(e => part.Events[e].Closes == target.Closes)];
        if (matching is [var only] && part.Events[only].Trigger is AtInstant at)
        {
            return ([new VariedValue(
                $"{part.Name} {acts}", "s", at.Instant.Delay.Nominal, null, VariedKind.EventTime)
            {
                Event = new EventReference(index, only),
            }], null);
        }

        return ([], Diagnostic.Error(
            circuit.Source, part.Span,
            matching.Length switch
            {
                0 => $"`{part.Name}` never {acts}",
                1 => $"`{part.Name}` {acts} when the answer decides it, not at an instant",
                _ => $"`{part.Name}` {acts} {matching.Length} times",
            },
            $"vary a switch that {acts} once, at an instant"));
    }

    private static TextSpan SpanOf(Circuit circuit, string name) =>
        circuit.Parts.FirstOrDefault(p => p.Name == name)?.Span
        ?? circuit.Couplings.First(c => c.Name == name).Span;

    private static (ImmutableArray<VariedValue>, Diagnostic?) Missing(
        StudyTarget target, string name, string headline, IReadOnlyList<string> known,
        string? otherwise = null)
    {
        var (source, span) = Place(target, name);
        var advice = NearestName.Find(name, known) is { } nearest ? $"did you mean `{nearest}`?"
            : known.Count == 0 ? otherwise
            : $"there are {string.Join(", ", known.Take(10).Select(k => $"`{k}`"))}";
        return ([], Diagnostic.Error(source, span, headline, advice));
    }

    private static (SourceText Source, TextSpan Span) Place(StudyTarget target, string name) =>
        target.Written is { } written
            ? (written, target.Span)
            : (new SourceText("the study", name), new TextSpan(0, name.Length));
}
