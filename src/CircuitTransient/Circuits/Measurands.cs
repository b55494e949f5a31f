using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A quantity looked up, with its own name and dimension.</summary>
/// <param name="Unit">Unit of its value in SI, or <c>%</c>.</param>
internal sealed record NamedMeasurand(Measurand Quantity, string Name, Dimension Dimension, string Unit);

/// <summary>Looks up the quantities that are observed, required or followed; null means that an error has
/// been reported.</summary>
internal static class Measurands
{
    public static NamedMeasurand? Lower(CheckState state, QuantitySyntax syntax, Scope scope) => syntax switch
    {
        NodeVoltageSyntax voltage => NodeVoltage(state, voltage, scope),
        PartQuantitySyntax part => OfPart(state, part, scope),
        RateSyntax rate => Rate(state, rate, scope),
        FigureSyntax figure => Figures.Lower(state, figure, scope),
        _ => throw new System.Diagnostics.UnreachableException($"no quantity for {syntax}"),
    };

    /// <summary>A quantity with the unit of its dimension.</summary>
    public static NamedMeasurand Named(Measurand quantity, string name, Dimension dimension) =>
        new(quantity, name, dimension, Measure.Of(dimension).Unit);

    private static NamedMeasurand? NodeVoltage(CheckState state, NodeVoltageSyntax syntax, Scope scope)
    {
        if (syntax.Against is null && IsPart(state, syntax.Node, scope))
        {
            var part = state.Text(syntax.Node.Span);
            state.Findings.Error(syntax.Node.Span, $"`{part}` is a part, and no node has that name",
                $"for the voltage between its ends write `voltage across {part}`");
            return null;
        }

        var node = state.Nodes.Find(syntax.Node, scope);
        var against = syntax.Against is null ? 0 : state.Nodes.Find(syntax.Against, scope);
        if (node is not { } from || against is not { } to)
        {
            return null;
        }

        var name = syntax.Against is null
            ? $"voltage of {state.Nodes[from]}"
            : $"voltage from {state.Nodes[from]} to {state.Nodes[to]}";
        return Named(new VoltageBetween(from, to), name, Dimension.Voltage);
    }

    private static bool IsPart(CheckState state, NameSyntax name, Scope scope) =>
        !state.Nodes.IsKnown(name, scope)
        && state.Names.TryGet(scope.Full(name, state.Findings), out var part) && !part.IsCoupling;

    private static NamedMeasurand? OfPart(CheckState state, PartQuantitySyntax syntax, Scope scope)
    {
        if (state.FindPart(syntax.Part, scope) is not { } part)
        {
            return null;
        }

        var (p, name) = (part.Index, part.Name);
        if (part.IsCoupling)
        {
            if (syntax.Kind == PartQuantityKind.EnergyIn)
            {
                return Named(new CouplingEnergy(p), $"energy in {name}", Dimension.Energy);
            }

            state.Findings.Error(syntax.Span, $"`{name}` is a coupling, which has no terminals of its own",
                $"ask its coils, or `energy in {name}`");
            return null;
        }

        if (part.Statement is TransformerStatement
            && syntax.Kind is PartQuantityKind.PowerIn or PartQuantityKind.EnergyIn)
        {
            state.Findings.Error(syntax.Span, $"`{name}` is ideal: no power is lost or stored in it",
                "ask what its secondary feeds, such as `power in` the load");
            return null;
        }

        var isDelivered = syntax.Kind is PartQuantityKind.CurrentDelivered or PartQuantityKind.PowerDelivered
            or PartQuantityKind.EnergyDelivered;
        if (isDelivered && part.Statement is not (SourceStatement or DependentSourceStatement))
        {
            var instead = syntax.Kind switch
            {
                PartQuantityKind.CurrentDelivered => "current through",
                PartQuantityKind.PowerDelivered => "power in",
                _ => "energy in",
            };
            state.Findings.Error(syntax.Span, $"`{name}` is a {part.Kind}; only a source delivers",
                $"write `{instead} {name}`");
            return null;
        }

        return syntax.Kind switch
        {
            PartQuantityKind.VoltageAcross =>
                Named(new VoltageAcross(p), $"voltage across {name}", Dimension.Voltage),
            PartQuantityKind.CurrentThrough =>
                Named(new CurrentThrough(p), $"current through {name}", Dimension.Current),
            PartQuantityKind.CurrentDelivered =>
                Named(new CurrentThrough(p, Delivered: true), $"current delivered by {name}",
                    Dimension.Current),
            PartQuantityKind.PowerIn => Named(new PowerIn(p), $"power in {name}", Dimension.Power),
            PartQuantityKind.PowerDelivered =>
                Named(new PowerIn(p, Delivered: true), $"power delivered by {name}", Dimension.Power),
            PartQuantityKind.EnergyIn => Named(new EnergyIn(p), $"energy in {name}", Dimension.Energy),
            PartQuantityKind.EnergyDelivered =>
                Named(new EnergyIn(p, Delivered: true), $"energy delivered by {name}", Dimension.Energy),
            PartQuantityKind.JouleIntegral =>
                Named(new JouleIntegral(p), $"I²t through {name}", Dimension.JouleIntegral),
            _ => throw new System.Diagnostics.UnreachableException($"no quantity for {syntax.Kind}"),
        };
    }

    private static NamedMeasurand? Rate(CheckState state, RateSyntax syntax, Scope scope)
    {
        if (Lower(state, syntax.Of, scope) is not { } of)
        {
            return null;
        }

        if (of.Quantity is VoltageBetween or VoltageAcross or CurrentThrough)
        {
            return Named(new RateOfChange(of.Quantity), $"rate of change of {of.Name}",
                of.Dimension / Dimension.Time);
        }

        state.Findings.Error(syntax.Of.Span,
            $"`{state.Text(syntax.Of.Span)}` is neither a voltage nor a current",
            "a rate of change is that of a voltage or a current");
        return null;
    }
}
