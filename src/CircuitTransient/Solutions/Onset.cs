using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>What sets in at a segment's start, and so may come as an impulse: at a switching
/// everything that is stored and every source as it stands (the equations begin anew), at a
/// corner what the sources change by.</summary>
/// <param name="Jumps">For each order of derivative, the change of each input's
/// derivative of that order.</param>
/// <param name="Stored">What is stored at the start, for each input; zeros at a corner.</param>
/// <param name="Sizes">The size each input has had so far: a current cut at its zero leaves its
/// rounding, which is no impulse.</param>
internal sealed record Onset(DoubleDouble[][] Jumps, DoubleDouble[] Stored, double[] Sizes)
{
    private const double Rounding = 1e-14; // of levels in double: a ramp's end, the level held after it
    private const int Orders = 4; // derivatives of a source that a network of index up to 5 can pass on

    /// <summary>At the start of an interval.</summary>
    public static Onset OfInterval(
        NetworkLayout layout, IEnumerable<Motion> motions, DoubleDouble[][] stored, double[] sizes)
    {
        var total = new DoubleDouble[layout.InputCount];
        foreach (var own in stored)
        {
            for (var k = 0; k < own.Length; k++)
            {
                total[layout.Sources.Length + k] += own[k];
            }
        }

        return new Onset(Derivatives(layout, motions), total, sizes);
    }

    /// <summary>At a source's corner within an interval.</summary>
    public static Onset OfCorner(
        NetworkLayout layout, Segment before, IEnumerable<Motion> motions, int cause = Segment.Total)
    {
        var jumps = Derivatives(layout, motions);
        var ended = before.MotionOf(cause).Forcings
            .Select(f => f.MovedBy((DoubleDouble)before.End - before.Start));
        var earlier = Derivatives(layout, [new Motion([], [.. ended])]);
        for (var k = 0; k < Orders; k++)
        {
            for (var i = 0; i < jumps[k].Length; i++)
            {
                jumps[k][i] = Difference(jumps[k][i], earlier[k][i]);
            }
        }

        return new Onset(jumps, new DoubleDouble[layout.InputCount], new double[layout.InputCount]);
    }

    /// <summary>Whether an output carries more than an impulse: an impulse's
    /// derivative, or that one's.</summary>
    public bool IsBeyondImpulseIn(LinearOutput output)
    {
        for (var order = 1; order < output.Direct.Length; order++)
        {
            for (var k = order; k < output.Direct.Length; k++)
            {
                for (var i = 0; i < output.Direct[k].Length; i++)
                {
                    var sets = k == order ? Stored[i]
                        : k - order <= Orders ? Jumps[k - order - 1][i] : DoubleDouble.Zero;
                    if (!output.Direct[k][i].IsZero && !sets.IsZero)
                    {
                        return true;
                    }
                }
            }
        }

        return false;
    }

    /// <summary>The impulse in an output: volt-seconds of a voltage, coulombs of a current.</summary>
    public double ImpulseIn(LinearOutput output)
    {
        var sum = DoubleDouble.Zero;
        double scale = 0;
        for (var k = 0; k < output.Direct.Length; k++)
        {
            for (var i = 0; i < output.Direct[k].Length; i++)
            {
                var d = output.Direct[k][i];
                if (d.IsZero)
                {
                    continue;
                }

                var term = d * (k == 0 ? Stored[i] : k <= Orders ? Jumps[k - 1][i] : DoubleDouble.Zero);
                sum += term;
                scale += Math.Max(Math.Abs(term.Hi), k == 0 ? Math.Abs(d.Hi) * Sizes[i] : 0);
            }
        }

        const double rounding = 1e-13; // of the values stated in the file: 205 V against 205 V is no impulse
        return Math.Abs(sum.Hi) <= rounding * scale ? 0 : (double)sum;
    }

    /// <summary>The coefficient of sᵏ in an output's transform: of order 0 the impulse, of order 1 its
    /// derivative's, and so on. Rounding is left in; what depends on it linearly does not mind.</summary>
    public DoubleDouble PolynomialIn(LinearOutput output, int order)
    {
        var sum = DoubleDouble.Zero;
        for (var k = order; k < output.Direct.Length && k - order <= Orders; k++)
        {
            for (var i = 0; i < Stored.Length; i++)
            {
                sum += output.Direct[k][i] * (k == order ? Stored[i] : Jumps[k - order - 1][i]);
            }
        }

        return sum;
    }

    private static DoubleDouble[][] Derivatives(NetworkLayout layout, IEnumerable<Motion> motions)
    {
        var derivatives = new DoubleDouble[Orders][];
        var sizes = new double[Orders, layout.InputCount];
        for (var k = 0; k < Orders; k++)
        {
            derivatives[k] = new DoubleDouble[layout.InputCount];
        }

        foreach (var forcing in motions.SelectMany(m => m.Forcings))
        {
            for (var k = 0; k < Orders; k++)
            {
                var derivative = forcing.DerivativeAtStart(k);
                derivatives[k][forcing.Input] += derivative.Re;
                sizes[k, forcing.Input] += derivative.Magnitude;
            }
        }

        for (var k = 0; k < Orders; k++)
        {
            for (var i = 0; i < layout.InputCount; i++)
            {
                if (Math.Abs(derivatives[k][i].Hi) <= Rounding * sizes[k, i]) // sin 0 written as cos(-π/2)
                {
                    derivatives[k][i] = DoubleDouble.Zero;
                }
            }
        }

        return derivatives;
    }

    private static DoubleDouble Difference(DoubleDouble after, DoubleDouble before)
    {
        var difference = after - before;
        return Math.Abs(difference.Hi) <= Rounding * Math.Max(Math.Abs(after.Hi), Math.Abs(before.Hi))
            ? DoubleDouble.Zero
            : difference;
    }
}
