using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The derivative of a circuit's motion on one segment with respect to one value, at fixed instants:
/// the motion of the same network, driven by what the value's change puts on the right side of its
/// laws.</summary>
internal sealed class SegmentSlopes
{
    private readonly SegmentFrame frame;
    private readonly DoubleDoubleComplex[][] start;
    private readonly ImmutableArray<Forcing> forcings;
    private readonly (int Input, DoubleDoubleComplex[][] Weights)[] disturbances;

    /// <summary>Takes the derivative of the state just after the start, block by block.</summary>
    public SegmentSlopes(SegmentFrame frame, Variation variation, DoubleDoubleComplex[][] start)
    {
        this.frame = frame;
        this.start = start;
        var layout = frame.Model.Form.Layout;
        forcings = [.. layout.Sources
            .SelectMany(s => variation.Forcings(layout, s, frame.Segment.Start, isSettled: false))];
        disturbances = [.. variation.Terms(frame.Model.IsClosed).GroupBy(t => t.Part).Select(g => (
            layout.Disturbance(g.Key), frame.Sum(g)))];
    }

    /// <summary>The coefficients of a voltage's or current's derivative, one for each function; the
    /// derivative is the real part of the sum of products.</summary>
    public DoubleDoubleComplex[][] Coefficients(Measurand quantity)
    {
        if (quantity is RateOfChange rate)
        {
            return SegmentFrame.Differentiate(frame.Driven.Basis, Coefficients(rate.Of));
        }

        var projection = frame.Model.Project(quantity);
        var sums = SegmentFrame.NoCoefficients(frame.Driven.Basis);
        Add(sums, frame.Modes.Coefficients(projection, new Motion(start, forcings)));
        foreach (var (input, weights) in disturbances)
        {
            AddDirect(sums, projection, input, weights);
        }

        for (var b = 0; b < frame.Model.Blocks.Length; b++)
        {
            DoubleDouble factor = frame.Model.Blocks[b].IsReal ? 1 : 2;
            foreach (var term in Response(b))
            {
                DoubleDoubleComplex value = default;
                for (var i = 0; i < term.Vector.Length; i++)
                {
                    value += projection.Rows[b][i] * term.Vector[i];
                }

                value *= factor;
                sums[term.Mode][term.Carrier] += term.IsMirrored ? value.Conjugate : value;
            }
        }

        return sums;
    }

    /// <summary>The state's derivative at the end, block by block.</summary>
    public DoubleDoubleComplex[][] StateAtEnd()
    {
        var state = frame.Modes.StateAtEnd(new Motion(start, forcings));
        var carriers = frame.CarriersAtEnd;
        for (var b = 0; b < state.Length; b++)
        {
            foreach (var term in Response(b))
            {
                var function = carriers[term.Mode][term.Carrier];
                function = term.IsMirrored ? function.Conjugate : function;
                for (var i = 0; i < state[b].Length; i++)
                {
                    state[b][i] += term.Vector[i] * function;
                }
            }
        }

        return state;
    }

    /// <summary>The derivatives of what every store holds at the segment's end.</summary>
    public DoubleDouble[] HeldAtEnd()
    {
        var layout = frame.Model.Form.Layout;
        var state = StateAtEnd();
        return [.. layout.Stores.Select(p => Value(layout.Held(p), state, isAtEnd: true, 0))];
    }

    /// <summary>The derivatives of what every store holds just after the start, where that moves with the
    /// sources.</summary>
    /// <param name="shift">How the start itself goes with the value.</param>
    public DoubleDouble[] HeldAtStart(double shift)
    {
        var layout = frame.Model.Form.Layout;
        return [.. layout.Stores.Select(p => Value(layout.Held(p), start, isAtEnd: false, shift))];
    }

    private DoubleDouble Value(
        Measurand quantity, DoubleDoubleComplex[][] state, bool isAtEnd, double shift)
    {
        var projection = frame.Model.Project(quantity);
        var sum = DoubleDouble.Zero;
        for (var b = 0; b < state.Length; b++)
        {
            DoubleDouble factor = frame.Model.Blocks[b].IsReal ? 1 : 2;
            for (var i = 0; i < state[b].Length; i++)
            {
                sum += (projection.Rows[b][i] * state[b][i]).Re * factor;
            }
        }

        var direct = projection.Output.Direct;
        foreach (var forcing in forcings)
        {
            var there = isAtEnd ? forcing.MovedBy(frame.Length) : forcing;
            for (var k = 0; k < direct.Length; k++)
            {
                sum += direct[k][forcing.Input] * there.DerivativeAtStart(k).Re;
            }
        }

        foreach (var forcing in shift == 0 ? [] : frame.Total.Forcings)
        {
            for (var k = 0; k < direct.Length; k++)
            {
                sum += direct[k][forcing.Input] * forcing.DerivativeAtStart(k + 1).Re * shift;
            }
        }

        foreach (var (input, weights) in disturbances)
        {
            var derived = weights;
            for (var k = 0; k < direct.Length; k++)
            {
                if (!direct[k][input].IsZero)
                {
                    sum += direct[k][input] * frame.Value(derived, isAtEnd);
                }

                derived = SegmentFrame.Differentiate(frame.Modes.Basis, derived);
            }
        }

        return sum;
    }

    private List<ResponseTerm> Response(int b) => frame.Driven.Respond(
        b, [.. disturbances.Select(d => (frame.Model.Drive(b, d.Input), d.Weights))]);

    /// <summary>d₀ ε + d₁ ε′ + …</summary>
    private void AddDirect(
        DoubleDoubleComplex[][] sums, Projection projection, int input, DoubleDoubleComplex[][] weights)
    {
        foreach (var direct in projection.Output.Direct)
        {
            if (!direct[input].IsZero)
            {
                Add(sums, weights, direct[input]);
            }

            weights = SegmentFrame.Differentiate(frame.Modes.Basis, weights);
        }
    }

    private static void Add(DoubleDoubleComplex[][] sums, DoubleDoubleComplex[][] terms) =>
        Add(sums, terms, DoubleDouble.One);

    private static void Add(DoubleDoubleComplex[][] sums, DoubleDoubleComplex[][] terms, DoubleDouble factor)
    {
        for (var m = 0; m < terms.Length; m++)
        {
            for (var k = 0; k < terms[m].Length; k++)
            {
                sums[m][k] += terms[m][k] * factor;
            }
        }
    }
}
