using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The derivative of a settled start: the forced response of the same network to the disturbances
/// that its own forced response puts on the laws, exponent by exponent; what the sources leave open goes with
/// what is stated.</summary>
internal sealed class SettledSlopes
{
    private const double Rounding = 1e-20; // of the sum's terms; double-double leaves some 1e-30

    private readonly IntervalModel model;
    private readonly NetworkLayout layout;
    private readonly TransientSolution solution;
    private readonly Dictionary<DoubleDoubleComplex, List<Forcing>> sources = [];

    public SettledSlopes(IntervalModel model, TransientSolution solution)
    {
        this.model = model;
        this.solution = solution;
        layout = model.Form.Layout;
        foreach (var cause in solution.Causes.Where(c => c.Source >= 0))
        {
            Add(sources, Forcing.Of(
                cause.Pieces.Where(p => p.IsPerpetual), layout.Input(cause.Source),
                CauseList.ScaleOf(layout.Circuit, cause.Source), 0));
        }
    }

    /// <summary>How what every store holds at t = 0⁻ goes with a value; null where the derivative has no
    /// settled state.</summary>
    public DoubleDouble[]? Of(Variation variation)
    {
        var terms = variation.Terms(model.IsClosed);
        if (terms.Any(t => FeelsWhatIsHeld(t.Quantity)))
        {
            return null;
        }

        var changes = new Dictionary<DoubleDoubleComplex, List<Forcing>>();
        foreach (var source in layout.Sources)
        {
            Add(changes, variation.Forcings(layout, source, 0, isSettled: true));
        }

        var state = model.Blocks.Select(b => new DoubleDoubleComplex[b.Size]).ToArray();
        var driving = new List<Forcing>();
        foreach (var exponent in sources.Keys.Union(changes.Keys))
        {
            var all = changes.GetValueOrDefault(exponent) ?? [];
            all.AddRange(terms.Select(t => new Forcing(
                layout.Disturbance(t.Part), exponent, Phasor(t.Quantity, exponent) * t.Weight, default)));
            foreach (var forcing in all.Where(f => !f.Amplitude.IsZero))
            {
                if (!AddForced(state, forcing))
                {
                    return null;
                }

                driving.Add(forcing);
            }
        }

        var motion = new Motion(state, [.. driving]);
        return Fixed(
            variation, [.. layout.Stores.Select(p => SettledStart.ValueOf(model, motion, layout.Held(p)))]);
    }

    /// <summary>Whether a quantity moves with a charge or current that is held for ever: none does that a
    /// value of a passive part multiplies.</summary>
    private bool FeelsWhatIsHeld(Measurand quantity)
    {
        var projection = model.Project(quantity);
        double size = 0;
        foreach (var block in model.Blocks)
        {
            for (var i = 0; i < model.Form.Order; i++)
            {
                size = Math.Max(size, Math.Abs(projection.Output.State[i].Hi) * block.V[i, 0].Magnitude);
            }
        }

        return Enumerable.Range(0, model.Blocks.Length).Any(b =>
            SettledStart.IsAtPole(model.Blocks[b], default)
            && Array.Exists(projection.Rows[b], x => x.Magnitude > Rounding * size));
    }

    private static void Add(
        Dictionary<DoubleDoubleComplex, List<Forcing>> sets, ImmutableArray<Forcing> forcings)
    {
        foreach (var forcing in forcings)
        {
            if (!sets.TryGetValue(forcing.Exponent, out var set))
            {
                sets.Add(forcing.Exponent, set = []);
            }

            set.Add(forcing);
        }
    }

    /// <summary>The multiple of e^(μ t) in a quantity's forced response; a sum that cancels, such as a
    /// capacitor's current at rest, is zero.</summary>
    private DoubleDoubleComplex Phasor(Measurand quantity, DoubleDoubleComplex exponent)
    {
        var projection = model.Project(quantity);
        DoubleDoubleComplex sum = default;
        double size = 0;
        foreach (var forcing in sources.GetValueOrDefault(exponent) ?? [])
        {
            var power = forcing.Amplitude;
            foreach (var direct in projection.Output.Direct)
            {
                Add(power * direct[forcing.Input]);
                power *= exponent;
            }

            for (var b = 0; b < model.Blocks.Length; b++)
            {
                Add(Dot(projection.Rows[b], b, forcing, exponent, isMirrored: false));
                if (!model.Blocks[b].IsReal)
                {
                    // the block that this one stands for: all of it conjugated
                    Add(Dot(projection.Rows[b], b, forcing, exponent, isMirrored: true));
                }
            }
        }

        return sum.Magnitude <= Rounding * size ? default : sum;

        void Add(DoubleDoubleComplex term)
        {
            sum += term;
            size += term.Magnitude;
        }
    }

    private DoubleDoubleComplex Dot(
        DoubleDoubleComplex[] row, int b, Forcing forcing, DoubleDoubleComplex exponent, bool isMirrored)
    {
        var at = isMirrored ? exponent.Conjugate : exponent;
        DoubleDoubleComplex sum = default;
        if (!SettledStart.IsAtPole(model.Blocks[b], at))
        {
            var (first, _) = BlockResponse.Forced(model.Blocks[b], model.Drive(b, forcing.Input), at);
            for (var i = 0; i < row.Length; i++)
            {
                sum += row[i] * first[i];
            }
        }

        return (isMirrored ? sum.Conjugate : sum) * forcing.Amplitude;
    }

    /// <summary>Adds the forced response; false where it drives what nothing limits.</summary>
    private bool AddForced(DoubleDoubleComplex[][] state, Forcing forcing)
    {
        for (var b = 0; b < state.Length; b++)
        {
            var drive = model.Drive(b, forcing.Input);
            if (SettledStart.IsAtPole(model.Blocks[b], forcing.Exponent))
            {
                var size = model.Blocks[b].W.FrobeniusNorm();
                if (Array.Exists(drive, x => (x * forcing.Amplitude).Magnitude > Rounding * size * Largest()))
                {
                    return false;
                }

                continue;
            }

            var (first, _) = BlockResponse.Forced(model.Blocks[b], drive, forcing.Exponent);
            for (var i = 0; i < first.Length; i++)
            {
                state[b][i] += first[i] * forcing.Amplitude;
            }
        }

        return true;

        double Largest()
        {
            double largest = 0;
            for (var i = 0; i < model.Form.Order; i++)
            {
                largest = Math.Max(largest, Math.Abs(model.Form.B[i, forcing.Input].Hi));
            }

            return largest * forcing.Amplitude.Magnitude;
        }
    }

    /// <summary>Open quantities and stated ones, as in the settled start itself: every stated quantity's
    /// derivative is a cause of its own.</summary>
    private DoubleDouble[]? Fixed(Variation variation, DoubleDouble[] forced)
    {
        var stated = layout.Stores.Where(p => layout.Circuit.Parts[p] is
            Capacitor { InitialVoltage: not null } or Inductor { InitialCurrent: not null });
        ImmutableArray<Cause> causes =
        [
            new Cause("forced", 0, [], -1, 0),
            .. stated.Select(p => new Cause(string.Empty, -1, [], p, variation.StoredSlope(p))),
        ];
        var stored = causes.Select(_ => new DoubleDouble[forced.Length]).ToArray();
        stored[0] = forced;
        if (OpenQuantities.Fix(model, layout, causes, stored) is not null)
        {
            return null;
        }

        var sum = new DoubleDouble[forced.Length];
        foreach (var own in stored)
        {
            for (var k = 0; k < sum.Length; k++)
            {
                sum[k] += own[k];
            }
        }

        return sum;
    }
}
