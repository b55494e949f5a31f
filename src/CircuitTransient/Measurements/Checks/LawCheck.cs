using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

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
                || part is Switch { OpenResistance: null }
                ? current
                : sizes.Of(new VoltageAcross(i));
            var trace = part switch
            {
                Capacitor c => c.Capacitance.Nominal * sizes.RateTrace(isCurrent: false),
                Inductor l => l.Inductance.Nominal * sizes.RateTrace(isCurrent: true),
                _ => 0,
            };
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
            worst = Math.Max(worst, check.scales[k] == 0 ? 0 : check.residuals[k] / check.scales[k]);
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
            PartLaw(i, segment.Model, time, tau == segment.Length, voltages, currents);
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
            if (part is IdealTransformer || currents[i] is not { } current)
            {
                isOpen[part.From] = isOpen[part.To] = true;
                if (part is IdealTransformer t)
                {
                    isOpen[t.SecondaryFrom] = isOpen[t.SecondaryTo] = true;
                }

                continue;
            }

            sums[part.From] += current.Value;
            sums[part.To] -= current.Value;
        }

        for (var node = 0; node < sums.Length; node++)
        {
            if (!isOpen[node])
            {
                Note(node, sums[node]);
            }
        }
    }

    private void PartLaw(
        int i, IntervalModel model, double time, bool before,
        (double Value, double Slope)?[] voltages, (double Value, double Slope)?[] currents)
    {
        if (voltages[i] is not { } v || currents[i] is not { } c)
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
            case VoltageSource source:
                Note(place, v.Value - WaveValue.At(source.Wave, time, before));
                break;
            case CurrentSource source:
                Note(place, c.Value - WaveValue.At(source.Wave, time, before));
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
        }
    }

    private double Induced(int coil, (double Value, double Slope)?[] currents) =>
        circuit.Couplings.Where(k => k.First == coil || k.Second == coil).Sum(k =>
            (double)MutualInductances.Mutual(circuit, k)
            * (currents[k.First == coil ? k.Second : k.First]?.Slope ?? double.NaN));

    private void Note(int place, double residual) =>
        residuals[place] = Math.Max(residuals[place], Math.Abs(residual));
}
