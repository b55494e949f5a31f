using System.Collections.Immutable;
using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Where a statement stands once repetitions and assemblies are written out.</summary>
/// <param name="Prefix">What its names begin with: <c>Stage1/</c>, or nothing.</param>
/// <param name="Counters">The counters of the repetitions round it.</param>
/// <param name="Terminals">Outer nodes by the names of the terminals they stand for.</param>
/// <param name="Reference">The reference conductor, one for the whole circuit.</param>
internal sealed record Scope(
    string Prefix,
    ImmutableDictionary<string, int> Counters,
    ImmutableDictionary<string, string> Terminals,
    string Reference)
{
    public static Scope Outermost(string reference) =>
        new("", ImmutableDictionary<string, int>.Empty, ImmutableDictionary<string, string>.Empty, reference);

    /// <summary>The name with its index as a number, without the prefix.</summary>
    public string Written(NameSyntax name, Findings findings)
    {
        var text = name.Owner is { } owner ? $"{Written(owner, findings)}/{name.Text}" : name.Text;
        if (name.Index is not { } index)
        {
            return text;
        }

        if (index.Counter is not { } counter)
        {
            return $"{text}[{index.Offset}]";
        }

        if (Counters.TryGetValue(counter, out var value))
        {
            return $"{text}[{(long)value + index.Offset}]";
        }

        var nearest = Counters.Count == 1 ? Counters.Keys.First() : null;
        findings.Error(index.Span, $"there is no counter `{counter}` here",
            nearest is null ? $"put the statement between `repeat 40 as {counter}` and `end`"
                : $"the counter here is `{nearest}`");
        findings.LacksNames = true;
        return $"{text}[{counter}]";
    }

    public string Full(NameSyntax name, Findings findings) => Prefix + Written(name, findings);

    public string Node(NameSyntax name, Findings findings)
    {
        var written = Written(name, findings);
        return Terminals.TryGetValue(written, out var outer) ? outer
            : written == Reference ? Reference
            : Prefix + written;
    }
}

/// <summary>A statement that repeats nothing and places nothing, with the scope its names belong
/// to.</summary>
internal sealed record PlacedStatement(Statement Statement, Scope Scope);
