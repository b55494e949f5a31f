using System.Diagnostics;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;
using Switch = CircuitTransient.Circuits.Switch;

namespace CircuitTransient.Measurements.Checks;

/// <summary>Kirchhoff's current law at every node and every part's own law, at the ends of segments and
/// between them: each residual over the size that the terms of its law have in the study.</summary>
internal sealed class LawCheck
{
    private const int MostSegments = 12;
    private const int MostInside = 6;
    private const double GoldenPart = 0.381966011250105; // least likely to be a zero of a periodic wave

    private readonly CurveBuilder curves;
    private readonly Circuit circuit;
    private readonly double[] residuals;
    private readonly double[] scales;

    private LawCheck(CurveBuilder curves, StudySizes sizes)
    {
        this.curves = curves;
        circuit = curves.Solution.Circuit;
        residuals = new double[circuit.Nodes.Length + circuit.Parts.Length];
        scales = new double[residuals.Length];
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            var part = circuit.Parts[i];
            var current = sizes.Of(new CurrentThrough(i));
            scales[part.From] = Math.Max(scales[part.From], current);
            scales[part.To] = Math.Max(scales[part.To], current);
            scales[circuit.Nodes.Length + i] = part is Capacitor or CurrentSource
                || part is Switch { OpenResistance: null } || part is DependentSource { SetsVoltage: false }
                ? current
                : sizes.Of(new VoltageAcross(i));
            var trace = part switch
            {
                Capacitor c => c.Capacitance.Nominal * sizes.RateTrace(isCurrent: false),
                Inductor l => l.Inductance.Nominal * sizes.RateTrace(isCurrent: true),
                DependentSource d => Math.Abs(d.Gain.Nominal) * sizes.Of(d.Control),
                IdealTransformer t => Math.Abs(t.Ratio) * sizes.Of(Secondary(t)),
                _ => 0,
            };
            if (part is IdealTransformer transformer)
            {
                var secondary = Math.Abs(transformer.Ratio) * current;
                scales[transformer.SecondaryFrom] = Math.Max(scales[transformer.SecondaryFrom], secondary);
                scales[transformer.SecondaryTo] = Math.Max(scales[transformer.SecondaryTo], secondary);
            }

            scales[circuit.Nodes.Length + i] = Math.Max(scales[circuit.Nodes.Length + i], trace);
        }
    }

    /// <summary>The worst relative residual.</summary>
    public static double Worst(CurveBuilder curves, StudySizes sizes)
    {
        var check = new LawCheck(curves, sizes);
        var count = curves.Tables.Length;
        var step = Math.Max(1, count / MostSegments);
        for (var s = 0; s < count; s += step)
        {
            foreach (var tau in Instants(curves.Tables[s]))
            {
                check.Sample(s, tau);
            }
        }

        double worst = 0;
        for (var k = 0; k < check.residuals.Length; k++)
        {
            worst = Math.Max(worst, StudySizes.Relative(check.residuals[k], check.scales[k]));
        }

        return worst;
    }

    /// <summary>The ends, and instants between them where the modes live: even parts of a segment may all be
    /// zeros of a sine, or all lie where everything has decayed.</summary>
    private static IEnumerable<double> Instants(SegmentTable table)
    {
        yield return 0;
        var panels = table.Instants.Length - 1;
        for (var k = 0; k < Math.Min(MostInside, panels); k++)
        {
            var panel = panels * k / Math.Min(MostInside, panels);
            yield return double.Lerp(table.Instants[panel], table.Instants[panel + 1], GoldenPart);
        }

        yield return table.Segment.Length;
    }

    private void Sample(int s, double tau)
    {
        var segment = curves.Tables[s].Segment;
        var phi = new double[segment.Basis.Width];
        segment.Basis.Evaluate(tau, phi);
        var currents = new (double Value, double Slope)?[circuit.Parts.Length];
        var voltages = new (double Value, double Slope)?[circuit.Parts.Length];
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            currents[i] = Value(s, new CurrentThrough(i), phi);
            voltages[i] = Value(s, new VoltageAcross(i), phi);
        }

        NodeLaws(currents);
        var time = segment.Start + tau;
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            if (voltages[i] is { } voltage && currents[i] is { } current)
            {
                var source = circuit.Parts[i] switch
                {
                    VoltageSource v => WaveValue.At(v.Wave, time, before: tau == segment.Length),
                    CurrentSource c => WaveValue.At(c.Wave, time, before: tau == segment.Length),
                    DependentSource d => Value(s, d.Control, phi)?.Value * d.Gain.Nominal,
                    IdealTransformer t => Value(s, Secondary(t), phi)?.Value * t.Ratio,
                    _ => 0,
                };
                PartLaw(i, segment.Model, source, voltage, current, currents);
            }
        }
    }

    private (double Value, double Slope)? Value(int s, Measurand quantity, double[] phi)
    {
        if (curves.Tables[s].Segment.Coefficients(quantity) is not { } c)
        {
            return null;
        }

        var (value, slope, _) = new LinearPiece(curves.Tables[s], c).At(0, phi);
        return (value, slope);
    }

    private void NodeLaws((double Value, double Slope)?[] currents)
    {
        var sums = new double[circuit.Nodes.Length];
        var isOpen = new bool[circuit.Nodes.Length];
        for (var i = 0; i < currents.Length; i++)
        {
            var part = circuit.Parts[i];
            Join(part.From, part.To, currents[i]?.Value);
            if (part is IdealTransformer t)
            {
                Join(t.SecondaryFrom, t.SecondaryTo, -t.Ratio * currents[i]?.Value); // no power is lost
            }
        }

        for (var node = 0; node < sums.Length; node++)
        {
            if (!isOpen[node])
            {
                Note(node, sums[node]);
            }
        }

        void Join(int from, int to, double? current)
        {
            isOpen[from] |= current is null;
            isOpen[to] |= current is null;
            sums[from] += current ?? 0;
            sums[to] -= current ?? 0;
        }
    }

    /// <summary>Notes by how much a part misses its law.</summary>
    /// <param name="i">Index of the part.</param>
    /// <param name="model">Which switches are closed.</param>
    /// <param name="set">What a source, or the other side of a transformer, sets; null where that is
    /// open.</param>
    /// <param name="v">The part's voltage.</param>
    /// <param name="c">Its current.</param>
    /// <param name="currents">All currents, for coupled coils.</param>
    private void PartLaw(
        int i, IntervalModel model, double? set, (double Value, double Slope) v,
        (double Value, double Slope) c, (double Value, double Slope)?[] currents)
    {
        if (set is not { } given)
        {
            return;
        }

        var place = circuit.Nodes.Length + i;
        switch (circuit.Parts[i])
        {
            case Resistor r:
                Note(place, v.Value - (r.Resistance.Nominal * c.Value));
                break;
            case Capacitor k:
                Note(place, c.Value - (k.Capacitance.Nominal * v.Slope));
                break;
            case Inductor l:
                var own = l.Inductance.Nominal * c.Slope;
                Note(place, v.Value - own - Induced(i, currents));
                // near k = 1 two large terms leave a small voltage, and with it their rounding
                scales[place] = Math.Max(scales[place], Math.Abs(own));
                break;
            case VoltageSource or DependentSource { SetsVoltage: true } or IdealTransformer:
                Note(place, v.Value - given);
                break;
            case CurrentSource or DependentSource:
                Note(place, c.Value - given);
                break;
            case Switch s when model.IsClosed[i]:
                Note(place, v.Value - ((s.ClosedResistance?.Nominal ?? 0) * c.Value));
                break;
            case Switch { OpenResistance: { } open }:
                Note(place, v.Value - (open.Nominal * c.Value));
                break;
            case Switch:
                Note(place, c.Value);
                break;
            default:
                throw new UnreachableException($"no law for {circuit.Parts[i]}");
        }
    }

    private static VoltageBetween Secondary(IdealTransformer t) => new(t.SecondaryFrom, t.SecondaryTo);

    private double Induced(int coil, (double Value, double Slope)?[] currents) =>
        circuit.Couplings.Where(k => k.First == coil || k.Second == coil).Sum(k =>
            (double)MutualInductances.Mutual(circuit, k)
            * (currents[k.First == coil ? k.Second : k.First]?.Slope ?? double.NaN));

    private void Note(int place, double residual) =>
        residuals[place] = Math.Max(residuals[place], Math.Abs(residual));
}
