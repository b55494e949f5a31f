using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The derivatives of the used fraction of a rating.</summary>
internal sealed class RatingSlopes(
    TransientSolution solution, ImmutableArray<Variation> variations, CurveBuilder curves,
    Infinities infinities, ExtremeSlopes extremes, SlopeMarch march)
{
    private const int MostStretches = 1_000_000;

    /// <summary>The used fraction; null where it is infinite or left open.</summary>
    /// <param name="part">Index of the part.</param>
    /// <param name="rating">Its rating.</param>
    /// <param name="whole">The whole study.</param>
    public FigureSlopes? Of(int part, Rating rating, MovingWindow whole)
    {
        var reached = rating.Kind switch
        {
            RatingKind.PeakVoltage => Peak(new VoltageAcross(part), whole),
            RatingKind.PeakCurrent => Peak(new CurrentThrough(part), whole),
            RatingKind.VoltageRate => Peak(new RateOfChange(new VoltageAcross(part)), whole),
            RatingKind.CurrentRate => Peak(new RateOfChange(new CurrentThrough(part)), whole),
            RatingKind.JouleIntegral => Integral(new JouleIntegral(part), whole),
            RatingKind.MeanPower => Mean(part, whole),
            _ => Energy(part, whole),
        };
        return reached?.Times(Math.Sign(reached.Value) / rating.Limit, 0);
    }

    private FigureSlopes? Peak(Measurand quantity, MovingWindow whole)
    {
        if (curves.Of(quantity) is not { } curve
            || infinities.Of(quantity, 0, solution.Until) is not (null, null))
        {
            return null;
        }

        var found = ExtremeSearch.GreatestMagnitude(curve, 0, solution.Until, MostStretches);
        return FigureSlopes.Gathered(found.Value, found.Time,
            [.. Values.Select(v => extremes.Of(quantity, curve, found, whole, v))]);
    }

    private IEnumerable<int> Values => Enumerable.Range(0, variations.Length);

    /// <summary>What a store holds at its peak, or what any other part has taken in.</summary>
    private FigureSlopes? Energy(int part, MovingWindow whole)
    {
        var (store, size, held) = solution.Circuit.Parts[part] switch
        {
            Capacitor c => (c.Capacitance, c.Capacitance.Nominal, (Measurand)new VoltageAcross(part)),
            Inductor l => (l.Inductance, l.Inductance.Nominal, new CurrentThrough(part)),
            _ => (null, 0.0, new EnergyIn(part)),
        };
        if (store is null)
        {
            return Integral(held, whole);
        }

        return Peak(held, whole) is not { } peak ? null : peak with
        {
            Value = size / 2 * peak.Value * peak.Value,
            Slopes = [.. peak.Slopes.Select((s, v) => (size * peak.Value * s)
                + (variations[v].SlopeOf(store) / 2 * peak.Value * peak.Value))],
        };
    }

    private FigureSlopes? Integral(Measurand quantity, MovingWindow whole)
    {
        if (curves.Of(quantity) is not { } curve
            || infinities.Of(quantity, 0, solution.Until) is not (null, null))
        {
            return null;
        }

        var last = solution.Segments.Length - 1;
        return FigureSlopes.Gathered(
            ((AccumulatedPiece)curve.Pieces[^1]).AtEnd, null, [.. Values.Select(Slope)]);

        PointSlope Slope(int v)
        {
            var length = solution.Segments[last].Length;
            return march.Refusals[v] is { } refusal ? PointSlope.Unknown(refusal.Reason)
                : whole.Moves(v).To is not { } end
                    ? PointSlope.Unknown("it is taken to the study's end, which modes that coincide decide")
                : extremes.ValueSlope(quantity, whole, last, length, v) is { } slope
                    ? new PointSlope(
                        slope + (end * extremes.Rates(quantity, last, length)!.Value.Slope), null, null)
                    : PointSlope.Unknown("an impulse passes what is integrated");
        }
    }

    private FigureSlopes? Mean(int part, MovingWindow whole)
    {
        if (solution.Circuit.Parts[part] is Capacitor or Inductor
            || Integral(new EnergyIn(part), whole) is not { } energy)
        {
            return null;
        }

        var mean = energy.Times(1 / solution.Until, 0);
        return mean with
        {
            Slopes = [.. mean.Slopes.Select((s, v) => s - (mean.Value * whole.Moves(v).To / solution.Until))],
        };
    }
}
