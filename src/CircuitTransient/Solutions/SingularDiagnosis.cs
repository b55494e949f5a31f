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
        var places = PartRows(layout, nodeCount);
        var parts =
            singular!.Equations.Where(e => e >= nodeCount).Select(e => places[e - nodeCount]).Distinct()
            .Order().ToArray();
        var usesNodes = singular.Equations.Any(e => e < nodeCount);
        var names = Names(circuit, parts);
        var when = from > 0 ? $" from {EngineeringNumber.Format(from, "s")} on" : string.Empty;
        var (message, advice) = Explain(circuit, parts, usesNodes, singular.Contradicts, names, when);
        var span = parts.Length > 0 ? circuit.Parts[parts[0]].Span : default;
        return Diagnostic.Error(circuit.Source, span, message, advice);
    }

    private static (string Message, string Advice) Explain(
        Circuit circuit, int[] parts, bool usesNodes, bool contradicts, string names, string when)
    {
        if (parts.Any(p => circuit.Parts[p] is DependentSource or IdealTransformer))
        {
            return (
                $"{names} leave no unique solution{when}: their laws contradict or repeat each other",
                "change a gain, or put a resistance in the loop they form");
        }

        if (!usesNodes)
        {
            return (
                $"{names} form a loop of ideal voltage sources and closed switches{when}: their current has "
                + "no value",
                "put the real resistance of a contact or lead in series, some milliohms: "
                + "`closed resistance 1 mΩ` on a switch, or a resistor");
        }

        return contradicts
            ? ($"{names} are all that joins two parts of the circuit{when}, and they force currents that do "
                + "not agree",
                "give the current a path: a resistor across the source, or `open resistance 10 MΩ` on a "
                + "switch")
            : ($"{names} leave a current or voltage open{when} on which the rest depends",
                "give the voltage a path to the reference: a resistor of some megohms");
    }

    private static string Names(Circuit circuit, int[] parts)
    {
        const int shown = 8;
        var names = parts.Take(shown).Select(p => $"`{circuit.Parts[p].Name}`").ToArray();
        if (parts.Length > shown)
        {
            return string.Join(", ", names) + $" and {parts.Length - shown} more";
        }

        return names.Length switch
        {
            0 => "the parts",
            1 => names[0],
            _ => $"{string.Join(", ", names[..^1])} and {names[^1]}",
        };
    }

    /// <summary>Which part wrote each row after the nodes' (a transformer writes two).</summary>
    private static ImmutableArray<int> PartRows(NetworkLayout layout, int nodeCount)
    {
        var rows = ImmutableArray.CreateBuilder<int>();
        for (var i = 0; i < layout.Circuit.Parts.Length; i++)
        {
            rows.Add(i);
            if (layout.Circuit.Parts[i] is IdealTransformer)
            {
                rows.Add(i);
            }
        }

        return rows.ToImmutable();
    }
}
