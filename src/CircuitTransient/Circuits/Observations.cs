using System.Collections.Immutable;
using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Turns <c>observe</c> statements into observations; where there are none, every node voltage is
/// one.</summary>
internal static class Observations
{
    public static ImmutableArray<Observation> Lower(
        CheckState state, IEnumerable<PlacedStatement> statements, double? until)
    {
        var observations = ImmutableArray.CreateBuilder<Observation>();
        var names = new Dictionary<string, int>(StringComparer.Ordinal);
        var isAsked = false;
        foreach (var (statement, scope) in statements)
        {
            if (statement is not ObserveStatement syntax)
            {
                continue;
            }

            isAsked = true;
            var quantity = Measurands.Lower(state, syntax.Quantity, scope);
            var window = Windows.Lower(state, syntax.Window, scope, until, "nothing is observed");
            if (quantity is null || window is null)
            {
                continue;
            }

            var name = syntax.Label ?? quantity.Name;
            if (!names.TryAdd(name, state.Findings.LineOf(syntax.Span)))
            {
                state.Findings.Error(syntax.Span, $"two observations are named `{name}`",
                    $"the first stands in line {names[name]}; tell them apart with `as \"…\"`");
                continue;
            }

            observations.Add(new Observation(name, quantity.Unit, quantity.Quantity, window, syntax.Span));
        }

        return isAsked ? observations.ToImmutable() : EveryNode(state);
    }

    private static ImmutableArray<Observation> EveryNode(CheckState state) =>
    [
        .. state.Nodes.Names.Select((name, node) => new Observation(
            $"voltage of {name}", "V", new VoltageBetween(node, 0), new Window(null, null),
            state.Nodes.TouchOf(node).Span)
        { IsByDefault = true }).Skip(1),
    ];
}
