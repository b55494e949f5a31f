using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Which unknowns the equations have for given switch positions: the voltages of nodes and the
/// currents of the parts that need one of their own.</summary>
/// <param name="NodeUnknown">For each node its unknown, −1 where the voltage is zero: the reference, and one
/// node of each island that nothing ties to it.</param>
/// <param name="Island">For each node the node that stands for its island; islands float against each
/// other.</param>
/// <param name="CurrentUnknown">For each part the unknown that is its current, or −1.</param>
/// <param name="Kinds">For each part how it conducts in these positions.</param>
/// <param name="IsClosed">For each part whether it is a closed switch.</param>
/// <param name="UnknownCount">Number of unknowns.</param>
internal sealed record UnknownLayout(
    ImmutableArray<int> NodeUnknown, ImmutableArray<int> Island, ImmutableArray<int> CurrentUnknown,
    ImmutableArray<Conduction> Kinds, ImmutableArray<bool> IsClosed, int UnknownCount)
{
    /// <summary>The layout for switch positions.</summary>
    /// <param name="closed">For each part whether it is a closed switch.</param>
    /// <param name="resistorsAsBranches">Whether every resistance keeps a current of its own, so that a small
    /// conductance is not added to a large one.</param>
    public static UnknownLayout Of(Circuit circuit, ImmutableArray<bool> closed, bool resistorsAsBranches)
    {
        var kinds = Conductions(circuit, closed);
        var islands = new NodeSets(circuit.Nodes.Length);
        for (var part = 0; part < kinds.Length; part++)
        {
            var p = circuit.Parts[part];
            if (kinds[part] != Conduction.Gap)
            {
                islands.Join(p.From, p.To);
            }

            if (p is IdealTransformer transformer)
            {
                islands.Join(transformer.SecondaryFrom, transformer.SecondaryTo);
            }
        }

        var count = 0;
        var island = new int[circuit.Nodes.Length];
        var nodeUnknown = new int[circuit.Nodes.Length];
        for (var node = 0; node < nodeUnknown.Length; node++)
        {
            island[node] = islands.Find(node);
            nodeUnknown[node] = island[node] == node ? -1 : count++;
        }

        var controlling = ControllingParts(circuit);
        var currentUnknown = new int[kinds.Length];
        for (var part = 0; part < kinds.Length; part++)
        {
            var needsOne = kinds[part] == Conduction.OwnLaw
                ? NeedsCurrent(circuit.Parts[part], controlling[part], resistorsAsBranches)
                : kinds[part] is Conduction.Contact or Conduction.LoopContact;
            currentUnknown[part] = needsOne ? count++ : -1;
        }

        return new UnknownLayout([.. nodeUnknown], [.. island], [.. currentUnknown], kinds, closed, count);
    }

    private static bool NeedsCurrent(Part part, bool controls, bool resistorsAsBranches) => part switch
    {
        Inductor or VoltageSource or IdealTransformer => true,
        DependentSource dependent => dependent.SetsVoltage || controls,
        Resistor or Switch => controls || resistorsAsBranches,
        _ => controls,
    };

    private static bool[] ControllingParts(Circuit circuit)
    {
        var controlling = new bool[circuit.Parts.Length];
        foreach (var part in circuit.Parts)
        {
            if (part is DependentSource { Control: CurrentThrough control })
            {
                controlling[control.Part] = true;
            }
        }

        return controlling;
    }

    // A contact that closes a loop of contacts adds nothing but an open question: it is left out, and every
    // contact of such a loop has a current that the equations leave open.
    private static ImmutableArray<Conduction> Conductions(Circuit circuit, ImmutableArray<bool> closed)
    {
        var kinds = new Conduction[circuit.Parts.Length];
        var contacts = new NodeSets(circuit.Nodes.Length);
        var hasLoop = false;
        for (var part = 0; part < kinds.Length; part++)
        {
            if (circuit.Parts[part] is not Switch @switch)
            {
                continue;
            }

            var resistance = closed[part] ? @switch.ClosedResistance : @switch.OpenResistance;
            kinds[part] = resistance is not null ? Conduction.OwnLaw
                : !closed[part] ? Conduction.Gap
                : contacts.Join(@switch.From, @switch.To) ? Conduction.Contact
                : Conduction.SpareContact;
            hasLoop |= kinds[part] == Conduction.SpareContact;
        }

        for (var part = 0; hasLoop && part < kinds.Length; part++)
        {
            if (kinds[part] == Conduction.Contact && StaysJoinedWithout(circuit, kinds, part))
            {
                kinds[part] = Conduction.LoopContact;
            }
        }

        return [.. kinds];
    }

    private static bool StaysJoinedWithout(Circuit circuit, Conduction[] kinds, int left)
    {
        var contacts = new NodeSets(circuit.Nodes.Length);
        for (var part = 0; part < kinds.Length; part++)
        {
            if (part != left
                && kinds[part] is Conduction.Contact or Conduction.LoopContact or Conduction.SpareContact)
            {
                contacts.Join(circuit.Parts[part].From, circuit.Parts[part].To);
            }
        }

        return contacts.Find(circuit.Parts[left].From) == contacts.Find(circuit.Parts[left].To);
    }
}

/// <summary>How a part conducts in given switch positions.</summary>
internal enum Conduction
{
    /// <summary>By the law of its kind.</summary>
    OwnLaw,

    /// <summary>An open ideal switch: not at all.</summary>
    Gap,

    /// <summary>A closed ideal switch whose current the equations fix.</summary>
    Contact,

    /// <summary>A closed ideal switch in a loop of such: its own current stays open.</summary>
    LoopContact,

    /// <summary>The contact that closes such a loop.</summary>
    SpareContact,
}
