namespace CircuitTransient.Studies.Draws;

internal sealed partial class SegmentWalk
{
    private readonly SeenCrest[] seen; // of every track its greatest, then its least

    /// <summary>What the greatest value of a track, or for a sign of −1 the greatest of its negative, reaches
    /// at least: the values met so far and what the crest still to be climbed rises to.</summary>
    private double Floor(int t, double sign, in TrackState state) => sign > 0
        ? Math.Max(state.Maximum, seen[2 * t].Least)
        : Math.Max(-state.Minimum, seen[(2 * t) + 1].Least);

    /// <summary>Keeps a crest to be climbed at the end of the stretch, for a higher one may follow. Of two
    /// that cannot be told apart the first is climbed now.</summary>
    private void PutOff(DrawSegment segment, int t, double sign, in SeenCrest crest, ref TrackState state)
    {
        ref var kept = ref seen[sign > 0 ? 2 * t : (2 * t) + 1];
        if (crest.Least < kept.Most)
        {
            Climb(segment, t, sign, kept.Cell, kept.Guess, ref state);
        }

        kept = crest.Most > (sign > 0 ? state.Maximum : -state.Minimum) ? crest : SeenCrest.None;
    }

    private void ClimbAll(DrawSegment segment, ReadOnlySpan<bool> isOpen, Span<TrackState> states)
    {
        for (var t = 0; t < tracks.Length; t++)
        {
            if (isOpen[t])
            {
                ClimbSeen(segment, t, 1, seen[2 * t], ref states[t]);
                ClimbSeen(segment, t, -1, seen[(2 * t) + 1], ref states[t]);
            }
        }
    }

    private void ClimbSeen(DrawSegment segment, int t, double sign, in SeenCrest crest, ref TrackState state)
    {
        if (crest.Most > (sign > 0 ? state.Maximum : -state.Minimum))
        {
            Climb(segment, t, sign, crest.Cell, crest.Guess, ref state);
        }
    }

    /// <summary>A crest between two steps that is not climbed yet.</summary>
    /// <param name="Cell">Where it stands.</param>
    /// <param name="Guess">Its instant by the cubic.</param>
    /// <param name="Least">What it reaches at least.</param>
    /// <param name="Most">What it reaches at most.</param>
    private readonly record struct SeenCrest(Cell Cell, double Guess, double Least, double Most)
    {
        public static readonly SeenCrest None =
            new(default, 0, double.NegativeInfinity, double.NegativeInfinity);
    }
}
