using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;

namespace CircuitTransient.Studies.Draws;

/// <summary>Turns a draw's values into what they change: the parameters, the deviations Δ of parts, the
/// factors of sources, what is stored at the start.</summary>
internal sealed class DrawValues
{
    private readonly InstrumentedCircuit circuit;
    private readonly ImmutableArray<VariedValue> values;
    private readonly double[] nominal;
    private readonly double[] nominalMutuals;
    private readonly int[] instrumentOf;

    public DrawValues(InstrumentedCircuit circuit, ImmutableArray<VariedValue> values)
    {
        this.circuit = circuit;
        this.values = values;
        nominal = [.. circuit.Original.Parameters.Select(p => p.Nominal)];
        nominalMutuals = [.. circuit.Original.Couplings
            .Select(c => (double)MutualInductances.Mutual(circuit.Original, c))];
        instrumentOf = new int[circuit.Original.Parts.Length];
        Array.Fill(instrumentOf, -1);
        for (var k = 0; k < circuit.Instruments.Length; k++)
        {
            instrumentOf[circuit.Instruments[k].Part] = k;
        }
    }

    /// <summary>How many parameters the circuit has.</summary>
    public int ParameterCount => nominal.Length;

    /// <summary>The parameters of a draw.</summary>
    public void PutParameters(ReadOnlySpan<double> draw, Span<double> parameters)
    {
        nominal.CopyTo(parameters);
        for (var i = 0; i < values.Length; i++)
        {
            if (values[i].Parameter >= 0)
            {
                parameters[values[i].Parameter] = draw[i];
            }
        }
    }

    /// <summary>By how much a source's phase is turned, in radians.</summary>
    public double PhaseShift(int source, ReadOnlySpan<double> draw)
    {
        for (var i = 0; i < values.Length; i++)
        {
            if (values[i].Source == source)
            {
                return draw[i] - values[i].Nominal;
            }
        }

        return 0;
    }

    /// <summary>Fills in Δ for one set of switch positions.</summary>
    /// <param name="isClosed">For every part, whether it is a closed switch.</param>
    /// <param name="parameters">The draw's parameters.</param>
    /// <param name="delta">Instruments × Instruments, row by row.</param>
    /// <returns>False where a value is none that a part can have.</returns>
    public bool PutDeviations(
        ImmutableArray<bool> isClosed, ReadOnlySpan<double> parameters, Span<double> delta)
    {
        var m = circuit.Instruments.Length;
        delta.Clear();
        for (var k = 0; k < m; k++)
        {
            var part = circuit.Original.Parts[circuit.Instruments[k].Part];
            var quantity = Of(part, isClosed[circuit.Instruments[k].Part]);
            if (quantity is null)
            {
                continue;
            }

            var value = FormulaValue.Of(quantity, parameters);
            if (!double.IsFinite(value) || !CanBe(part, value, quantity.Nominal))
            {
                return false;
            }

            delta[(k * m) + k] = value - quantity.Nominal;
        }

        return PutMutuals(parameters, delta);
    }

    /// <summary>A resistance keeps its sign, all else but a gain is positive.</summary>
    private static bool CanBe(Part part, double value, double nominal) => part switch
    {
        DependentSource => true,
        Resistor => value * nominal > 0,
        _ => value > 0,
    };

    private static Quantity? Of(Part part, bool isClosed) => part switch
    {
        Resistor r => r.Resistance,
        Capacitor c => c.Capacitance,
        Inductor l => l.Inductance,
        DependentSource d => d.Gain,
        Switch s => isClosed ? s.ClosedResistance : s.OpenResistance,
        _ => null,
    };

    private bool PutMutuals(ReadOnlySpan<double> parameters, Span<double> delta)
    {
        var m = circuit.Instruments.Length;
        for (var c = 0; c < nominalMutuals.Length; c++)
        {
            var coupling = circuit.Original.Couplings[c];
            var (i, j) = (instrumentOf[coupling.First], instrumentOf[coupling.Second]);
            if (i < 0 || j < 0)
            {
                continue;
            }

            var mutual = Mutual(c, parameters, out var most);
            if (!(Math.Abs(mutual) < most))
            {
                return false;
            }

            delta[(i * m) + j] += mutual - nominalMutuals[c];
            delta[(j * m) + i] += mutual - nominalMutuals[c];
        }

        return true;
    }

    /// <summary>A mutual inductance in henries, and the most it may be.</summary>
    public double Mutual(int coupling, ReadOnlySpan<double> parameters, out double most)
    {
        var declared = circuit.Original.Couplings[coupling];
        var first = ((Inductor)circuit.Original.Parts[declared.First]).Inductance;
        var second = ((Inductor)circuit.Original.Parts[declared.Second]).Inductance;
        most = Math.Sqrt(FormulaValue.Of(first, parameters) * FormulaValue.Of(second, parameters));
        var value = FormulaValue.Of(declared.Value, parameters);
        return declared.IsFactor ? value * most : value;
    }

    /// <summary>What every store holds at t = 0⁻ as stated; not a number where nothing is.</summary>
    public void PutStored(ReadOnlySpan<double> parameters, Span<double> stored)
    {
        var stores = circuit.Layout.Stores;
        for (var k = 0; k < stores.Length; k++)
        {
            var stated = circuit.Original.Parts[stores[k]] switch
            {
                Capacitor c => c.InitialVoltage,
                Inductor l => l.InitialCurrent,
                _ => null,
            };
            stored[k] = stated is null ? double.NaN : FormulaValue.Of(stated, parameters);
        }
    }
}
