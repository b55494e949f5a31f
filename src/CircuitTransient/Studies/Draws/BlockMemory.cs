namespace CircuitTransient.Studies.Draws;

/// <summary>What bounds of blocks of steps need: how every exponent goes on from block to block, and the
/// bounds of every track in every block.</summary>
internal sealed class BlockMemory(int tracks, int functions, int units, int width)
{
    /// <summary>How many blocks it has room for.</summary>
    public const int MostBlocks = 128;

    private readonly bool[] isSlow = new bool[units];
    private readonly double[] share = new double[units];
    private readonly double[] growth = new double[units];
    private readonly double[] turnRe = new double[units];
    private readonly double[] turnIm = new double[units];
    private readonly double[] envelope = new double[units];
    private readonly double[] least = new double[MostBlocks * tracks];
    private readonly double[] greatest = new double[MostBlocks * tracks];

    /// <summary>The slow exponents' slots in the middle of the block.</summary>
    public double[] Slots { get; } = new double[width];

    /// <summary>Room for the tracks that are walked in a block.</summary>
    public int[] Tracks { get; } = new int[tracks];

    /// <summary>Room for the functions these are made of.</summary>
    public int[] Functions { get; } = new int[functions];

    /// <summary>Whether an exponent is followed by a straight line.</summary>
    public bool IsSlow(int unit) => isSlow[unit];

    /// <summary>What of an exponent's magnitude at τ = 0 bounds it, or what a straight line misses of
    /// it, over the block.</summary>
    public double Around(int unit) => share[unit] * envelope[unit];

    /// <summary>Prepares an exponent for the first block.</summary>
    /// <param name="unit">Which.</param>
    /// <param name="slow">Whether a straight line follows it.</param>
    /// <param name="missed">What of its magnitude that misses; all of a fast one.</param>
    /// <param name="grows">e^(Re E H), H the length of a block.</param>
    /// <param name="re">Re e^(E H).</param>
    /// <param name="im">Im e^(E H).</param>
    /// <param name="first">The largest e^(Re E τ) in the first block.</param>
    public void Prepare(
        int unit, bool slow, double missed, double grows, double re, double im, double first)
    {
        (isSlow[unit], share[unit], growth[unit]) = (slow, missed, grows);
        (turnRe[unit], turnIm[unit], envelope[unit]) = (re, im, first);
    }

    /// <summary>Goes on to the next block.</summary>
    public void Advance(DrawSegment segment)
    {
        for (var unit = 0; unit < segment.Units; unit++)
        {
            envelope[unit] *= growth[unit];
            if (!isSlow[unit])
            {
                continue;
            }

            var slot = segment.Slot[unit];
            if (segment.Im[unit] == 0)
            {
                Slots[slot] *= turnRe[unit];
                continue;
            }

            var (x, y) = (Slots[slot], Slots[slot + 1]);
            Slots[slot] = (x * turnRe[unit]) - (y * turnIm[unit]);
            Slots[slot + 1] = (x * turnIm[unit]) + (y * turnRe[unit]);
        }
    }

    /// <summary>Notes the bounds of a track in a block; infinite ones the wrong way round where it need not
    /// be walked.</summary>
    public void Put(int block, int track, double least, double greatest) =>
        (this.least[(block * tracks) + track], this.greatest[(block * tracks) + track]) = (least, greatest);

    /// <summary>A track's lower bound in a block.</summary>
    public double Least(int block, int track) => least[(block * tracks) + track];

    /// <summary>Its upper bound.</summary>
    public double Greatest(int block, int track) => greatest[(block * tracks) + track];

    /// <summary>The block with the highest upper bound; −1 where no block is to be walked.</summary>
    public int Highest(int track, int count)
    {
        var (place, most) = (-1, double.NegativeInfinity);
        for (var b = 0; b < count; b++)
        {
            (place, most) = Greatest(b, track) > most ? (b, Greatest(b, track)) : (place, most);
        }

        return place;
    }

    /// <summary>The block with the lowest lower bound; −1 where no block is to be walked.</summary>
    public int Lowest(int track, int count)
    {
        var (place, most) = (-1, double.PositiveInfinity);
        for (var b = 0; b < count; b++)
        {
            (place, most) = Least(b, track) < most ? (b, Least(b, track)) : (place, most);
        }

        return place;
    }
}
