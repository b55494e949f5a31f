using System.Collections.Immutable;

namespace CircuitTransient.Studies.Draws;

/// <summary>Finds extremes on a segment by walking along it: steps of a sixteenth of a period of the fastest
/// exponent that still matters, the exponentials by recurrence; a crest between two steps is told by the
/// slopes there and settled by Newton steps on the closed form. Where many periods are left, blocks of steps
/// are bounded first, and only those that may hold a better value are walked. The walk ends where a bound of
/// what is left rules out any better value.</summary>
internal sealed partial class SegmentWalk
{
    private const double Turn = 0.4; // |E| h: 16 steps a period; cubic pieces then miss 1e-4 of a mode
    private const double Fall = 0.5; // of a time constant: less is hidden in a monotone function
    private const double Matters = 1e-9; // of a function's size: less moves no peak by what is promised
    private const double Settled = 1e-9; // of a function's size
    private const int StepsBetweenBounds = 4;
    private const int MostSteps = 40_000; // a segment with more goes the exact route

    private readonly ImmutableArray<DrawTrack> tracks;
    private readonly int[] active;
    private readonly bool[] isUsed; // which functions the active tracks are made of
    private readonly int[] used;
    private readonly double[] slots;
    private readonly double[] there; // slots at a crest that is looked at
    private readonly double[] values;
    private readonly double[] slopes;
    private readonly double[] sizes;
    private readonly double[] magnitudes; // functions × units, at τ = 0 of the segment
    private readonly double[] high;
    private readonly double[] low;
    private readonly double[] factorRe;
    private readonly double[] factorIm;
    private readonly double[] weight; // of every unit in the function it matters most to
    private readonly int units;
    private int activeCount;
    private int usedCount;

    public SegmentWalk(ImmutableArray<DrawTrack> tracks, int functions, int units, int width)
    {
        this.tracks = tracks;
        this.units = units;
        active = new int[tracks.Length];
        isUsed = new bool[functions];
        used = new int[functions];
        slots = new double[width];
        there = new double[width];
        values = new double[functions];
        slopes = new double[functions];
        sizes = new double[functions];
        magnitudes = new double[functions * units];
        high = new double[functions];
        low = new double[functions];
        factorRe = new double[units];
        factorIm = new double[units];
        weight = new double[units];
        factorEnvelope = new double[units];
        seen = new SeenCrest[2 * tracks.Length];
        blocks = new BlockMemory(tracks.Length, functions, units, width);
    }

    /// <summary>Searches a stretch of a segment for every track whose window holds it.</summary>
    /// <param name="segment">The segment.</param>
    /// <param name="from">The stretch's start in seconds.</param>
    /// <param name="to">Its end.</param>
    /// <param name="isOpen">For every track, whether the stretch lies in its window.</param>
    /// <param name="states">What was found so far.</param>
    /// <returns>False where there are too many crests.</returns>
    public bool Run(
        DrawSegment segment, double from, double to, ReadOnlySpan<bool> isOpen, Span<TrackState> states)
    {
        Choose(isOpen, states);
        if (activeCount == 0)
        {
            return true;
        }

        var (tau, end) = (from - segment.Start, to - segment.Start);
        Prepare(segment, tau, end);
        PutFunctions(segment, slots, used.AsSpan(0, usedCount));
        foreach (var t in active.AsSpan(0, activeCount))
        {
            ref var state = ref states[t];
            (state.Value, state.Slope) = ValueOf(t, state.Factor);
            state.Offer(state.Value, from);
        }

        if (!Walk(segment, tau, end, states))
        {
            return false;
        }

        ClimbAll(segment, isOpen, states);
        return true;
    }

    private bool Walk(DrawSegment segment, double tau, double end, Span<TrackState> states)
    {
        double step = 0;
        var (walked, chunk) = (0, LeastBlocks);
        for (var count = 0; tau < end; count++)
        {
            if (count % StepsBetweenBounds == 0)
            {
                if (walked + count > MostSteps)
                {
                    return false;
                }

                if (Settle(segment, tau, end, states))
                {
                    return true;
                }

                ChooseStep(segment, tau, end, ref step);
                if (TryBlocks(segment, ref tau, end, step, ref walked, ref chunk, states))
                {
                    count = -1;
                    continue;
                }
            }

            var next = tau + step;
            if (next >= end - (1e-3 * step))
            {
                next = end;
                segment.Evaluate(end, slots);
            }
            else
            {
                Advance(segment, next);
            }

            PutFunctions(segment, slots, used.AsSpan(0, usedCount));
            foreach (var t in active.AsSpan(0, activeCount))
            {
                Look(segment, t, tau, next, ref states[t]);
            }

            tau = next;
        }

        return true;
    }

