using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>Makes a varied form from the exact engine's normal form of the instrumented circuit.</summary>
internal sealed class VariedFormBuilder
{
    private readonly InstrumentedCircuit circuit;
    private readonly NormalForm form;
    private readonly LinearOutput[] followed;
    private readonly LinearOutput[] outputs;

    private VariedFormBuilder(
        InstrumentedCircuit circuit, NormalForm form, ImmutableArray<Measurand> rows)
    {
        this.circuit = circuit;
        this.form = form;
        followed = [.. circuit.Instruments.Select(Followed)];
        outputs = [.. rows.Select(r => circuit.Output(form, r))];
    }

    /// <summary>The form with the switches in given positions; null, with the reason, where there is
    /// none.</summary>
    /// <param name="circuit">The instrumented circuit.</param>
    /// <param name="isClosed">For every part of the original, whether it is a closed switch.</param>
    /// <param name="rows">The voltages and currents wanted.</param>
    public static (VariedForm? Form, string? Reason) Build(
        InstrumentedCircuit circuit, ImmutableArray<bool> isClosed, ImmutableArray<Measurand> rows)
    {
        ImmutableArray<bool> positions =
            [.. isClosed, .. new bool[circuit.Layout.Circuit.Parts.Length - isClosed.Length]];
        var equations = NetworkEquations.Assemble(circuit.Layout, positions);
        if (DescriptorReduction.Reduce(circuit.Layout, equations, out _) is not { } form)
        {
            return (null, "an interval has no unique solution");
        }

        var builder = new VariedFormBuilder(circuit, form, rows);
        return builder.Reason() is { } reason ? (null, reason) : (builder.Make(), null);
    }

    /// <summary>What an instrument follows: a current, i′ of a coil, v′ of a capacitor, or what controls a
    /// dependent source.</summary>
    private LinearOutput Followed(Instrument instrument)
    {
        var part = circuit.Layout.Circuit.Parts[instrument.Part];
        switch (part)
        {
            case Capacitor c:
                return Scaled(1 / (DoubleDouble)c.Capacitance.Nominal,
                    Outputs.Of(form, new CurrentThrough(instrument.Part)));
            case Inductor l:
                var isCoupled = circuit.Original.Couplings.Any(k =>
                    k.First == instrument.Part || k.Second == instrument.Part);
                return isCoupled
                    ? Rate(instrument.Part)
                    : Scaled(1 / (DoubleDouble)l.Inductance.Nominal,
                        Outputs.Of(form, new VoltageBetween(part.From, part.To)));
            case DependentSource d:
                return Outputs.Of(form, d.Control);
            default:
                return Outputs.Of(form, new CurrentThrough(instrument.Part));
        }
    }

    private static LinearOutput Scaled(DoubleDouble factor, LinearOutput output) =>
        LinearOutput.Combine(factor, output, 0, output);

    /// <summary>s i − i(0⁻) of a coil: every input counts from the interval's start, a stored quantity as an
    /// impulse.</summary>
    private LinearOutput Rate(int part)
    {
        var current = Outputs.Of(form, new CurrentThrough(part));
        var state = new DoubleDouble[form.Order];
        var first = new DoubleDouble[form.Layout.InputCount];
        for (var i = 0; i < form.Order; i++)
        {
            for (var j = 0; j < form.Order; j++)
            {
                state[j] += current.State[i] * form.A[i, j];
            }

            for (var j = 0; j < first.Length; j++)
            {
                first[j] += current.State[i] * form.B[i, j];
            }
        }

        var input = form.Layout.Input(part);
        first[input] = Cleaned(first[input] - 1, 1);
        return new LinearOutput(state, [first, .. current.Direct], current.Open);
    }

    private static DoubleDouble Cleaned(DoubleDouble value, double size) =>
        Math.Abs(value.Hi) < 1e-24 * size ? DoubleDouble.Zero : value;

