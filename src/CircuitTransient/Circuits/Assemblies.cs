using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>The assemblies a file defines, by name.</summary>
internal static class Assemblies
{
    /// <summary>All definitions, wherever they stand; one that holds itself is an error and is left
    /// out.</summary>
    public static Dictionary<string, AssemblyStatement> Collect(
        IEnumerable<Statement> statements, Findings findings)
    {
        var names = new NameTable<AssemblyStatement>("assembly", findings);
        Gather(statements, names, findings);
        var found = new Dictionary<string, AssemblyStatement>(StringComparer.Ordinal);
        foreach (var name in names.Names)
        {
            if (names.TryGet(name, out var assembly))
            {
                found.Add(name, assembly);
            }
        }

        foreach (var place in Places(statements).Concat(found.Values.SelectMany(a => Places(a.Body))))
        {
            names.Find(place.Assembly.Text, place.Assembly.Span, out _,
                $"define it: `assembly {place.Assembly.Text} with terminals in, out` … `end`");
        }

        foreach (var assembly in found.Values.ToArray())
        {
            if (Cycle(assembly, found, []) is { } cycle)
            {
                findings.Error(assembly.Name.Span, cycle.Count == 2
                    ? $"the assembly `{cycle[0]}` holds itself"
                    : $"the assembly `{cycle[0]}` holds itself: {string.Join(" → ", cycle)}",
                    "an assembly may hold others, but no ring of them can be built");
                foreach (var member in cycle)
                {
                    found.Remove(member);
                }
            }
        }

        return found;
    }

    public static string List(IEnumerable<NameSyntax> names) =>
        string.Join(", ", names.Select(n => $"`{n.Text}`"));

    /// <summary>Every placing in statements, inside repetitions too.</summary>
    private static IEnumerable<PlaceStatement> Places(IEnumerable<Statement> statements) =>
        statements.SelectMany(s => s switch
        {
            PlaceStatement place => [place],
            RepeatStatement repeat => Places(repeat.Body),
            _ => Enumerable.Empty<PlaceStatement>(),
        });

    private static void Gather(
        IEnumerable<Statement> statements, NameTable<AssemblyStatement> names, Findings findings)
    {
        foreach (var statement in statements)
        {
            if (statement is AssemblyStatement assembly)
            {
                names.Declare(assembly.Name.Text, assembly.Name.Span, assembly);
                foreach (var twice in assembly.Terminals.GroupBy(t => t.Text).Where(g => g.Count() > 1))
                {
                    findings.Error(twice.Last().Span,
                        $"the assembly `{assembly.Name.Text}` names its terminal `{twice.Key}` twice",
                        "leave one of them out");
                }

                Gather(assembly.Body, names, findings);
            }
            else if (statement is RepeatStatement repeat)
            {
                foreach (var inner in repeat.Body.OfType<AssemblyStatement>())
                {
                    findings.Error(inner.Name.Span, "an assembly is defined outside repetitions",
                        "move its lines above `repeat`");
                }
            }
        }
    }

    private static List<string>? Cycle(
        AssemblyStatement assembly, Dictionary<string, AssemblyStatement> found, HashSet<string> visited)
    {
        var path = new List<string>();
        return Walk(assembly.Name.Text, assembly.Name.Text, found, visited, path) ? path : null;
    }

    private static bool Walk(
        string at, string wanted, Dictionary<string, AssemblyStatement> found, HashSet<string> visited,
        List<string> path)
    {
        path.Add(at);
        if (path.Count > 1 && at == wanted)
        {
            return true;
        }

        if (visited.Add(at) && found.TryGetValue(at, out var assembly))
        {
            foreach (var place in Places(assembly.Body))
            {
                if (Walk(place.Assembly.Text, wanted, found, visited, path))
                {
                    return true;
                }
            }
        }

        path.RemoveAt(path.Count - 1);
        return false;
    }
}
