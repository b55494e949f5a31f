using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace CircuitTransient.Studies.Draws;

internal sealed partial class SegmentWalk
{
    private const int MostHalvings = 4;
    private const int MostNewtonSteps = 12; // Newton steps; three are usual

    private readonly double[] factorEnvelope;

    private void PutFunctions(DrawSegment segment, ReadOnlySpan<double> at, ReadOnlySpan<int> functions)
    {
        const int lanes = 4; // strides are multiples of it, and what is beyond the width is zero
        var places = MemoryMarshal.Cast<double, Vector256<double>>(at);
        var coefficients = MemoryMarshal.Cast<double, Vector256<double>>(segment.Coefficients);
        var rates = MemoryMarshal.Cast<double, Vector256<double>>(segment.Slopes);
        var (stride, width) = (segment.Stride / lanes, (segment.Width + lanes - 1) / lanes);
        places = places[..width];
        foreach (var f in functions)
        {
            var c = coefficients.Slice(f * stride, places.Length);
            var d = rates.Slice(f * stride, places.Length);
            var (value, slope) = (Vector256<double>.Zero, Vector256<double>.Zero);
            for (var i = 0; i < places.Length; i++)
            {
                value += c[i] * places[i];
                slope += d[i] * places[i];
            }

            (values[f], slopes[f]) = (Vector256.Sum(value), Vector256.Sum(slope));
        }
    }

    private (double Value, double Slope) ValueOf(int t, double factor)
    {
        var (a, b) = (tracks[t].First, tracks[t].Second);
        return b < 0
            ? (factor * values[a], factor * slopes[a])
            : (factor * values[a] * values[b], factor * ((slopes[a] * values[b]) + (values[a] * slopes[b])));
    }

    private (double Value, double Slope, double Bend) At(
        DrawSegment segment, int t, double factor, ReadOnlySpan<double> at)
    {
        var (a, b) = (tracks[t].First, tracks[t].Second);
        var (v, s, d) = Derivatives(segment, a, at);
        if (b < 0)
        {
            return (factor * v, factor * s, factor * d);
        }

        var (w, r, e) = b == a ? (v, s, d) : Derivatives(segment, b, at);
        return (factor * v * w, factor * ((s * w) + (v * r)), factor * ((d * w) + (2 * s * r) + (v * e)));
    }

    private static (double Value, double Slope, double Bend) Derivatives(
        DrawSegment segment, int function, ReadOnlySpan<double> at)
    {
        var (start, width) = (function * segment.Stride, segment.Width);
        return (
            DrawSegment.Sum(segment.Coefficients.AsSpan(start, width), at),
            DrawSegment.Sum(segment.Slopes.AsSpan(start, width), at),
            DrawSegment.Sum(segment.Bends.AsSpan(start, width), at));
    }

    /// <summary>Bounds what is left of the stretch; true where nothing better can come on any
    /// track.</summary>
    private bool Settle(DrawSegment segment, double tau, double end, Span<TrackState> states)
    {
        for (var unit = 0; unit < segment.Units; unit++)
        {
            factorEnvelope[unit] = Envelope(segment, unit, tau, end);
        }

        foreach (var f in used.AsSpan(0, usedCount))
        {
            double middle = 0, around = 0;
            for (var unit = 0; unit < segment.Units; unit++)
            {
                if (segment.Re[unit] == 0 && segment.Im[unit] == 0 && segment.Degree[unit] == 0)
                {
                    middle += segment.Coefficients[(f * segment.Stride) + segment.Slot[unit]];
                }
                else
                {
                    around += magnitudes[(f * units) + unit] * factorEnvelope[unit];
                }
            }

            (low[f], high[f]) = (middle - around, middle + around);
        }

        var kept = 0;
        foreach (var t in active.AsSpan(0, activeCount))
        {
            ref var state = ref states[t];
            var (least, greatest, size) = Bounds(t, state.Factor);
            state.IsMaximumSettled |= greatest <= Floor(t, 1, state) + (Settled * size);
            state.IsMinimumSettled |= -least <= Floor(t, -1, state) + (Settled * size);
            if (!state.IsMaximumSettled || !state.IsMinimumSettled)
            {
                active[kept++] = t;
            }
        }

        activeCount = kept;
        return kept == 0;
    }

    private (double Least, double Greatest, double Size) Bounds(int t, double factor)
    {
        var (a, b) = (tracks[t].First, tracks[t].Second);
        if (b < 0)
        {
            var (x, y) = (factor * low[a], factor * high[a]);
            return (Math.Min(x, y), Math.Max(x, y), Math.Abs(factor) * sizes[a]);
        }

        var (ll, lh, hl, hh) = (low[a] * low[b], low[a] * high[b], high[a] * low[b], high[a] * high[b]);
        var least = Math.Min(Math.Min(ll, lh), Math.Min(hl, hh));
        var greatest = Math.Max(Math.Max(ll, lh), Math.Max(hl, hh));
        least = a == b && low[a] < 0 && high[a] > 0 ? 0 : a == b ? Math.Min(ll, hh) : least;
        var size = Math.Abs(factor) * sizes[a] * sizes[b];
        return factor >= 0
            ? (factor * least, factor * greatest, size)
            : (factor * greatest, factor * least, size);
    }

