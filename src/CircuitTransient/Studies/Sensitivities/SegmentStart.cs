using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>What a segment's start hands to the derivatives on it: the stored quantities' own derivatives,
/// and what the laws' disturbances carry in impulses.</summary>
/// <param name="Model">The network, its laws disturbed.</param>
/// <param name="Segment">The segment.</param>
/// <param name="Onset">What sets in at its start.</param>
/// <param name="Before">What every store held just before.</param>
internal sealed record SegmentStart(
    IntervalModel Model, Segment Segment, Onset Onset, DoubleDouble[] Before)
{
    private const int Orders = 4; // of impulses and their derivatives, as in an onset

    /// <summary>The start of an interval, where the equations begin anew.</summary>
    public static SegmentStart OfInterval(IntervalModel model, Segment segment, DoubleDouble[] stored) => new(
        model, segment,
        Onset.OfInterval(
            model.Form.Layout, [segment.MotionOf(Segment.Total)], [stored],
            new double[model.Form.Layout.InputCount]),
        stored);

    /// <summary>A source's corner within an interval.</summary>
    public static SegmentStart OfCorner(IntervalModel model, Segment before, Segment segment)
    {
        var layout = model.Form.Layout;
        return new(
            model, segment, Onset.OfCorner(layout, before, [segment.MotionOf(Segment.Total)]),
            [.. layout.Stores.Select(p => before.ValueAtEnd(layout.Held(p), Segment.Total))]);
    }

    /// <summary>Adds to a state what stored quantities set it to.</summary>
    public void AddStored(DoubleDoubleComplex[][] state, DoubleDouble[] stored)
    {
        for (var k = 0; k < stored.Length; k++)
        {
            for (var b = 0; b < state.Length && !stored[k].IsZero; b++)
            {
                AddTo(state[b], Model.Drive(b, Model.Form.Layout.Sources.Length + k), stored[k]);
            }
        }
    }

    /// <summary>Adds to a state what the impulses in the laws' disturbances set it to: of a disturbance Σ q_k
    /// s^k, Σ T^k w q_k.</summary>
    public void AddImpulses(DoubleDoubleComplex[][] state, ImmutableArray<LawTerm> terms)
    {
        foreach (var term in terms)
        {
            for (var order = 0; order <= Orders; order++)
            {
                var impulse = Impulse(term.Quantity, order) * term.Weight;
                for (var b = 0; b < state.Length && !impulse.IsZero; b++)
                {
                    var drive = Model.Drive(b, Model.Form.Layout.Disturbance(term.Part));
                    for (var k = 0; k < order; k++)
                    {
                        drive = Times(Model.Blocks[b].T, drive);
                    }

                    AddTo(state[b], drive, impulse);
                }
            }
        }
    }

    /// <summary>Takes from a state its own rate of change times a delay.</summary>
    public void Delay(DoubleDoubleComplex[][] state, double delay)
    {
        var motion = Segment.MotionOf(Segment.Total);
        for (var b = 0; b < state.Length; b++)
        {
            AddTo(state[b], Times(Model.Blocks[b].T, motion.State[b]), -delay);
            foreach (var forcing in motion.Forcings)
            {
                var drive = Model.Drive(b, forcing.Input);
                for (var i = 0; i < drive.Length; i++)
                {
                    state[b][i] -= drive[i] * forcing.Amplitude * (DoubleDouble)delay;
                }
            }
        }
    }

    /// <summary>The coefficient of sᵏ in a quantity's transform from just before the start.</summary>
    private DoubleDouble Impulse(Measurand quantity, int order)
    {
        if (quantity is not RateOfChange rate)
        {
            return Onset.PolynomialIn(Model.Project(quantity).Output, order);
        }

        if (order > 0)
        {
            return Impulse(rate.Of, order - 1);
        }

        // The rate of a coil's current holds what that current jumps by.
        var coil = ((CurrentThrough)rate.Of).Part;
        var place = Model.Form.Layout.Stores.IndexOf(coil);
        return Segment.ValueAtStart(rate.Of, Segment.Total) - Before[place];
    }

    private static DoubleDoubleComplex[] Times(DoubleDoubleComplexMatrix t, DoubleDoubleComplex[] x)
    {
        var product = new DoubleDoubleComplex[x.Length];
        for (var i = 0; i < x.Length; i++)
        {
            for (var j = i; j < x.Length; j++)
            {
                product[i] += t[i, j] * x[j];
            }
        }

        return product;
    }

    private static void AddTo(DoubleDoubleComplex[] sum, DoubleDoubleComplex[] x, DoubleDouble factor)
    {
        for (var i = 0; i < x.Length; i++)
        {
            sum[i] += x[i] * factor;
        }
    }
}
