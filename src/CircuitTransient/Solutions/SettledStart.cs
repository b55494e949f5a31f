using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>What is stored where constants and sines have been on for ever: each source's own forced response
/// at t = 0. A quantity that the file states is replaced whole and is a cause of its own; one that the
/// sources leave open (a charge held by capacitors, a current round a loop of coils) is fixed by stated ones,
/// or it is an error.</summary>
internal static class SettledStart
{
    /// <summary>What every store holds at t = 0⁻, cause by cause; or why there is no settled state.</summary>
    public static (DoubleDouble[][] Stored, Diagnostic? Problem) Find(
        IntervalModel model, NetworkLayout layout, ImmutableArray<Cause> causes)
    {
        var stored = StatedStart.Of(layout, causes);
        if (Unstable(model, layout) is { } unstable)
        {
            return (stored, unstable);
        }

        for (var c = 0; c < causes.Length; c++)
        {
            if (causes[c].Source < 0)
            {
                // What a stated quantity brings with it is settled below, with the open ones.
                stored[c] = new DoubleDouble[layout.Stores.Length];
            }
            else
            {
                var forcings = Forcing.Of(
                    causes[c].Pieces.Where(p => p.IsPerpetual), layout.Input(causes[c].Source),
                    CauseList.ScaleOf(layout.Circuit, causes[c].Source), 0);
                if (Resonance(model, layout, causes[c], forcings) is { } resonance)
                {
                    return (stored, resonance);
                }

                stored[c] = Forced(model, layout, forcings);
            }
        }

        return (stored, OpenQuantities.Fix(model, layout, causes, stored));
    }

    /// <summary>What the stores hold in the forced response of one source.</summary>
    private static DoubleDouble[] Forced(IntervalModel model, NetworkLayout layout,
        ImmutableArray<Forcing> forcings)
    {
        var state = new DoubleDoubleComplex[model.Blocks.Length][];
        for (var b = 0; b < state.Length; b++)
        {
            state[b] = new DoubleDoubleComplex[model.Blocks[b].Size];
            foreach (var forcing in forcings.Where(f => !IsAtPole(model.Blocks[b], f.Exponent)))
            {
                var (first, _) = BlockResponse.Forced(
                    model.Blocks[b], model.Drive(b, forcing.Input), forcing.Exponent);
                for (var i = 0; i < first.Length; i++)
                {
                    state[b][i] += first[i] * forcing.Amplitude;
                }
            }
        }

        var motion = new Motion(state, forcings);
        return [.. layout.Stores.Select(p => ValueOf(model, motion, layout.Held(p)))];
    }

    /// <summary>A voltage or current at the start of a motion.</summary>
    public static DoubleDouble ValueOf(IntervalModel model, Motion motion, Measurand quantity)
    {
        var projection = model.Project(quantity);
        var sum = DoubleDouble.Zero;
        for (var b = 0; b < motion.State.Length; b++)
        {
            DoubleDouble factor = model.Blocks[b].IsReal ? 1 : 2;
            for (var i = 0; i < motion.State[b].Length; i++)
            {
                sum += factor * (projection.Rows[b][i] * motion.State[b][i]).Re;
            }
        }

        foreach (var forcing in motion.Forcings)
        {
            for (var k = 0; k < projection.Output.Direct.Length; k++)
            {
                sum += projection.Output.Direct[k][forcing.Input] * forcing.DerivativeAtStart(k).Re;
            }
        }

        return sum;
    }

    private static Diagnostic? Unstable(IntervalModel model, NetworkLayout layout)
    {
        foreach (var block in model.Blocks)
        {
            for (var i = 0; i < block.Size; i++)
            {
                if (block.T[i, i].Re.Hi > 1e-12 * block.T[i, i].Magnitude)
                {
                    var growth = EngineeringNumber.Format(1 / block.T[i, i].Re.Hi, "s");
                    return Diagnostic.Error(
                        layout.Circuit.Source, Active(layout.Circuit)?.Span ?? default,
                        $"there is no settled state to start from: a mode grows, time constant {growth}",
                        "start as stated, with the charges and currents you know");
                }
            }
        }

        return null;
    }

    /// <summary>The first part that can feed a mode: without one, none grows.</summary>
    private static Part? Active(Circuit circuit) =>
        circuit.Parts.FirstOrDefault(p => p is Resistor { Resistance.Nominal: < 0 } or DependentSource);

    private static Diagnostic? Resonance(
        IntervalModel model, NetworkLayout layout, Cause cause, ImmutableArray<Forcing> forcings)
    {
        foreach (var forcing in forcings)
        {
            for (var b = 0; b < model.Blocks.Length; b++)
            {
                if (!IsDriven(model, b, forcing.Input) || !IsAtPole(model.Blocks[b], forcing.Exponent))
                {
                    continue;
                }

                var part = layout.Circuit.Parts[cause.Source];
                var how = forcing.Exponent.IsZero
                    ? $"`{part.Name}` drives a charge or current that nothing limits"
                    : $"`{part.Name}` drives an undamped mode at its own frequency of "
                        + EngineeringNumber.Format(Math.Abs(forcing.Exponent.Im.Hi) / (2 * Math.PI), "Hz");
                return Diagnostic.Error(
                    layout.Circuit.Source, part.Span, $"there is no settled state to start from: {how}",
                    "put in the resistance that damps it, or start as stated");
            }
        }

        return null;
    }

    /// <summary>Whether an input moves a block at all: what only rounding leaves of W b does not.</summary>
    private static bool IsDriven(IntervalModel model, int b, int input)
    {
        const double rounding = 1e-22; // of the sum's largest terms; double-double leaves some 1e-30
        const double noise = 1e-26; // of a left vector's largest entry: what rounding may leave of a zero
        var (w, drive) = (model.Blocks[b].W, model.Drive(b, input));
        for (var i = 0; i < drive.Length; i++)
        {
            var largest = Enumerable.Range(0, w.Columns).Max(k => w[i, k].Magnitude);
            double size = 0;
            for (var k = 0; k < w.Columns; k++)
            {
                size += Math.Max(w[i, k].Magnitude, noise / rounding * largest)
                    * Math.Abs(model.Form.B[k, input].Hi);
            }

            if (drive[i].Magnitude > rounding * size)
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>Whether an exponent is one of a block's poles, to rounding of the values in the
    /// file.</summary>
    public static bool IsAtPole(SpectralBlock block, DoubleDoubleComplex exponent)
    {
        const double rounding = 1e-13; // of the values in the file
        for (var i = 0; i < block.Size; i++)
        {
            var size = Math.Max(block.T[i, i].Magnitude, exponent.Magnitude);
            if ((block.T[i, i] - exponent).Magnitude <= rounding * size)
            {
                return true;
            }
        }

        return false;
    }
}
