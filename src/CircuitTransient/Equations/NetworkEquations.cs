using System.Collections.Immutable;
using System.Diagnostics;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using Switch = CircuitTransient.Circuits.Switch;

namespace CircuitTransient.Equations;

/// <summary>The equations (s E + G) X = R (U, x₀) of a circuit with its switches in given positions:
/// Kirchhoff's current law at every node but the reference, then the law of every part. Every part keeps its
/// current as an unknown, so a microohm stands in a row of its own and is never added to a large conductance.
/// A capacitor's law is divided by its capacitance and a lone inductor's by its inductance: the rows of E
/// hold small whole numbers, so loops of capacitors and cut-sets of coils cancel exactly.</summary>
internal sealed class NetworkEquations
{
    private readonly NetworkLayout layout;
    private readonly ImmutableArray<bool> isClosed;
    private readonly ImmutableArray<ImmutableArray<(int Coil, DoubleDouble Mutual)>> mutuals;
    private readonly List<EquationRow> rows = [];
    private readonly bool tracksOrigin;

    private NetworkEquations(NetworkLayout layout, ImmutableArray<bool> isClosed, bool tracksOrigin)
    {
        this.layout = layout;
        this.isClosed = isClosed;
        this.tracksOrigin = tracksOrigin || layout.Circuit.Parts.Any(p => p is DependentSource);
        mutuals = MutualInductances.Of(layout.Circuit);
    }

    /// <summary>Writes the equations.</summary>
    /// <param name="layout">Where each unknown and input stands.</param>
    /// <param name="isClosed">For every part, whether it is a switch that is closed.</param>
    /// <param name="tracksOrigin">Whether rows remember which written equations they are sums of: row k of
    /// the nodes first (node k + 1), then the parts in order; they do so in any case where there are
    /// dependent sources, which may say the same twice.</param>
    public static List<EquationRow> Assemble(
        NetworkLayout layout, ImmutableArray<bool> isClosed, bool tracksOrigin = false)
    {
        var equations = new NetworkEquations(layout, isClosed, tracksOrigin);
        equations.WriteCurrentLaws();
        for (var i = 0; i < layout.Circuit.Parts.Length; i++)
        {
            var law = equations.rows.Count;
            equations.WritePartLaw(i, layout.Circuit.Parts[i]);
            if (layout.Disturbance(i) is >= 0 and var input)
            {
                equations.rows[law] = equations.rows[law].WithInput(input);
            }
        }

        return equations.rows;
    }

    private void WriteCurrentLaws()
    {
        var entries = new List<(int, DoubleDouble)>[layout.Circuit.Nodes.Length];
        for (var k = 0; k < entries.Length; k++)
        {
            entries[k] = [];
        }

        for (var i = 0; i < layout.Circuit.Parts.Length; i++)
        {
            var part = layout.Circuit.Parts[i];
            entries[part.From].Add((layout.Current(i), 1));
            entries[part.To].Add((layout.Current(i), -1));
            if (part is IdealTransformer transformer)
            {
                entries[transformer.SecondaryFrom].Add((layout.SecondaryCurrent(i), 1));
                entries[transformer.SecondaryTo].Add((layout.SecondaryCurrent(i), -1));
            }
        }

        foreach (var node in entries.Skip(1))
        {
            Write([], node);
        }
    }

    private void WritePartLaw(int index, Part part)
    {
        var i = layout.Current(index);
        var input = layout.Input(index);
        switch (part)
        {
            case Resistor r:
                WriteResistance(part, i, r.Resistance.Nominal);
                break;
            case Capacitor c:
                Write(Voltage(part), [(i, -1 / (DoubleDouble)c.Capacitance.Nominal)], (input, 1));
                break;
            case Inductor l:
                WriteInductor(index, l);
                break;
            case VoltageSource:
                Write([], Voltage(part), (input, 1));
                break;
            case CurrentSource:
                Write([], [(i, 1)], (input, 1));
                break;
            case Switch s when isClosed[index]:
                WriteResistance(part, i, s.ClosedResistance?.Nominal ?? 0);
                break;
            case Switch { OpenResistance: { } open }:
                WriteResistance(part, i, open.Nominal);
                break;
            case Switch:
                Write([], [(i, 1)]);
                break;
            case DependentSource d:
                var set = d.SetsVoltage ? Voltage(part) : [(i, DoubleDouble.One)];
                Write([], [.. set, .. Control(d.Control).Select(t => (t.Index, -d.Gain.Nominal * t.Value))]);
                break;
            case IdealTransformer t:
                WriteTransformer(index, t);
                break;
            default:
                throw new UnreachableException($"no equation for {part}");
        }
    }

    private void WriteResistance(Part part, int current, double resistance) =>
        Write([], [.. Voltage(part), (current, -(DoubleDouble)resistance)]);

    private void WriteInductor(int index, Inductor coil)
    {
        var inductance = (DoubleDouble)coil.Inductance.Nominal;
        (int, DoubleDouble)[] flux =
        [
            (layout.Current(index), 1),
            .. mutuals[index].Select(m => (layout.Current(m.Coil), m.Mutual / inductance)),
        ];
        (int, DoubleDouble)[] stored =
        [
            (layout.Input(index), 1),
            .. mutuals[index].Select(m => (layout.Input(m.Coil), m.Mutual / inductance)),
        ];
        Write(flux, [.. Voltage(coil).Select(t => (t.Index, -t.Value / inductance))], stored);
    }

    private void WriteTransformer(int index, IdealTransformer transformer)
    {
        var secondary = Between(transformer.SecondaryFrom, transformer.SecondaryTo);
        Write([], [.. Voltage(transformer),
            .. secondary.Select(t => (t.Index, -transformer.Ratio * t.Value))]);
        Write([], [(layout.SecondaryCurrent(index), 1), (layout.Current(index), transformer.Ratio)]);
    }

    private (int Index, DoubleDouble Value)[] Control(Measurand measurand) => measurand switch
    {
        VoltageBetween v => Between(v.From, v.To),
        VoltageAcross v => Voltage(layout.Circuit.Parts[v.Part]),
        CurrentThrough c => [(layout.Current(c.Part), c.Delivered ? -1 : 1)],
        _ => throw new UnreachableException($"nothing follows {measurand}"),
    };

    private static (int Index, DoubleDouble Value)[] Voltage(Part part) => Between(part.From, part.To);

    private static (int Index, DoubleDouble Value)[] Between(int from, int to) =>
        [.. new[] { (NetworkLayout.Voltage(from), DoubleDouble.One),
            (NetworkLayout.Voltage(to), -DoubleDouble.One) }
            .Where(t => t.Item1 >= 0)];

    private void Write(
        (int, DoubleDouble)[] e, IEnumerable<(int, DoubleDouble)> g, params (int, DoubleDouble)[] right)
    {
        var origin = tracksOrigin
            ? new SparseVector(new Term(rows.Count, DoubleDouble.One, 1))
            : SparseVector.Empty;
        rows.Add(new EquationRow(
            SparseVector.From(e), SparseVector.From(g), [SparseVector.From(right)], origin));
    }
}
