using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Whether every part has a path to the reference conductor, and every node more than one
/// part.</summary>
internal static class Islands
{
    private const int MostNamed = 4;
    private const int MostCompared = 20; // comparing every name with every other would take minutes

    // What others call the conductor that voltages count from; common practice, no source.
    private static readonly string[] ReferenceWords = ["0", "gnd", "ground", "earth", "com", "common"];

    public static void Check(CheckState state, TextSpan referenceSpan)
    {
        if (state.Findings.LacksParts)
        {
            return;
        }

        CheckLoneNodes(state);
        if (state.Nodes.TouchOf(0).Count == 0)
        {
            ReportUntouchedReference(state, referenceSpan);
            return;
        }

        // An open switch is a path: it may close. A coupling and the core of a transformer conduct nothing.
        var sets = new DisjointSets(state.Nodes.Count);
        foreach (var part in state.Declared)
        {
            sets.Join(part.From, part.To);
            if (part.SecondaryFrom >= 0)
            {
                sets.Join(part.SecondaryFrom, part.SecondaryTo);
            }
        }

        var mainland = sets.Find(0).Root;
        var islands = state.Declared
            .SelectMany(p => p.SecondaryFrom >= 0 ? [(Part: p, At: p.From), (Part: p, At: p.SecondaryFrom)]
                : new[] { (Part: p, At: p.From) })
            .GroupBy(t => sets.Find(t.At).Root)
            .Where(g => g.Key != mainland);
        foreach (var island in islands)
        {
            PartDeclaration[] parts = [.. island.Select(t => t.Part).Distinct()];
            var node = state.Nodes[island.First().At];
            state.Findings.Error(parts[0].NameSyntax.Span,
                $"{List(parts)} {(parts.Length == 1 ? "has" : "have")} no path to the reference "
                    + $"`{state.Nodes.Reference}`",
                $"tie {(parts.Length == 1 ? "it" : "them")} down, such as `resistor Rtie from {node} to "
                    + $"{state.Nodes.Reference} : 10 MΩ`");
        }
    }

    private static void ReportUntouchedReference(CheckState state, TextSpan span)
    {
        var reference = state.Nodes.Reference;
        var nearest = state.Nodes.NearestTo(0);
        var busiest = Enumerable.Range(1, state.Nodes.Count - 1).MaxBy(n => state.Nodes.TouchOf(n).Count);
        state.Findings.Error(span, $"no part touches the reference conductor `{reference}`",
            $"name the node all voltages count from: `reference is {nearest ?? state.Nodes[busiest]}`");
    }

    private static void CheckLoneNodes(CheckState state)
    {
        var told = 0;
        for (var node = 1; node < state.Nodes.Count; node++)
        {
            var touch = state.Nodes.TouchOf(node);
            if (touch.Count != 1 || !state.Findings.IsNew(touch.Span, Severity.Warning))
            {
                continue;
            }

            var only = state.Nodes.TouchOf(node).FirstPart;
            var nearest = ++told <= MostCompared ? state.Nodes.NearestTo(node) : null;
            state.Findings.Warn(touch.Span, $"only `{only}` touches the node `{state.Nodes[node]}`",
                IsReferenceMeant(state.Nodes, node, nearest)
                    ? $"did you mean `{state.Nodes.Reference}`, the reference?"
                    : nearest is null ? "join another part to it, unless it is meant to hang open"
                    : $"did you mean `{nearest}`?");
        }
    }

    private static bool IsReferenceMeant(NodeTable nodes, int node, string? nearest) =>
        nearest == nodes.Reference
        || (nearest is null && ReferenceWords.Contains(nodes[node], StringComparer.OrdinalIgnoreCase));

    private static string List(PartDeclaration[] parts)
    {
        string[] names = [.. parts.Take(MostNamed).Select(p => $"`{p.Name}`")];
        return parts.Length > MostNamed ? $"{string.Join(", ", names)} and {parts.Length - MostNamed} more"
            : names.Length == 1 ? names[0]
            : $"{string.Join(", ", names[..^1])} and {names[^1]}";
    }
}
