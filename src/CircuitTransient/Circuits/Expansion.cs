using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Writes out repetitions and placed assemblies.</summary>
internal sealed class Expansion
{
    private const long MostStatements = 100_000;

    private readonly Findings findings;
    private readonly NamedValues values;
    private readonly Dictionary<string, AssemblyStatement> assemblies;
    private readonly ImmutableArray<PlacedStatement>.Builder written =
        ImmutableArray.CreateBuilder<PlacedStatement>();
    private readonly NameTable<PlaceStatement> places;

    private Expansion(Findings findings, NamedValues values, Dictionary<string, AssemblyStatement> assemblies)
    {
        this.findings = findings;
        this.values = values;
        this.assemblies = assemblies;
        places = new NameTable<PlaceStatement>("placing", findings);
    }

    /// <summary>All statements with their scopes; the named values are declared on the way.</summary>
    public static ImmutableArray<PlacedStatement> WriteOut(
        CircuitSyntax syntax, string reference, Findings findings, NamedValues values)
    {
        var defined = Assemblies.Collect(syntax.Statements, findings);
        var scope = Scope.Outermost(reference);
        var expansion = new Expansion(findings, values, defined);
        expansion.DeclareValues(syntax.Statements, scope);
        var size = new ExpansionSize(findings, values.Evaluator, defined);
        if (!size.IsWithin(syntax.Statements, scope, MostStatements))
        {
            return [];
        }

        expansion.Write(syntax.Statements, scope);
        return expansion.written.ToImmutable();
    }

    private void DeclareValues(ImmutableArray<Statement> statements, Scope scope)
    {
        foreach (var value in statements.OfType<ValueStatement>())
        {
            values.Declare(scope.Full(value.Name, findings), value.Name.Span, value.Value, scope);
        }
    }

    private void Write(ImmutableArray<Statement> statements, Scope scope)
    {
        foreach (var statement in statements)
        {
            switch (statement)
            {
                case AssemblyStatement or ValueStatement:
                    break;
                case RepeatStatement repeat:
                    Repeat(repeat, scope);
                    break;
                case PlaceStatement place:
                    Place(place, scope);
                    break;
                default:
                    written.Add(new PlacedStatement(statement, scope));
                    break;
            }
        }
    }

    private void Repeat(RepeatStatement repeat, Scope scope)
    {
        if (ExpansionSize.CountOf(repeat, scope, values.Evaluator, findings) is not { } count)
        {
            findings.LacksNames = true;
            return;
        }

        if (scope.Counters.ContainsKey(repeat.Counter))
        {
            findings.Error(repeat.Span,
                $"the counter `{repeat.Counter}` is in use by the repetition round this one",
                "give the inner one another letter");
            findings.LacksNames = true;
            return;
        }

        for (var k = 1; k <= count; k++)
        {
            var round = scope with { Counters = scope.Counters.Add(repeat.Counter, k) };
            DeclareValues(repeat.Body, round);
            Write(repeat.Body, round);
        }
    }

    private void Place(PlaceStatement place, Scope scope)
    {
        if (!assemblies.TryGetValue(place.Assembly.Text, out var assembly))
        {
            findings.LacksNames = true;
            return;
        }

        var name = scope.Full(place.Name, findings);
        if (!places.Declare(name, place.Name.Span, place))
        {
            return;
        }

        var terminals = ImmutableDictionary.CreateBuilder<string, string>();
        var overrides = new Dictionary<string, AssignmentSyntax>(StringComparer.Ordinal);
        var ownValues = assembly.Body.OfType<ValueStatement>().Select(v => v.Name.Text)
            .ToHashSet(StringComparer.Ordinal);
        var terminalNames = assembly.Terminals.Select(t => t.Text).ToHashSet(StringComparer.Ordinal);
        var isMisnamed = false;
        foreach (var assignment in place.Assignments)
        {
            var inner = assignment.Inner.Text;
            if (terminals.ContainsKey(inner) || overrides.ContainsKey(inner))
            {
                findings.Error(assignment.Inner.Span, $"`{inner}` is given twice", "leave one of them out");
            }
            else if (terminalNames.Contains(inner))
            {
                Connect(assignment, scope, terminals);
            }
            else if (ownValues.Contains(inner))
            {
                Override(assignment, overrides);
            }
            else
            {
                isMisnamed = true;
                var nearest = NearestName.Find(inner, terminalNames.Concat(ownValues));
                findings.Error(assignment.Inner.Span,
                    $"the assembly `{assembly.Name.Text}` has no terminal or value `{inner}`",
                    nearest is null ? $"its terminals are {Assemblies.List(assembly.Terminals)}"
                        : $"did you mean `{nearest}`?");
            }
        }

        if (Complete(place, assembly, terminals, isMisnamed))
        {
            WriteAssembly(assembly, overrides, scope, new Scope(
                name + "/", ImmutableDictionary<string, int>.Empty, terminals.ToImmutable(),
                scope.Reference));
        }
    }

    private void Connect(
        AssignmentSyntax assignment, Scope scope, ImmutableDictionary<string, string>.Builder terminals)
    {
        if (assignment.Node is { } node)
        {
            terminals.Add(assignment.Inner.Text, scope.Node(node, findings));
            return;
        }

        terminals.Add(assignment.Inner.Text, scope.Prefix + assignment.Inner.Text);
        findings.Error(assignment.Span, $"`{assignment.Inner.Text}` is a terminal and is joined to a node",
            $"write `{assignment.Inner.Text} = NODE`");
    }

    private void Override(AssignmentSyntax assignment, Dictionary<string, AssignmentSyntax> overrides)
    {
        overrides.Add(assignment.Inner.Text, assignment);
        if (assignment.Value is null)
        {
            findings.Error(assignment.Span,
                $"`{assignment.Inner.Text}` is a value and is given by an expression",
                $"write `{assignment.Inner.Text} = 3 Ω`");
        }
    }

    private bool Complete(
        PlaceStatement place, AssemblyStatement assembly,
        ImmutableDictionary<string, string>.Builder terminals, bool isMisnamed)
    {
        var open = assembly.Terminals.Where(t => !terminals.ContainsKey(t.Text)).ToImmutableArray();
        if (open.Length == 0)
        {
            return true;
        }

        findings.LacksNames = true;
        if (isMisnamed)
        {
            return false;
        }

        findings.Error(place.Name.Span,
            $"{(open.Length == 1 ? "the terminal" : "the terminals")} {Assemblies.List(open)} of "
            + $"`{place.Name.Text}` {(open.Length == 1 ? "is" : "are")} not joined to any node",
            $"add `{open[0].Text} = NODE`");
        return false;
    }

    private void WriteAssembly(
        AssemblyStatement assembly, Dictionary<string, AssignmentSyntax> overrides, Scope outer, Scope inner)
    {
        foreach (var value in assembly.Body.OfType<ValueStatement>())
        {
            var full = inner.Full(value.Name, findings);
            if (overrides.TryGetValue(value.Name.Text, out var given))
            {
                values.Override(full, given.Span, given.Value ?? value.Value, outer, value.Value, inner);
            }
            else
            {
                values.Declare(full, value.Name.Span, value.Value, inner);
            }
        }

        Write(assembly.Body, inner);
    }
}
