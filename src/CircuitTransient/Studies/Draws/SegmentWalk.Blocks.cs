namespace CircuitTransient.Studies.Draws;

internal sealed partial class SegmentWalk
{
    private const int StepsInBlock = 16; // a period of the fastest exponent
    private const int LeastBlocks = 8;
    private const double Dies = -2; // a ring that falls to e⁻² within the fewest blocks is walked soon enough
    private const double Slow = 0.75; // |E| H: an exponent that a straight line follows over a block

    private readonly BlockMemory blocks;
    private int ringing; // the exponent that the step is made for, where it rings; else −1

    /// <summary>Bounds the next blocks and walks those in which something better may stand: first of every
    /// track the one that promises most, so that the others need not be walked.</summary>
    /// <param name="segment">The segment.</param>
    /// <param name="tau">Where the walk stands; moves to the end of the blocks.</param>
    /// <param name="end">The stretch's end.</param>
    /// <param name="step">The step.</param>
    /// <param name="walked">Counts the steps walked.</param>
    /// <param name="chunk">How many blocks at once; doubled every time.</param>
    /// <param name="states">What was found so far.</param>
    /// <returns>False where that does not pay.</returns>
    private bool TryBlocks(
        DrawSegment segment, ref double tau, double end, double step, ref int walked, ref int chunk,
        Span<TrackState> states)
    {
        var length = StepsInBlock * step;
        var count = (int)Math.Min(chunk, (end - tau) / length);
        if (count < (chunk > LeastBlocks ? 1 : LeastBlocks) || ringing < 0
            || weight[ringing] * Envelope(segment, ringing, tau + (count * length / 2), end) <= Matters
            || segment.Re[ringing] * LeastBlocks * length < Dies)
        {
            return false;
        }

        chunk = Math.Min(2 * chunk, BlockMemory.MostBlocks);
        BoundBlocks(segment, tau, length, count, states);
        for (var a = 0; a < activeCount; a++)
        {
            WalkBlock(segment, tau, step, blocks.Highest(a, count), (a, a + 1), states, ref walked);
            WalkBlock(segment, tau, step, blocks.Lowest(a, count), (a, a + 1), states, ref walked);
        }

        for (var b = 0; b < count; b++)
        {
            WalkBlock(segment, tau, step, b, (0, activeCount), states, ref walked);
        }

        walked += count;
        tau += count * length;
        segment.Evaluate(tau, slots);
        PutFunctions(segment, slots, used.AsSpan(0, usedCount));
        foreach (var t in active.AsSpan(0, activeCount))
        {
            ref var state = ref states[t];
            (state.Value, state.Slope) = ValueOf(t, state.Factor);
        }

        return true;
    }

    /// <summary>Bounds every active track over every block: a slow exponent by the straight line through its
    /// middle and |E|² H²/8, a fast one by its magnitude.</summary>
    private void BoundBlocks(
        DrawSegment segment, double tau, double length, int count, Span<TrackState> states)
    {
        PrepareBlocks(segment, tau, length);
        for (var b = 0; b < count; b++)
        {
            foreach (var f in used.AsSpan(0, usedCount))
            {
                BoundFunction(segment, f, length);
            }

            for (var a = 0; a < activeCount; a++)
            {
                var t = active[a];
                var (least, greatest, size) = Bounds(t, states[t].Factor);
                blocks.Put(
                    b, a, states[t].IsMinimumSettled ? double.PositiveInfinity : least + (Settled * size),
                    states[t].IsMaximumSettled ? double.NegativeInfinity : greatest - (Settled * size));
            }

            blocks.Advance(segment);
        }
    }

    private void PrepareBlocks(DrawSegment segment, double tau, double length)
    {
        segment.Evaluate(tau + (length / 2), blocks.Slots);
        for (var unit = 0; unit < segment.Units; unit++)
        {
            var (re, im) = (segment.Re[unit], segment.Im[unit]);
            var turn = Math.Sqrt((re * re) + (im * im)) * length;
            var growth = re == 0 ? 1 : Math.Exp(re * length);
            var (sin, cos) = im == 0 ? (0, 1) : Math.SinCos(im * length);
            var isSlow = segment.Degree[unit] == 0 && turn <= Slow;
            blocks.Prepare(
                unit, isSlow, isSlow ? turn * turn / 8 : 1, growth, growth * cos, growth * sin,
                re == 0 ? 1 : Math.Exp(re * (re > 0 ? tau + length : tau)));
        }
    }

    private void BoundFunction(DrawSegment segment, int f, double length)
    {
        double middle = 0, slope = 0, around = 0;
        for (var unit = 0; unit < segment.Units; unit++)
        {
            around += magnitudes[(f * units) + unit] * blocks.Around(unit);
            if (blocks.IsSlow(unit))
            {
                var slot = segment.Slot[unit];
                var at = (f * segment.Stride) + slot;
                middle += segment.Coefficients[at] * blocks.Slots[slot];
                slope += segment.Slopes[at] * blocks.Slots[slot];
                if (segment.Im[unit] != 0)
                {
                    middle += segment.Coefficients[at + 1] * blocks.Slots[slot + 1];
                    slope += segment.Slopes[at + 1] * blocks.Slots[slot + 1];
                }
            }
        }

        around += Math.Abs(slope) * length / 2;
        (low[f], high[f]) = (middle - around, middle + around);
    }

    /// <summary>Walks one block for those of some active tracks that may find something better in
    /// it.</summary>
    private void WalkBlock(
        DrawSegment segment, double start, double step, int block, (int From, int To) some,
        Span<TrackState> states, ref int walked)
    {
        var tracksHere = 0;
        for (var a = some.From; a < some.To && block >= 0; a++)
        {
            ref readonly var state = ref states[active[a]];
            if (blocks.Greatest(block, a) > Floor(active[a], 1, state)
                || -blocks.Least(block, a) > Floor(active[a], -1, state))
            {
                blocks.Tracks[tracksHere++] = active[a];
                blocks.Put(block, a, double.PositiveInfinity, double.NegativeInfinity);
            }
        }

        if (tracksHere == 0)
        {
            return;
        }

        walked += StepsInBlock;
        var here = blocks.Tracks.AsSpan(0, tracksHere);
        var functions = FunctionsOf(here);
        var tau = start + (block * StepsInBlock * step);
        segment.Evaluate(tau, slots);
        PutFunctions(segment, slots, functions);
        foreach (var t in here)
        {
            ref var state = ref states[t];
            (state.Value, state.Slope) = ValueOf(t, state.Factor);
            state.Offer(state.Value, segment.Start + tau);
        }

        for (var s = 1; s <= StepsInBlock; s++)
        {
            var next = start + (((block * StepsInBlock) + s) * step);
            Advance(segment, next);
            PutFunctions(segment, slots, functions);
            foreach (var t in here)
            {
                Look(segment, t, tau, next, ref states[t]);
            }

            tau = next;
        }
    }

    private ReadOnlySpan<int> FunctionsOf(ReadOnlySpan<int> some)
    {
        var count = 0;
        foreach (var t in some)
        {
            count = Add(tracks[t].First, count);
            count = tracks[t].Second < 0 ? count : Add(tracks[t].Second, count);
        }

        return blocks.Functions.AsSpan(0, count);

        int Add(int function, int count)
        {
            if (blocks.Functions.AsSpan(0, count).Contains(function))
            {
                return count;
            }

            blocks.Functions[count] = function;
            return count + 1;
        }
    }
}
