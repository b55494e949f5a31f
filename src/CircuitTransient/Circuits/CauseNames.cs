using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Keeps the names of causes apart: a source is one by its name, and what a part holds at the start
/// is one by the part's.</summary>
internal static class CauseNames
{
    public static void Check(CheckState state)
    {
        var taken = new Dictionary<string, string>(StringComparer.Ordinal)
        {
            ["joint"] = "what causes have in a product only together goes by that name",
        };
        foreach (var part in state.Declared)
        {
            var held = part.Clauses.Any(c => c is ChargedToSyntax) ? "charge"
                : part.Clauses.Any(c => c is CarryingSyntax) ? "current"
                : null;
            if (held is not null)
            {
                taken[$"{part.Name} initial {held}"] =
                    $"the initial {held} of `{part.Name}` goes by that name";
            }
        }

        foreach (var source in state.Declared.Where(p => p.Statement is SourceStatement))
        {
            if (taken.TryGetValue(source.Name, out var reason))
            {
                state.Findings.Error(source.NameSyntax.Span,
                    $"a source named `{source.Name}` could not be told apart: {reason}",
                    "give the source another name");
            }
        }
    }
}
