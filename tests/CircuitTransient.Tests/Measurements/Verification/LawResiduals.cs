using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Measurements.Verification;

/// <summary>Kirchhoff's laws and each part's own law, tried on the values of a solution at instant after
/// instant. A residual counts relative to the largest term its law has at any of them, or to a millionth of
/// the circuit's largest voltage or current where its terms are smaller: the difference of two node voltages
/// can be no better.</summary>
/// <param name="circuit">The circuit.</param>
public sealed class LawResiduals(Circuit circuit)
{
    private readonly double[] nodeResidual = new double[circuit.Nodes.Length];
    private readonly double[] nodeTerm = new double[circuit.Nodes.Length];
    private readonly double[] partResidual = new double[circuit.Parts.Length];
    private readonly double[] partTerm = new double[circuit.Parts.Length];
    private readonly bool[] partSumsCurrents = new bool[circuit.Parts.Length];
    private double largestVoltage;
    private double largestCurrent;

    /// <summary>The worst relative residual of the currents at a node.</summary>
    public double WorstAtNodes => Worst(nodeResidual, nodeTerm, _ => largestCurrent);

    /// <summary>The worst relative residual of a part's own law.</summary>
    public double WorstInParts =>
        Worst(partResidual, partTerm, part => partSumsCurrents[part] ? largestCurrent : largestVoltage);

    /// <summary>Tries every law at an instant.</summary>
    /// <param name="closed">For each part whether it is a closed switch.</param>
    /// <param name="time">In seconds; at a jump, values are those after it.</param>
    /// <param name="value">The solution's value of a voltage, a current, or the rate of change of one; NaN
    /// or null where it is open, and such a law is passed over.</param>
    public void Add(ImmutableArray<bool> closed, double time, Func<Measurand, double?> value)
    {
        double Of(Measurand measurand) => value(measurand) ?? double.NaN;
        var currents = new double[circuit.Parts.Length];
        for (var part = 0; part < currents.Length; part++)
        {
            currents[part] = Of(new CurrentThrough(part));
        }

        AddNodes(currents);
        for (var part = 0; part < currents.Length; part++)
        {
            var voltage = Of(new VoltageAcross(part));
            largestVoltage = double.MaxNumber(largestVoltage, Math.Abs(voltage));
            largestCurrent = double.MaxNumber(largestCurrent, Math.Abs(currents[part]));
            partSumsCurrents[part] = SumsCurrents(circuit.Parts[part], closed[part]);
            Enter(partResidual, partTerm, part, Terms(part, closed[part], time, voltage, currents[part], Of));
        }
    }

    private static bool SumsCurrents(Part part, bool isClosed) =>
        part is Capacitor or CurrentSource or DependentSource { SetsVoltage: false }
        || (part is Switch { OpenResistance: null } && !isClosed);

    private double[] Terms(
        int part, bool isClosed, double time, double voltage, double current, Func<Measurand, double> of)
    {
        switch (circuit.Parts[part])
        {
            case Resistor resistor: return [voltage, -resistor.Resistance.Nominal * current];
            case Switch @switch: return SwitchTerms(@switch, isClosed, voltage, current);
            case Capacitor capacitor:
                var rate = of(new RateOfChange(new VoltageAcross(part)));
                return [current, -capacitor.Capacitance.Nominal * rate];
            case Inductor inductor: return CoilTerms(part, inductor, voltage, of);
            case VoltageSource source: return [voltage, -ValueOf(source.Wave, time)];
            case CurrentSource source: return [current, -ValueOf(source.Wave, time)];
            case DependentSource source:
                return [source.SetsVoltage ? voltage : current, -source.Gain.Nominal * of(source.Control)];
            case IdealTransformer transformer:
                var secondary = of(new VoltageBetween(transformer.SecondaryFrom, transformer.SecondaryTo));
                return [voltage, -transformer.Ratio * secondary];
            case var other: throw new System.Diagnostics.UnreachableException($"no law for {other.Kind}");
        }
    }

