using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The named values of a circuit, each worked out when it is first asked for.</summary>
internal sealed class NamedValues
{
    private readonly Findings findings;
    private readonly ParameterList parameters;
    private readonly NameTable<Definition> table;
    private readonly List<Definition> inProgress = [];

    private readonly CircuitOverrides overrides;

    public NamedValues(Findings findings, ParameterList parameters, CircuitOverrides overrides)
    {
        this.findings = findings;
        this.parameters = parameters;
        this.overrides = overrides;
        table = new NameTable<Definition>("value", findings);
        Evaluator = new ExpressionEvaluator(findings, this);
    }

    public ExpressionEvaluator Evaluator { get; }

    /// <summary>Names that stand where a part's value is a marking code: a warning says so there.</summary>
    public HashSet<string> TakenForCodes { get; } = new(StringComparer.Ordinal);

    public bool IsKnown(string name) => table.TryGet(name, out _);

    /// <summary>Whether a value has that name or one that differs in case.</summary>
    public bool IsNearlyKnown(string name) => table.Names.Contains(name, StringComparer.OrdinalIgnoreCase);

    /// <summary>Names a value.</summary>
    /// <param name="name">Its full name.</param>
    /// <param name="span">Where the name stands.</param>
    /// <param name="value">What it is.</param>
    /// <param name="scope">Where the names in its expression belong.</param>
    public void Declare(string name, TextSpan span, ToleratedSyntax value, Scope scope)
    {
        if (name is "pi")
        {
            findings.Error(span, "`pi` is the circle number already", "give the value another name");
            return;
        }

        table.Declare(name, span, new Definition(name, span, value, scope));
    }

    /// <summary>Names a value of a placed assembly that is given from outside.</summary>
    /// <param name="name">Its full name.</param>
    /// <param name="span">Where it is given.</param>
    /// <param name="value">What it is given.</param>
    /// <param name="scope">Where the names in that belong.</param>
    /// <param name="own">What the assembly says itself, whose dimension must be the same.</param>
    /// <param name="inner">Where the names in the assembly's own value belong.</param>
    public void Override(
        string name, TextSpan span, ToleratedSyntax value, Scope scope, ToleratedSyntax own, Scope inner) =>
        table.Declare(name, span, new Definition(name, span, value, scope) { Own = (own, inner) });

    /// <summary>Works out every value in the order written, so that mistakes in unused ones are found
    /// too.</summary>
    public void EvaluateAll()
    {
        foreach (var name in table.Names.ToArray())
        {
            if (table.TryGet(name, out var definition))
            {
                Evaluate(definition);
            }
        }
    }

    /// <summary>The value of that name, of the assembly first and then of the file.</summary>
    public Evaluated? Find(NameSyntax name, Scope scope)
    {
        var written = scope.Written(name, findings);
        return table.TryGet(scope.Prefix + written, out var inner) ? Use(inner)
            : table.Find(written, name.Span, out var outer, $"define it: `value {written} : …`")
            ? Use(outer)
            : null;
    }

    /// <summary>The values that nothing but other such values is made of, in the order written.</summary>
    public ImmutableArray<(string Name, TextSpan Span, string? Unit)> Unused()
    {
        var all = table.Names.Select(name => table.TryGet(name, out var d) ? d : null).OfType<Definition>()
            .ToArray();
        var used = new HashSet<Definition>();
        var open = new Stack<Definition>(all.Where(d => d.IsUsed));
        while (open.TryPop(out var definition))
        {
            if (used.Add(definition))
            {
                definition.Parts.ForEach(open.Push);
            }
        }

        return [.. all.Where(d => !used.Contains(d)).Select(d => (
            d.Name, d.Span, d.Result is { } result ? Measure.Of(result.Dimension).Unit : null))];
    }

    // What another value is made of is used only where that one is.
    private Evaluated? Use(Definition definition)
    {
        if (inProgress is [.., var maker])
        {
            maker.Parts.Add(definition);
        }
        else
        {
            definition.IsUsed = true;
        }

        return Evaluate(definition);
    }

    private Evaluated? Evaluate(Definition definition)
    {
        if (definition.IsDone)
        {
            return definition.Result;
        }

        if (inProgress.Contains(definition))
        {
            ReportCycle(definition);
            return null;
        }

        inProgress.Add(definition);
        var result = Evaluator.Evaluate(definition.Value.Value, definition.Scope, inProgress.Count);
        inProgress.RemoveAt(inProgress.Count - 1);
        if (result is { } given && !MatchesOwn(definition, given))
        {
            result = null;
        }

        if (result is not null && overrides.NamedValues.TryGetValue(definition.Name, out var other))
        {
            result = new Evaluated(other, result.Value.Dimension);
        }

        if (result is { } plain)
        {
            result = Tolerances.Apply(plain, definition.Value, definition.Scope, Evaluator, findings,
                parameters,
                definition.Name, definition.Span, isNamedValue: true);
        }

        if (!definition.IsDone)
        {
            definition.Result = result;
            definition.IsDone = true;
        }

        return definition.Result;
    }

    private bool MatchesOwn(Definition definition, Evaluated given)
    {
        if (definition.Own is not { } own
            || Evaluator.Evaluate(own.Value.Value, own.Scope) is not { } expected
            || expected.Dimension == given.Dimension)
        {
            return true;
        }

        findings.Error(definition.Span,
            $"`{definition.Name}` is given {Measure.Of(given.Dimension).Phrase}; in its assembly it is "
            + Measure.Of(expected.Dimension).Phrase,
            $"give it in {Measure.Of(expected.Dimension).UnitWord}");
        return false;
    }

    private void ReportCycle(Definition definition)
    {
        var start = inProgress.IndexOf(definition);
        var cycle = inProgress.Skip(start).ToList();
        var path = string.Join(" → ", cycle.Append(definition).Select(d => d.Name));
        findings.Error(definition.Span,
            cycle.Count == 1 ? $"the value `{definition.Name}` is made of itself"
                : $"the value `{definition.Name}` is made of itself: {path}",
            "give one of them as a number");
        foreach (var member in cycle)
        {
            member.IsDone = true;
        }
    }

    private sealed class Definition(string name, TextSpan span, ToleratedSyntax value, Scope scope)
    {
        public string Name => name;

        public TextSpan Span => span;

        public ToleratedSyntax Value => value;

        public Scope Scope => scope;

        public (ToleratedSyntax Value, Scope Scope)? Own { get; init; }

        public bool IsUsed { get; set; }

        public List<Definition> Parts { get; } = [];

        public bool IsDone { get; set; }

        public Evaluated? Result { get; set; }
    }
}