    /// <summary>Looks at the cell that ends where the functions stand now.</summary>
    private void Look(DrawSegment segment, int t, double tau, double next, ref TrackState state)
    {
        var (v0, s0) = (state.Value, state.Slope);
        var (v1, s1) = ValueOf(t, state.Factor);
        (state.Value, state.Slope) = (v1, s1);
        state.Offer(v1, segment.Start + next);
        if (!state.IsMaximumSettled)
        {
            LookFor(segment, t, 1, new Cell(tau, v0, s0, next, v1, s1), ref state, 0);
        }

        if (!state.IsMinimumSettled)
        {
            LookFor(segment, t, -1, new Cell(tau, -v0, -s0, next, -v1, -s1), ref state, 0);
        }
    }

    private void LookFor(
        DrawSegment segment, int t, double sign, in Cell cell, ref TrackState state, int halvings)
    {
        var best = Floor(t, sign, state);
        var width = cell.To - cell.From;
        var mean = (cell.ValueTo - cell.ValueFrom) / width;
        if (cell.SlopeFrom > 0 && cell.SlopeTo < 0)
        {
            var crest = cell.Crest();
            var guess = cell.At(crest);
            // a cubic misses at most some per cent of what the crest rises by
            var missed = 0.05 * (guess - Math.Min(cell.ValueFrom, cell.ValueTo));
            if (guess + missed > best)
            {
                var found = new SeenCrest(cell, crest, guess - missed, guess + missed);
                PutOff(segment, t, sign, found, ref state);
            }

            return;
        }

        // between slopes of one sign a crest hides only where the cubic is not monotone
        var steepest = Math.Max(Math.Abs(cell.SlopeFrom), Math.Abs(cell.SlopeTo));
        var isRising = cell.SlopeFrom > 0 && cell.SlopeTo > 0;
        var isFalling = cell.SlopeFrom < 0 && cell.SlopeTo < 0;
        if (halvings < MostHalvings && (isRising || isFalling)
            && steepest > 3 * (isRising ? mean : -mean)
            && Math.Max(cell.ValueFrom, cell.ValueTo) + (steepest * width / 4) > best)
        {
            Halve(segment, t, sign, cell, ref state, halvings);
        }
    }

    private void Halve(
        DrawSegment segment, int t, double sign, in Cell cell, ref TrackState state, int halvings)
    {
        var middle = cell.From + ((cell.To - cell.From) / 2);
        segment.Evaluate(middle, there);
        var (value, slope, _) = At(segment, t, state.Factor, there);
        state.Offer(value, segment.Start + middle);
        LookFor(segment, t, sign,
            new Cell(cell.From, cell.ValueFrom, cell.SlopeFrom, middle, sign * value, sign * slope),
            ref state, halvings + 1);
        LookFor(segment, t, sign,
            new Cell(middle, sign * value, sign * slope, cell.To, cell.ValueTo, cell.SlopeTo),
            ref state, halvings + 1);
    }

    /// <summary>The root of the slope by Newton steps kept in the cell.</summary>
    private void Climb(
        DrawSegment segment, int t, double sign, in Cell cell, double guess, ref TrackState state)
    {
        var (low0, high0, tau) = (cell.From, cell.To, guess);
        var width = cell.To - cell.From;
        for (var k = 0; k < MostNewtonSteps; k++)
        {
            segment.Evaluate(tau, there);
            var (value, slope, bend) = At(segment, t, state.Factor, there);
            state.Offer(value, segment.Start + tau);
            if (sign * slope > 0)
            {
                low0 = tau;
            }
            else
            {
                high0 = tau;
            }

            var next = tau - (slope / bend);
            next = next > low0 && next < high0 ? next : low0 + ((high0 - low0) / 2);
            if (slope == 0 || Math.Abs(next - tau) <= 1e-9 * width)
            {
                return;
            }

            tau = next;
        }
    }

    /// <summary>A step of the walk with values and slopes at its ends.</summary>
    private readonly record struct Cell(
        double From, double ValueFrom, double SlopeFrom, double To, double ValueTo, double SlopeTo)
    {
        /// <summary>Where the cubic through it has its crest.</summary>
        public double Crest()
        {
            var width = To - From;
            var mean = (ValueTo - ValueFrom) / width;
            // slope of the cubic: s₀ + 2 b ξ + a ξ²
            var a = 3 * (SlopeFrom + SlopeTo - (2 * mean));
            var b = (3 * mean) - (2 * SlopeFrom) - SlopeTo;
            var root = Math.Sqrt(Math.Max(0, (b * b) - (a * SlopeFrom)));
            var xi = SlopeFrom / (root - b); // s₀ > 0 > s₁: the root in (0, 1), stable form
            return From + (width * (xi > 0 && xi < 1 ? xi : SlopeFrom / (SlopeFrom - SlopeTo)));
        }

        /// <summary>The cubic's value.</summary>
        public double At(double tau)
        {
            var width = To - From;
            var x = (tau - From) / width;
            var y = 1 - x;
            return (y * y * (1 + (2 * x)) * ValueFrom) + (x * x * (1 + (2 * y)) * ValueTo)
                + (x * y * width * ((y * SlopeFrom) - (x * SlopeTo)));
        }
    }
}
