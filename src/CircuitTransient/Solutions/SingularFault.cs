using CircuitTransient.Circuits;

namespace CircuitTransient.Solutions;

/// <summary>The smallest set of parts whose laws contradict each other or say the same twice, in
/// words.</summary>
/// <param name="circuit">The circuit.</param>
/// <param name="parts">The parts, as indices.</param>
/// <param name="hasNodes">Whether the currents at a node are needed for it: a cut-set, else a loop.</param>
/// <param name="when">From when on, in words; empty for the start.</param>
internal sealed class SingularFault(Circuit circuit, int[] parts, bool hasNodes, string when)
{
    /// <summary>What is wrong, and what would help.</summary>
    public (string Message, string Advice) Explain(bool contradicts)
    {
        var followers = Followers();
        if (Any(p => p is Inductor))
        {
            return Coils();
        }

        if (Any(p => p is Resistor { Resistance.Nominal: < 0 }))
        {
            return (
                $"{Names(parts)} cancel each other exactly{when}: a negative resistance against as much "
                + "positive "
                + "resistance, and what is left has no value",
                "change one of the values, if only by its tolerance");
        }

        if (Any(p => p is DependentSource or IdealTransformer))
        {
            return Dependent(contradicts);
        }

        if (!contradicts && followers.Length > 0)
        {
            return (
                $"nothing decides how {Names(parts)} share a current{when}, and {Names(followers)} "
                + $"{(followers.Length == 1 ? "follows" : "follow")} it",
                Any(p => p is Switch)
                    ? "give the contacts the resistance they have: `closed resistance 1 mΩ`"
                    : "put a resistor of some milliohms in series with one of them");
        }

        return hasNodes ? CutSet() : Loop();
    }

    private (string Message, string Advice) Loop() => (
        $"{Names(parts)} form a loop of {Kinds("ideal voltage sources", "closed switches")}{when}: "
        + "their current has no value",
        Any(p => p is Switch)
            ? "put the real resistance of a contact or lead in series, some milliohms: "
                + "`closed resistance 1 mΩ` on a switch, or a resistor"
            : "put the inner resistance of a source or that of its leads in series: a resistor of some "
                + "milliohms");

    private (string Message, string Advice) CutSet() => parts.Length == 1
        ? (
            $"the current of {Names(parts)} has no path{when}",
            "give it one: a resistor or capacitor across the source")
        : (
            $"{Names(parts)} are all that joins two parts of the circuit{when}, and they force currents "
            + "that do not agree",
            "give the current a path: a resistor across the source"
            + (Any(p => p is Switch) ? ", or `open resistance 10 MΩ` on a switch" : ""));

    private (string Message, string Advice) Coils() => (
        $"{Names(parts)} contradict each other{when}: coils coupled without leakage tie their voltages "
        + "together, so two "
        + "sources cannot both set them",
        "put the winding resistance in series with a coil, or say what leaks: a coupling of 0.99");

    private (string Message, string Advice) Dependent(bool contradicts)
    {
        var isOne = parts.Length == 1;
        var laws = contradicts
            ? isOne ? "its law contradicts itself" : "their laws contradict each other"
            : isOne ? "its law says nothing" : "their laws say the same twice";
        var contact = parts.Select(p => circuit.Parts[p]).OfType<Switch>().FirstOrDefault();
        var change = Any(p => p is DependentSource) ? "change a gain, or " : "";
        var advice = change + (hasNodes
            ? "give the current a path: a resistance across one of them"
                + (contact is null ? "" : $", or `open resistance 10 MΩ` on `{contact.Name}`")
            : contact is null
            ? "put a resistance in series with one of them"
            : $"give the contact the resistance it has: `closed resistance 1 mΩ` on `{contact.Name}`");
        return ($"{Names(parts)} {(isOne ? "leaves" : "leave")} no unique solution{when}: {laws}", advice);
    }

    private string Kinds(string sources, string contacts) =>
        !Any(p => p is Switch) ? sources : Any(p => p is not Switch) ? $"{sources} and {contacts}" : contacts;

    private bool Any(Func<Part, bool> isMeant) => parts.Any(p => isMeant(circuit.Parts[p]));

    /// <summary>The dependent sources that follow the current of one of the parts.</summary>
    private int[] Followers() =>
    [
        .. Enumerable.Range(0, circuit.Parts.Length).Where(i => circuit.Parts[i] is DependentSource
        {
            Control: CurrentThrough { Part: var followed },
        } && parts.Contains(followed)),
    ];

    private string Names(int[] named)
    {
        const int shown = 8;
        var names = named.Take(shown).Select(p => $"`{circuit.Parts[p].Name}`").ToArray();
        if (named.Length > shown)
        {
            return string.Join(", ", names) + $" and {named.Length - shown} more";
        }

        return names.Length switch
        {
            0 => "the parts",
            1 => names[0],
            _ => $"{string.Join(", ", names[..^1])} and {names[^1]}",
        };
    }
}