    /// <summary>Takes the values at one instant into account.</summary>
    public void Touch(DrawSegment segment, double time, int track, ref TrackState state)
    {
        segment.Evaluate(time - segment.Start, there);
        state.Offer(At(segment, track, state.Factor, there).Value, time);
    }

    private void Choose(ReadOnlySpan<bool> isOpen, Span<TrackState> states)
    {
        Array.Clear(isUsed);
        (activeCount, usedCount) = (0, 0);
        for (var t = 0; t < tracks.Length; t++)
        {
            if (!isOpen[t])
            {
                continue;
            }

            active[activeCount++] = t;
            (seen[2 * t], seen[(2 * t) + 1]) = (SeenCrest.None, SeenCrest.None);
            states[t].IsMaximumSettled = !tracks[t].WantsMaximum;
            states[t].IsMinimumSettled = !tracks[t].WantsMinimum;
            Use(tracks[t].First);
            if (tracks[t].Second >= 0)
            {
                Use(tracks[t].Second);
            }
        }
    }

    private void Use(int function)
    {
        if (!isUsed[function])
        {
            isUsed[function] = true;
            used[usedCount++] = function;
        }
    }

    /// <summary>Sizes of the functions, and what every exponent weighs in them at the stretch's
    /// start.</summary>
    private void Prepare(DrawSegment segment, double tau, double end)
    {
        Array.Clear(slots);
        segment.Evaluate(tau, slots);
        Array.Clear(weight);
        foreach (var f in used.AsSpan(0, usedCount))
        {
            double size = 0;
            for (var unit = 0; unit < segment.Units; unit++)
            {
                var magnitude = segment.Magnitude(f, unit, end);
                magnitudes[(f * units) + unit] = magnitude;
                size += magnitude * Envelope(segment, unit, tau, end);
            }

            sizes[f] = size;
            for (var unit = 0; unit < segment.Units && size > 0; unit++)
            {
                weight[unit] = Math.Max(weight[unit], magnitudes[(f * units) + unit] / size);
            }
        }
    }

    /// <summary>The largest e^(Re E τ) from an instant on.</summary>
    private static double Envelope(DrawSegment segment, int unit, double tau, double end) =>
        segment.Re[unit] == 0 ? 1 : Math.Exp(segment.Re[unit] * (segment.Re[unit] > 0 ? end : tau));

    private void ChooseStep(DrawSegment segment, double tau, double end, ref double step)
    {
        (double fastest, ringing) = (0, -1);
        for (var unit = 0; unit < segment.Units; unit++)
        {
            if (weight[unit] == 0 || weight[unit] * factorEnvelope[unit] <= Matters)
            {
                continue;
            }

            var (re, im) = (segment.Re[unit], segment.Im[unit]);
            var own = im == 0 ? Math.Abs(re) / Fall : Math.Sqrt((re * re) + (im * im)) / Turn;
            (fastest, ringing) = own > fastest ? (own, im == 0 ? -1 : unit) : (fastest, ringing);
            if (segment.Degree[unit] > 1)
            {
                fastest = Math.Max(fastest, 8 / end);
            }
        }

        var chosen = fastest == 0 ? end - tau : Math.Min(1 / fastest, end - tau);
        if (step > 0 && chosen < 1.2 * step && chosen > 0.99 * step)
        {
            return;
        }

        step = chosen;
        for (var unit = 0; unit < segment.Units; unit++)
        {
            var growth = segment.Re[unit] == 0 ? 1 : Math.Exp(segment.Re[unit] * step);
            var (sin, cos) = segment.Im[unit] == 0 ? (0, 1) : Math.SinCos(segment.Im[unit] * step);
            (factorRe[unit], factorIm[unit]) = (growth * cos, growth * sin);
        }
    }

    private void Advance(DrawSegment segment, double next)
    {
        for (var unit = 0; unit < segment.Units; unit++)
        {
            var slot = segment.Slot[unit];
            if (segment.Im[unit] == 0)
            {
                slots[slot] *= factorRe[unit];
                for (var p = 1; p <= segment.Degree[unit]; p++)
                {
                    slots[slot + p] = next * slots[slot + p - 1];
                }

                continue;
            }

            var (x, y) = (slots[slot], slots[slot + 1]);
            slots[slot] = (x * factorRe[unit]) - (y * factorIm[unit]);
            slots[slot + 1] = (x * factorIm[unit]) + (y * factorRe[unit]);
            for (var p = 1; p <= segment.Degree[unit]; p++)
            {
                slots[slot + (2 * p)] = next * slots[slot + (2 * p) - 2];
                slots[slot + (2 * p) + 1] = next * slots[slot + (2 * p) - 1];
            }
        }
    }
}
