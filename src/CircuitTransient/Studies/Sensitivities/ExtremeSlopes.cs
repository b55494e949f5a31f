using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The derivative of a number that stands at an instant, and of the instant.</summary>
/// <param name="Value">∂number/∂value; null where it is not known.</param>
/// <param name="Time">∂instant/∂value; null where there is none.</param>
/// <param name="Reason">Why the first is null.</param>
internal readonly record struct PointSlope(double? Value, double? Time, string? Reason)
{
    /// <summary>A slope that is not known.</summary>
    public static PointSlope Unknown(string reason) => new(null, null, reason);

    /// <summary>The slope of a multiple, with something added.</summary>
    public PointSlope Times(double factor, double plus = 0) =>
        this with { Value = (Value * factor) + plus };
}

/// <summary>A window of time whose ends may move with a value.</summary>
/// <param name="From">In seconds.</param>
/// <param name="To">In seconds.</param>
/// <param name="Moves">How both ends go with a value, by its index; null where that is not known.</param>
internal sealed record MovingWindow(
    double From, double To, Func<int, (double From, double? To)> Moves);

/// <summary>The derivatives of an extreme: inside a smooth stretch that of the quantity there, since a change
/// of the instant does not matter to first order; at an edge, a jump or a kink the edge's own motion comes to
/// it.</summary>
internal sealed class ExtremeSlopes(SlopeMarch march)
{
    private const double Rounding = 1e-12; // of a length of time: such instants are one

    private readonly SlopeReading reading = march.Reading;
    private readonly TransientSolution solution = march.Reading.Solution;

    /// <summary>The derivative with respect to one value.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="curve">Its curve.</param>
    /// <param name="found">Its extreme.</param>
    /// <param name="window">The window it was found in.</param>
    /// <param name="value">Index of the value.</param>
    public PointSlope Of(
        Measurand quantity, Curve curve, FoundExtreme found, MovingWindow window, int value)
    {
        var piece = curve.Pieces[found.Piece];
        if (!reading.IsKnown(found.Piece, value))
        {
            return PointSlope.Unknown(march.Refusals[value]!.Reason);
        }

        var tau = Math.Clamp(found.Time - piece.Segment.Start, 0, piece.Segment.Length);
        var (isEdge, shift, reason) = Edge(found, tau, window, value);
        if (isEdge && shift is null)
        {
            return PointSlope.Unknown(reason!);
        }

        tau = isEdge ? tau : Polished(piece, tau);
        if (ValueSlope(quantity, window, found.Piece, tau, value) is not { } slope
            || Rates(quantity, found.Piece, tau) is not { } rates)
        {
            return PointSlope.Unknown("an impulse passes what is integrated");
        }

        return isEdge
            ? new PointSlope(slope + (rates.Slope * shift!.Value), shift, null)
            : new PointSlope(slope, Turning(quantity, found.Piece, tau, rates.Bend, value), null);
    }

    /// <summary>The derivative of a quantity at a fixed instant.</summary>
    public double? ValueSlope(
        Measurand quantity, MovingWindow window, int segment, double tau, int value) =>
        QuantityFactors.OfAny(solution.Circuit, quantity) is { IsIntegrated: true }
            ? reading.Integrals.Of(
                quantity, quantity is JouleIntegral ? (window.From, window.Moves(value).From) : (0, 0),
                segment, tau, value)
            : reading.SlopeOf(quantity, segment, tau, value)?.Value;

    /// <summary>A quantity's rate, and that one's.</summary>
    public (double Slope, double Bend)? Rates(Measurand quantity, int segment, double tau) =>
        reading.At(quantity, segment, tau) is not { } own ? null
        : QuantityFactors.OfAny(solution.Circuit, quantity) is { IsIntegrated: true }
            ? (own.Value, own.Slope)
            : (own.Slope, own.Bend);

    /// <summary>How the instant of a smooth extreme goes with the value: −(∂y′/∂p) / y″.</summary>
    private double? Turning(Measurand quantity, int segment, double tau, double bend, int value)
    {
        if (bend == 0 || reading.SlopeOf(quantity, segment, tau, value) is not { } slope)
        {
            return null;
        }

        var isIntegral = QuantityFactors.OfAny(solution.Circuit, quantity) is { IsIntegrated: true };
        return -(isIntegral ? slope.Value : slope.Slope) / bend;
    }

    /// <summary>Whether an extreme stands at an end of its window, at a switching or at a source's corner,
    /// and how that moves.</summary>
    private (bool IsEdge, double? Shift, string? Reason) Edge(
        FoundExtreme found, double tau, MovingWindow window, int value)
    {
        var segment = solution.Segments[found.Piece];
        var rounding = Rounding * solution.Until;
        double? start = tau <= Rounding * segment.Length ? Moved(found.Piece, value)
            : tau >= (1 - Rounding) * segment.Length && found.Piece + 1 < solution.Segments.Length
                ? Moved(found.Piece + 1, value)
                : null;
        var moves = window.Moves(value);
        var isFrom = Math.Abs(found.Time - window.From) <= rounding;
        if (!isFrom && Math.Abs(found.Time - window.To) > rounding)
        {
            return (start is not null, start, null);
        }

        var end = isFrom ? moves.From : moves.To;
        return end is null ? (true, null, "it stands at the study's end, which modes that coincide decide")
            : start is { } other && other != end
                ? (true, null, "it stands where an end of its window meets a switching or a corner")
                : (true, end, null);
    }

    /// <summary>How a segment's start moves: with its interval's, else not at all.</summary>
    private double Moved(int segment, int value)
    {
        var interval = solution.Segments[segment].Interval;
        return solution.Intervals[interval].FirstSegment == segment
            ? reading.StartShift(interval, value) : 0;
    }

    /// <summary>The root of the slope near a place where the value is greatest to rounding.</summary>
    private static double Polished(CurvePiece piece, double tau)
    {
        var phi = new double[piece.Segment.Basis.Width];
        var start = tau;
        for (var k = 0; k < 8; k++)
        {
            piece.Segment.Basis.Evaluate(tau, phi);
            var (_, slope, bend) = piece.At(tau, phi);
            var next = bend == 0 ? tau : tau - (slope / bend);
            const double nearby = 1e-3; // of the segment: a flat top is no wider
            if (!(next >= 0 && next <= piece.Segment.Length)
                || Math.Abs(next - start) > nearby * piece.Segment.Length)
            {
                return start;
            }

            tau = next;
        }

        return tau;
    }
}