    private string? Reason()
    {
        for (var k = 0; k < followed.Length; k++)
        {
            var name = circuit.Original.Parts[circuit.Instruments[k].Part].Name;
            if (!followed[k].IsDetermined)
            {
                return $"nothing decides what `{name}` carries";
            }

            if (!IsHeld(followed[k]))
            {
                return $"`{name}` sees derivatives of other varied parts or of stored quantities";
            }
        }

        return null;
    }

    /// <summary>Whether an output takes no more than u and u′ of sources and the impulses of stored
    /// quantities and instruments.</summary>
    private bool IsHeld(LinearOutput output)
    {
        for (var k = 1; k < output.Direct.Length; k++)
        {
            for (var i = 0; i < output.Direct[k].Length; i++)
            {
                var isSource = i < circuit.SourceCount;
                if (!output.Direct[k][i].IsZero && (!isSource || k > 1))
                {
                    return false;
                }
            }
        }

        return true;
    }

    private VariedForm Make()
    {
        var coordinates = ModalCoordinates.Of(form.A);
        var (sources, instruments) = (circuit.SourceCount, circuit.Instruments.Length);
        var stores = form.Layout.Stores.Length;
        var n = form.Order;
        var b = coordinates.Inputs(form.B);
        var weights = circuit.Instruments.Select(Weight).ToArray();
        var c = coordinates.Outputs([.. followed.Select(f => f.State)]);
        var a = coordinates.Matrix;
        var scales = ModalCoordinates.Balance(a, b, c, sources, weights);
        ModalCoordinates.Scale(a, b, scales);
        return new VariedForm
        {
            Order = n,
            Instruments = instruments,
            Sources = sources,
            Stores = stores,
            Rows = outputs.Length,
            A = a.Cast<double>().ToArray(),
            B = Columns(b, 0, sources),
            BInstruments = Columns(b, sources, instruments),
            BStores = Columns(b, sources + instruments, stores),
            Followed = Matrices(followed, coordinates, scales),
            Outputs = Matrices(outputs, coordinates, scales),
            IsServed = [.. outputs.Select(o => o.IsDetermined && IsHeld(o))],
        };
    }

    /// <summary>The size of a deviation: what the loop through an instrument is weighed by.</summary>
    private double Weight(Instrument instrument) => 0.1 * circuit.Original.Parts[instrument.Part] switch
    {
        Resistor r => Math.Abs(r.Resistance.Nominal),
        Capacitor c => c.Capacitance.Nominal,
        Inductor l => l.Inductance.Nominal,
        DependentSource d => Math.Abs(d.Gain.Nominal),
        Switch s => Math.Abs((s.ClosedResistance ?? s.OpenResistance)!.Nominal),
        _ => 1,
    };

    private OutputMatrices Matrices(LinearOutput[] list, ModalCoordinates coordinates, double[] scales)
    {
        var (sources, instruments) = (circuit.SourceCount, circuit.Instruments.Length);
        var state = coordinates.Outputs([.. list.Select(o => o.State)]);
        for (var i = 0; i < list.Length; i++)
        {
            for (var j = 0; j < scales.Length; j++)
            {
                state[i, j] *= scales[j];
            }
        }

        return new OutputMatrices(
            state.Cast<double>().ToArray(),
            Direct(list, 0, 0, sources),
            Direct(list, 1, 0, sources),
            Direct(list, 0, sources + instruments, form.Layout.Stores.Length),
            Direct(list, 0, sources, instruments));
    }

    private static double[] Direct(LinearOutput[] list, int order, int first, int count)
    {
        var matrix = new double[list.Length * count];
        for (var i = 0; i < list.Length; i++)
        {
            for (var j = 0; j < count && order < list[i].Direct.Length; j++)
            {
                matrix[(i * count) + j] = (double)list[i].Direct[order][first + j];
            }
        }

        return matrix;
    }

    private static double[] Columns(double[,] matrix, int first, int count)
    {
        var columns = new double[matrix.GetLength(0) * count];
        for (var i = 0; i < matrix.GetLength(0); i++)
        {
            for (var j = 0; j < count; j++)
            {
                columns[(i * count) + j] = matrix[i, first + j];
            }
        }

        return columns;
    }
}