    private static double Worst(double[] residuals, double[] terms, Func<int, double> largest)
    {
        const double Smallest = 1e-6; // of the circuit's largest: differences of doubles reach 1e-10
        var worst = 0.0;
        for (var i = 0; i < residuals.Length; i++)
        {
            var scale = Math.Max(terms[i], Smallest * largest(i));
            worst = Math.Max(worst, residuals[i] == 0 ? 0 : residuals[i] / scale);
        }

        return worst;
    }

    private static void Enter(double[] residuals, double[] terms, int place, ReadOnlySpan<double> sum)
    {
        DoubleDouble residual = 0;
        var largest = 0.0;
        foreach (var term in sum)
        {
            residual += term;
            largest = Math.Max(largest, Math.Abs(term));
        }

        if (!double.IsNaN(residual.Hi))
        {
            residuals[place] = Math.Max(residuals[place], Math.Abs(residual.Hi));
            terms[place] = Math.Max(terms[place], largest);
        }
    }

    // Nodes joined by contacts whose own currents are open are one node to this law.
    private void AddNodes(double[] currents)
    {
        var joined = new NodeSets(circuit.Nodes.Length);
        var terms = new List<double>[circuit.Nodes.Length];
        for (var part = 0; part < currents.Length; part++)
        {
            if (double.IsNaN(currents[part]))
            {
                joined.Join(circuit.Parts[part].From, circuit.Parts[part].To);
            }
        }

        void Leave(int node, double current) => (terms[joined.Find(node)] ??= []).Add(current);
        for (var part = 0; part < currents.Length; part++)
        {
            if (double.IsNaN(currents[part]))
            {
                continue;
            }

            Leave(circuit.Parts[part].From, currents[part]);
            Leave(circuit.Parts[part].To, -currents[part]);
            if (circuit.Parts[part] is IdealTransformer transformer)
            {
                Leave(transformer.SecondaryFrom, -transformer.Ratio * currents[part]);
                Leave(transformer.SecondaryTo, transformer.Ratio * currents[part]);
            }
        }

        for (var node = 0; node < terms.Length; node++)
        {
            Enter(nodeResidual, nodeTerm, node, [.. terms[node] ?? []]);
        }
    }

    private static double[] SwitchTerms(Switch @switch, bool isClosed, double voltage, double current) =>
        (isClosed ? @switch.ClosedResistance : @switch.OpenResistance) is { } resistance
            ? [voltage, -resistance.Nominal * current]
            : isClosed ? [voltage] : [current];

    private double[] CoilTerms(int part, Inductor inductor, double voltage, Func<Measurand, double> of)
    {
        var terms = new List<double>
        {
            voltage, -inductor.Inductance.Nominal * of(new RateOfChange(new CurrentThrough(part))),
        };
        foreach (var coupling in circuit.Couplings)
        {
            if (coupling.First == part || coupling.Second == part)
            {
                var other = coupling.First == part ? coupling.Second : coupling.First;
                var mutual = (double)StorageLayout.MutualInductance(circuit, coupling);
                terms.Add(-mutual * of(new RateOfChange(new CurrentThrough(other))));
            }
        }

        return [.. terms];
    }

    private static double ValueOf(Wave wave, double time)
    {
        DoubleDouble sum = 0;
        foreach (var piece in wave.Pieces)
        {
            if (piece.Start <= time && time < piece.End)
            {
                var since = (DoubleDouble)time - piece.Start;
                var cos = DoubleDouble.SinCos((since * piece.AngularFrequency) + piece.Phase).Cos;
                var size = DoubleDouble.Exp(since * -piece.DecayRate) * cos;
                sum += ((since * piece.Slope) + piece.Amplitude) * size;
            }
        }

        return (double)(sum * wave.Scale.Nominal);
    }
}
