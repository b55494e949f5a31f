using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>Named values that nothing follows from: the user believes them in the circuit, and they are
/// not.</summary>
internal static class UnusedValues
{
    /// <summary>Warns of each place that names only such values, and marks their parameters.</summary>
    public static ImmutableArray<Parameter> Check(CheckState state, ImmutableArray<Parameter> parameters)
    {
        // A mistake elsewhere may be what keeps a value from its use.
        if (state.Findings.HasErrors)
        {
            return parameters;
        }

        var unused = state.Values.Unused();
        var names = unused.Select(value => value.Name).ToHashSet(StringComparer.Ordinal);
        var usedPlaces = parameters.Where(p => p.IsNamedValue && !names.Contains(p.Owner))
            .Select(p => p.Span).ToHashSet();
        foreach (var (name, span, unit) in unused.Where(value =>
            !usedPlaces.Contains(value.Span) && !state.Values.TakenForCodes.Contains(value.Name)))
        {
            state.Findings.Warn(span, Headline(name), Advice(name, unit, parameters));
        }

        return [.. parameters.Select(p => p.IsNamedValue && names.Contains(p.Owner)
            ? p with { IsUsedNowhere = true }
            : p)];
    }

    /// <summary>What is said of such a value.</summary>
    public static string Headline(string name) => $"`{name}` is used nowhere";

    /// <summary>Where it might belong: a part whose value is of its kind.</summary>
    public static string Advice(string name, string? unit, ImmutableArray<Parameter> parameters)
    {
        var near = parameters.FirstOrDefault(p => p is { IsNamedValue: false, Aspect: null }
            && p.Unit == unit);
        return near is null
            ? $"write `{name}` where it belongs, or leave it out"
            : $"write `{name}` where it belongs, such as in the value of `{near.Owner}`, or leave it out";
    }
}
