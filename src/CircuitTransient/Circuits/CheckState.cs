using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A part or coupling as declared: its name and place in the lists are known before its value
/// is.</summary>
/// <param name="Index">Index in the parts, or in the couplings.</param>
/// <param name="IsCoupling">Whether it is a coupling.</param>
internal sealed record PartDeclaration(
    string Name, int Index, bool IsCoupling, Statement Statement, Scope Scope, NameSyntax NameSyntax,
    int From, int To, int SecondaryFrom = -1, int SecondaryTo = -1)
{
    public string Kind => Statement switch
    {
        SimplePartStatement { Kind: SimplePartKind.Resistor } => "resistor",
        SimplePartStatement { Kind: SimplePartKind.Capacitor } => "capacitor",
        SimplePartStatement => "inductor",
        SourceStatement => "source",
        DependentSourceStatement => "dependent source",
        SwitchStatement => "switch",
        TransformerStatement => "transformer",
        _ => "coupling",
    };

    /// <summary>The clauses after its value.</summary>
    public ImmutableArray<ClauseSyntax> Clauses => Statement switch
    {
        SimplePartStatement s => s.Clauses,
        SourceStatement s => s.Clauses,
        DependentSourceStatement s => s.Clauses,
        SwitchStatement s => s.Clauses,
        TransformerStatement s => s.Clauses,
        _ => [],
    };

    /// <summary>The events of a switch, in the order written.</summary>
    public ImmutableArray<SwitchEventSyntax> Events => [.. Clauses.OfType<SwitchEventSyntax>()];
}

/// <summary>What is known of a circuit while it is checked.</summary>
internal sealed class CheckState(
    Findings findings, NamedValues values, ParameterList parameters,
    Func<string, Outcome<SourceText>> readFile, CircuitOverrides overrides)
{
    public Findings Findings => findings;

    public NamedValues Values => values;

    public ExpressionEvaluator Evaluator => values.Evaluator;

    public ParameterList Parameters => parameters;

    public Func<string, Outcome<SourceText>> ReadFile => readFile;

    public CircuitOverrides Overrides => overrides;

    public NameTable<PartDeclaration> Names { get; private init; } = new("part", findings);

    public List<PartDeclaration> Declared { get; } = [];

    public List<PartDeclaration> Couplings { get; } = [];

    public NodeTable Nodes { get; set; } = new("ground", findings);

    /// <summary>The parts that came out well so far, by index.</summary>
    public Part?[] Parts { get; set; } = [];

    /// <summary>The same names, for a text of its own: what that text gets wrong is reported there.</summary>
    public CheckState ReportingTo(Findings other) => new(other, values, parameters, readFile, overrides)
    {
        Names = Names.ReportingTo(other),
        Nodes = Nodes.ReportingTo(other),
    };

    /// <summary>The statement a part came from.</summary>
    public PartDeclaration DeclarationOf(Part part) => Names.TryGet(part.Name, out var declared)
        ? declared
        : throw new System.Diagnostics.UnreachableException($"no declaration of {part.Name}");

    /// <summary>The text of a span.</summary>
    public string Text(TextSpan span) => findings.Source[span];

    /// <summary>A part by its written name, or an error.</summary>
    public PartDeclaration? FindPart(NameSyntax name, Scope scope) =>
        Names.Find(scope.Full(name, findings), name.Span, out var part) ? part : null;

}
