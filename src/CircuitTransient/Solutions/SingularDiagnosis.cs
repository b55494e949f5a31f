using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Says which parts leave an interval without a unique solution, and what would help.</summary>
public static class SingularDiagnosis
{
    /// <summary>The error for switch positions whose equations have no unique solution.</summary>
    public static Diagnostic Describe(NetworkLayout layout, ImmutableArray<bool> isClosed, double from)
    {
        var rows = NetworkEquations.Assemble(layout, isClosed, tracksOrigin: true);
        DescriptorReduction.Reduce(layout, rows, out var singular);
        var circuit = layout.Circuit;
        var nodeCount = circuit.Nodes.Length - 1;
        var places = PartRows(layout);
        var sets = singular!.Sets
            .Select(set => (Parts: PartsOf(set, nodeCount, places), HasNodes: set.Any(e => e < nodeCount)))
            // contacts in parallel alone do no harm
            .OrderBy(s => s.Parts.All(p => circuit.Parts[p] is Switch))
            .ThenBy(s => s.Parts.Length).ToArray();
        var (parts, hasNodes) = sets[0];
        var when = from > 0 ? $" from {EngineeringNumber.Format(from, "s")} on" : string.Empty;
        var fault = new SingularFault(circuit, parts, hasNodes, when);
        var (message, advice) = fault.Explain(singular.Contradicts);
        var span = parts.Length > 0 ? circuit.Parts[parts[0]].Span : default;
        return Diagnostic.Error(circuit.Source, span, message, advice);
    }

    private static int[] PartsOf(int[] set, int nodeCount, ImmutableArray<int> places) =>
        [.. set.Where(e => e >= nodeCount).Select(e => places[e - nodeCount]).Distinct().Order()];

    /// <summary>Which part wrote each row after the nodes' (a transformer writes two).</summary>
    private static ImmutableArray<int> PartRows(NetworkLayout layout) =>
    [
        .. Enumerable.Range(0, layout.Circuit.Parts.Length).SelectMany(i =>
            Enumerable.Repeat(i, layout.Circuit.Parts[i] is IdealTransformer ? 2 : 1)),
    ];
}
