using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>A global extreme found on a curve.</summary>
/// <param name="Time">In seconds.</param>
/// <param name="Piece">Index of the segment it was found on.</param>
/// <param name="Bound">Proven not to be exceeded in the window.</param>
public sealed record FoundExtreme(double Value, double Time, int Piece, InstantSide Side, double Bound);

/// <summary>Finds the greatest value of a curve in a closed window and proves that there is no greater: the
/// window is cut into stretches, each with an upper bound from the derivatives' closed forms; the stretch
/// with the highest bound is looked at first, settled where it is monotone or bent one way, else halved,
/// until no bound is above the best value by more than 1e-10 of the curve's size.</summary>
public sealed class ExtremeSearch
{
    private const double Resolution = 1e-10;

    private readonly Curve curve;
    private readonly double sign;
    private readonly double from;
    private readonly double until;
    private readonly PriorityQueue<Stretch, (double, double)> waiting = new();
    private double best = double.NegativeInfinity;
    private double bestTau;
    private int bestPiece;
    private double size;
    private double abandoned = double.NegativeInfinity; // the highest bound that rounding leaves standing
    private bool isBeaten; // whether the best value is one that another search found

    private ExtremeSearch(Curve curve, double sign, double from, double until)
    {
        this.curve = curve;
        this.sign = sign;
        this.from = from;
        this.until = until;
    }

    /// <summary>The greatest value in a window.</summary>
    /// <param name="curve">The curve.</param>
    /// <param name="from">The window's start, in seconds.</param>
    /// <param name="until">Its end.</param>
    /// <param name="mostStretches">How many stretches may be looked at before the search stops with what is
    /// proven.</param>
    public static FoundExtreme Greatest(
        Curve curve, double from, double until, int mostStretches = 100_000) =>
        new ExtremeSearch(curve, 1, from, until).Run(mostStretches);

    /// <summary>The least value in a window.</summary>
    public static FoundExtreme Least(Curve curve, double from, double until, int mostStretches = 100_000)
    {
        var found = new ExtremeSearch(curve, -1, from, until).Run(mostStretches);
        return found with { Value = -found.Value, Bound = -found.Bound };
    }

    /// <summary>The value of greatest magnitude, with its sign.</summary>
    public static FoundExtreme GreatestMagnitude(Curve curve, double from, double until, int mostStretches)
    {
        var high = Greatest(curve, from, until, mostStretches);
        var search =
            new ExtremeSearch(curve, -1, from, until) { best = Math.Max(0, high.Value), isBeaten = true };
        var low = search.Run(mostStretches);
        return search.isBeaten ? high : low with { Value = -low.Value, Bound = -low.Bound };
    }

    private FoundExtreme Run(int mostStretches)
    {
        for (var p = 0; p < curve.Pieces.Length; p++)
        {
            if (Inside(p, out var a, out var b))
            {
                Scan(p, a, b);
            }
        }

        for (var p = 0; p < curve.Pieces.Length; p++)
        {
            if (Inside(p, out var a, out var b))
            {
                Enqueue(p, a, b);
            }
        }

        var highest = best;
        while (waiting.TryDequeue(out var stretch, out _))
        {
            if (stretch.Upper <= best + (Resolution * size))
            {
                highest = Math.Max(highest, stretch.Upper);
                break;
            }

            if (mostStretches-- == 0)
            {
                highest = stretch.Upper;
                break;
            }

            Settle(stretch);
        }

        var time = curve.Pieces[bestPiece].Segment.Start + bestTau;
        return new FoundExtreme(best, Math.Clamp(time, from, until), bestPiece, Side(),
            Math.Max(Math.Max(best, abandoned), highest));
    }

    private bool Inside(int p, out double a, out double b)
    {
        var segment = curve.Pieces[p].Segment;
        a = Math.Max(0, from - segment.Start);
        b = Math.Min(segment.Length, until - segment.Start);

        // At its ends only the inner value of a window counts: no piece of no length, unless the window
        // itself has none.
        return a < b || (a == b && from == until);
    }

    /// <summary>Takes the best of the tabulated values and of the window's ends.</summary>
    private void Scan(int p, double a, double b)
    {
        var table = curve.Pieces[p].Table;
        var values = curve.Pieces[p].Tabulated;
        Offer(p, a, sign * (a == 0 ? values[0] : curve.Pieces[p].ValueAt(a)));
        Offer(p, b, sign * (b == table.Instants[^1] ? values[^1] : curve.Pieces[p].ValueAt(b)));
        for (var k = 0; k < table.Instants.Length; k++)
        {
            var tau = table.Instants[k];
            if (tau > a && tau < b)
            {
                Offer(p, tau, sign * values[k]);
            }
        }
    }

