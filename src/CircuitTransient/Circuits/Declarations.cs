using System.Collections.Immutable;
using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Gives every part and coupling its name, index and nodes before any value is read.</summary>
internal static class Declarations
{
    public static void Declare(CheckState state, ImmutableArray<PlacedStatement> statements)
    {
        foreach (var (statement, scope) in statements)
        {
            switch (statement)
            {
                case SimplePartStatement s:
                    Part(state, s, s.Name, s.Terminals, scope);
                    break;
                case SourceStatement s:
                    Part(state, s, s.Name, s.Terminals, scope);
                    break;
                case DependentSourceStatement s:
                    Part(state, s, s.Name, s.Terminals, scope);
                    break;
                case SwitchStatement s:
                    Part(state, s, s.Name, s.Terminals, scope);
                    break;
                case TransformerStatement s:
                    Part(state, s, s.Name, s.Primary, scope, s.Secondary);
                    break;
                case CouplingStatement s:
                    var coupling =
                        new PartDeclaration(scope.Full(s.Name, state.Findings), state.Couplings.Count,
                        IsCoupling: true, s, scope, s.Name, -1, -1);
                    if (state.Names.Declare(coupling.Name, s.Name.Span, coupling))
                    {
                        state.Couplings.Add(coupling);
                    }

                    break;
            }
        }

        foreach (var part in state.Declared.Where(p => state.Values.IsKnown(p.Name)))
        {
            state.Parameters.Share(part.Name);
        }
    }

    private static void Part(
        CheckState state, Statement statement, NameSyntax name, TerminalsSyntax terminals, Scope scope,
        TerminalsSyntax? secondary = null)
    {
        var full = scope.Full(name, state.Findings);
        var from = state.Nodes.At(terminals.From, scope, full);
        var to = To(state, terminals, scope, full);
        CheckEnds(state, full, terminals, from, to);
        var (secondaryFrom, secondaryTo) = (-1, -1);
        if (secondary is not null)
        {
            secondaryFrom = state.Nodes.At(secondary.From, scope, full);
            secondaryTo = To(state, secondary, scope, full);
            CheckEnds(state, full, secondary, secondaryFrom, secondaryTo);
        }

        var part = new PartDeclaration(
            full, state.Declared.Count, IsCoupling: false, statement, scope, name, from, to, secondaryFrom,
            secondaryTo);
        if (state.Names.Declare(full, name.Span, part))
        {
            state.Declared.Add(part);
        }
    }

    private static int To(CheckState state, TerminalsSyntax terminals, Scope scope, string part) =>
        terminals.To is { } to ? state.Nodes.At(to, scope, part) : state.Nodes.AtReference();

    private static void CheckEnds(CheckState state, string part, TerminalsSyntax terminals, int from, int to)
    {
        if (from == to)
        {
            state.Findings.Error((terminals.To ?? terminals.From).Span,
                $"both ends of `{part}` are on the node `{state.Nodes[from]}`",
                "join one end to another node, or leave the part out");
        }
    }
}
