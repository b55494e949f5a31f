using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The nodes of a circuit: the reference conductor first, the others as parts touch them.</summary>
internal sealed class NodeTable
{
    private readonly NameTable<int> names;
    private readonly Findings findings;
    private readonly List<Touch> touches = [];

    public NodeTable(string reference, Findings findings, TextSpan span = default)
    {
        this.findings = findings;
        Reference = reference;
        names = new NameTable<int>("node", findings);
        names.Declare(reference, span, 0);
        touches.Add(new Touch(0, span));
    }

    private NodeTable(NodeTable known, Findings findings)
    {
        this.findings = findings;
        Reference = known.Reference;
        names = known.names.ReportingTo(findings);
        touches = known.touches;
    }

    public string Reference { get; }

    public ImmutableArray<string> Names => [.. names.Names];

    public int Count => touches.Count;

    public string this[int index] => names.Names[index];

    /// <summary>The same nodes, with what is not among them reported elsewhere.</summary>
    public NodeTable ReportingTo(Findings other) => new(this, other);

    /// <summary>How many terminals touch a node, where it was first named and by which part.</summary>
    public Touch TouchOf(int node) => touches[node];

    /// <summary>The node a terminal touches; a name not seen before makes a node.</summary>
    public int At(NameSyntax name, Scope scope, string part)
    {
        var full = scope.Node(name, findings);
        if (!names.TryGet(full, out var index) && !names.TryGetAnyCase(full, name.Span, out index))
        {
            index = touches.Count;
            names.Declare(full, name.Span, index);
            touches.Add(new Touch(0, name.Span, part));
        }

        touches[index] = touches[index] with { Count = touches[index].Count + 1 };
        return index;
    }

    /// <summary>The reference conductor, touched by a part written <c>at N</c>.</summary>
    public int AtReference()
    {
        touches[0] = touches[0] with { Count = touches[0].Count + 1 };
        return 0;
    }

    /// <summary>The node of that name, or an error: a quantity cannot make a node.</summary>
    public int? Find(NameSyntax name, Scope scope) =>
        names.Find(scope.Node(name, findings), name.Span, out var index) ? index : null;

    /// <summary>Whether there is a node of that name.</summary>
    public bool IsKnown(NameSyntax name, Scope scope) => names.TryGet(scope.Node(name, findings), out _);

    /// <summary>The node nearest in name to another, or null; a node that hangs loose itself is
    /// none.</summary>
    public string? NearestTo(int node) =>
        NearestName.Find(this[node], names.Names.Where((_, other) => touches[other].Count > 1));

    internal sealed record Touch(int Count, TextSpan Span, string FirstPart = "");
}