    private void Enqueue(int p, double a, double b)
    {
        var piece = curve.Pieces[p];
        if (piece is LinearPiece { IsZero: true })
        {
            return;
        }

        var table = piece.Table;
        for (var k = 0; k + 1 < table.Instants.Length; k++)
        {
            var left = Math.Max(a, table.Instants[k]);
            var right = Math.Min(b, table.Instants[k + 1]);
            if (left >= right)
            {
                continue;
            }

            if (piece.MagnitudeWithin(table.Envelope(k)) <= best)
            {
                continue;
            }

            var half = (table.Instants[k + 1] - table.Instants[k]) / 2;
            var model = piece.Around(table.Instants[k] + half, half, table.Middle(k), table.Envelope(k));
            var upper = model.Upper(sign);
            if (upper > best + (Resolution * size))
            {
                waiting.Enqueue(new Stretch(p, left, right, upper), (-upper, piece.Segment.Start + left));
            }
        }
    }

    private void Settle(Stretch stretch)
    {
        var piece = curve.Pieces[stretch.Piece];
        var middle = stretch.From + ((stretch.Until - stretch.From) / 2);
        var model = piece.Between(stretch.From, stretch.Until, out var value);
        Offer(stretch.Piece, middle, sign * value);
        var isSmallest = middle <= stretch.From || middle >= stretch.Until;
        if (isSmallest || model.IsMonotone || model.IsBentDown(-sign))
        {
            return; // the greatest value is at an end, and the ends have been offered
        }

        if (model.IsBentDown(sign))
        {
            Climb(stretch, piece, new double[piece.Segment.Basis.Width]);
            return;
        }

        var upper = Math.Min(stretch.Upper, model.Upper(sign));
        if (upper <= best + model.Noise)
        {
            abandoned = Math.Max(abandoned, upper);
        }
        else if (upper > best + (Resolution * size))
        {
            Push(stretch with { Until = middle, Upper = upper });
            Push(stretch with { From = middle, Upper = upper });
        }
    }

    private void Push(Stretch stretch) => waiting.Enqueue(
        stretch, (-stretch.Upper, curve.Pieces[stretch.Piece].Segment.Start + stretch.From));

    /// <summary>On a stretch that is bent downwards throughout, the root of the slope by Newton steps kept in
    /// a bracket.</summary>
    private void Climb(Stretch stretch, CurvePiece piece, double[] phi)
    {
        var (low, high) = (stretch.From, stretch.Until);
        if (Derivatives(piece, low, phi).Slope <= 0 || Derivatives(piece, high, phi).Slope >= 0)
        {
            return;
        }

        var tau = low + ((high - low) / 2);
        for (var k = 0; k < 100; k++)
        {
            var (value, slope, bend) = Derivatives(piece, tau, phi);
            Offer(stretch.Piece, tau, value);
            if (slope > 0)
            {
                low = tau;
            }
            else
            {
                high = tau;
            }

            var next = tau - (slope / bend);
            next = next > low && next < high ? next : low + ((high - low) / 2);
            if (slope == 0 || Math.Abs(next - tau) <= 2e-16 * Math.Abs(tau) || high - low <= 4e-16 * high)
            {
                return;
            }

            tau = next;
        }
    }

    private (double Value, double Slope, double Bend) Derivatives(CurvePiece piece, double tau,
        Span<double> phi)
    {
        piece.Segment.Basis.Evaluate(tau, phi);
        var (value, slope, bend) = piece.At(tau, phi);
        return (sign * value, sign * slope, sign * bend);
    }

    private void Offer(int piece, double tau, double value)
    {
        size = Math.Max(size, Math.Abs(value));
        var rounding = 1e-14 * size; // values that differ by less are equal, and the earlier one counts
        var isEarlier = !isBeaten && (piece < bestPiece || (piece == bestPiece && tau < bestTau));
        if (value > best + rounding || (isEarlier && value >= best - rounding)
            || double.IsNegativeInfinity(best))
        {
            best = double.IsNegativeInfinity(best) ? value : Math.Max(best, value);
            isBeaten = false;
            bestPiece = piece;
            bestTau = tau;
        }
        else
        {
            best = Math.Max(best, value);
        }
    }

    /// <summary>Before or after a jump, where the extreme stands at one.</summary>
    private InstantSide Side()
    {
        var rounding = 1e-9 * size; // a step below the accuracy of the answer is no jump
        var piece = curve.Pieces[bestPiece];
        if (bestTau == 0 && bestPiece > 0)
        {
            var before = curve.Pieces[bestPiece - 1];
            return sign * before.ValueAt(before.Segment.Length) < best - rounding ? InstantSide.After
                : InstantSide.At;
        }

        if (bestTau == piece.Segment.Length && bestPiece + 1 < curve.Pieces.Length)
        {
            return sign * curve.Pieces[bestPiece + 1].ValueAt(0) < best - rounding ? InstantSide.Before
                : InstantSide.At;
        }

        return InstantSide.At;
    }

    private readonly record struct Stretch(int Piece, double From, double Until, double Upper);
}
