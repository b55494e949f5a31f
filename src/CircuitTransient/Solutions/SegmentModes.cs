using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>The modes of a segment, and how motions are written in them. A forced response is kept as a
/// multiple of its exponential where that is well apart from a block's poles over the segment; where the two
/// are so near that their difference times the length is below 1, block and exponential stay together as one
/// triangle, since a quotient of differences would cancel.</summary>
internal sealed class SegmentModes
{
    private readonly IntervalModel model;
    private readonly Dictionary<DoubleDoubleComplex, int> forcedModes = [];
    private readonly Dictionary<(int Block, DoubleDoubleComplex Exponent, int Input), int> joinedModes = [];
    private readonly DoubleDouble length;
    private readonly Lazy<DoubleDoubleComplex[][]> carriersAtEnd;

    public SegmentModes(IntervalModel model, double start, double end, IEnumerable<Forcing> forcings)
    {
        this.model = model;
        length = (DoubleDouble)end - start;
        var modes = ImmutableArray.CreateBuilder<Mode>();
        for (var b = 0; b < model.Blocks.Length; b++)
        {
            modes.Add(new Mode(ModeKind.Pole, BlockResponse.TriangleOf(model.Blocks[b]), model.Blocks[b].Size,
                b));
        }

        var all = forcings.ToList();
        foreach (var forcing in all)
        {
            AddForced(modes, forcing.Exponent, all);
            for (var b = 0; b < model.Blocks.Length; b++)
            {
                AddJoined(modes, b, forcing, all);
            }
        }

        Basis = new SegmentBasis(modes.ToImmutable());
        carriersAtEnd = new(() => [.. Basis.Modes.Select(m => ModeEvaluation.EvaluateExactly(m, length))]);
    }

    public SegmentBasis Basis { get; }

    /// <summary>Every function at the segment's end.</summary>
    public DoubleDoubleComplex[][] CarriersAtEnd => carriersAtEnd.Value;

    /// <summary>The coefficients of an output, mode by mode; the output is the real part of the sum of
    /// products.</summary>
    /// <param name="projection">The output.</param>
    /// <param name="motion">Whose motion.</param>
    /// <param name="isBeside">Whether a pole with a source joined to it is written beside the source's
    /// exponential, which keeps the last digit; else it stands in its own mode.</param>
    public DoubleDoubleComplex[][] Coefficients(Projection projection, Motion motion, bool isBeside = true)
    {
        var sums = new DoubleDoubleComplex[Basis.Modes.Length][];
        for (var m = 0; m < sums.Length; m++)
        {
            sums[m] = new DoubleDoubleComplex[Basis.Modes[m].CarrierCount];
        }

        foreach (var forcing in motion.Forcings)
        {
            AddDirect(sums, projection, forcing);
        }

        for (var b = 0; b < model.Blocks.Length; b++)
        {
            AddBlock(sums, b, projection.Rows[b], motion, isBeside);
        }

        return sums;
    }

    /// <summary>ζ of every block at the segment's end.</summary>
    public DoubleDoubleComplex[][] StateAtEnd(Motion motion)
    {
        var state = new DoubleDoubleComplex[model.Blocks.Length][];
        for (var b = 0; b < state.Length; b++)
        {
            state[b] = BlockResponse.AtEnd(this, model, b, motion, length);
        }

        return state;
    }

    /// <summary>Whether a block and an exponent are kept together; and the mode that does it.</summary>
    public bool IsJoined(int block, Forcing forcing, out int mode) =>
        joinedModes.TryGetValue(Key(block, forcing), out mode);

    private void AddDirect(DoubleDoubleComplex[][] sums, Projection projection, Forcing forcing)
    {
        var (amplitude, slope) = (forcing.Amplitude, forcing.Slope);
        DoubleDoubleComplex a = default, s = default;
        foreach (var direct in projection.Output.Direct)
        {
            var d = direct[forcing.Input];
            if (!d.IsZero)
            {
                a += d * amplitude;
                s += d * slope;
            }

            (amplitude, slope) = (slope + (forcing.Exponent * amplitude), forcing.Exponent * slope);
        }

        AddForcedTerms(sums, forcing.Exponent, a, s);
    }

    private void AddBlock(
        DoubleDoubleComplex[][] sums, int b, DoubleDoubleComplex[] row, Motion motion, bool isBeside)
    {
        var block = model.Blocks[b];
        var mode = Basis.Modes[b];
        DoubleDouble factor = block.IsReal ? 1 : 2; // the other half of a conjugate pair
        var free = (DoubleDoubleComplex[])motion.State[b].Clone();
        foreach (var forcing in motion.Forcings)
        {
            if (IsJoined(b, forcing, out var joined))
            {
                AddJoinedTerms(sums[joined], Basis.Modes[joined], row, factor, model.Drive(b, forcing.Input),
                    forcing);
                continue;
            }

            var (first, second) =
                BlockResponse.Forced(block, model.Drive(b, forcing.Input), forcing.Exponent);
            DoubleDoubleComplex a = default, s = default;
            for (var i = 0; i < free.Length; i++)
            {
                var level = (first[i] * forcing.Amplitude) + (second[i] * forcing.Slope);
                free[i] -= level;
                a += row[i] * level;
                s += row[i] * first[i] * forcing.Slope;
            }

            AddForcedTerms(sums, forcing.Exponent, a * factor, s * factor);
        }

        // What is at rest beside a slow sine is no swing: written as a constant and one, the two would only
        // cancel.
        if (isBeside && block.Size == 1 && motion.Forcings.FirstOrDefault(
            f => (f.Exponent.Im.IsZero || !block.IsReal) && IsJoined(b, f, out _)) is { } kept)
        {
            AddBesideForced(sums, b, kept, row[0] * free[0] * factor);
            return;
        }

        for (var i = 0; i < block.Size; i++)
        {
            for (var j = i; j < block.Size; j++)
            {
                sums[b][mode.Carrier(i, j)] += row[i] * free[j] * factor;
            }
        }
    }

    /// <summary>e^(p τ) = e^(μ τ) + (p − μ) e[p, μ]: beside a joined exponential the pole is written so, and
    /// a network at rest is a constant to the last digit instead of two motions that cancel.</summary>
    private void AddBesideForced(DoubleDoubleComplex[][] sums, int b, Forcing kept,
        DoubleDoubleComplex weight)
    {
        IsJoined(b, kept, out var joined);
        var mode = Basis.Modes[joined];
        sums[joined][mode.Carrier(0, 1)] += weight * (mode.Triangle[0, 0] - mode.Triangle[1, 1]);
        AddForcedTerms(sums, kept.Exponent, weight, default);
    }

    private static void AddJoinedTerms(
        DoubleDoubleComplex[] sums, Mode mode, DoubleDoubleComplex[] row, DoubleDouble factor,
        DoubleDoubleComplex[] drive, Forcing forcing)
    {
        var m = row.Length;
        for (var i = 0; i < m; i++)
        {
            // A lone pole's chain is written for a unit drive, so that all sources share it.
            var weight = (m == 1 ? row[0] * drive[0] : row[i]) * factor;
            sums[mode.Carrier(i, m)] += weight * forcing.Amplitude;
            if (mode.Order > m + 1)
            {
                sums[mode.Carrier(i, m + 1)] += weight * forcing.Slope;
            }
        }
    }

    private void AddForcedTerms(
        DoubleDoubleComplex[][] sums, DoubleDoubleComplex exponent, DoubleDoubleComplex a,
        DoubleDoubleComplex s)
    {
        var mirrored = exponent.Im.IsNegative;
        var mode = forcedModes[mirrored ? exponent.Conjugate : exponent];
        sums[mode][0] += mirrored ? a.Conjugate : a;
        if (Basis.Modes[mode].Order > 1)
        {
            sums[mode][1] += mirrored ? s.Conjugate : s;
        }
    }

    private void AddForced(ImmutableArray<Mode>.Builder modes, DoubleDoubleComplex exponent,
        List<Forcing> all)
    {
        if (exponent.Im.IsNegative || forcedModes.ContainsKey(exponent))
        {
            return;
        }

        var slopes = all.Exists(f => f.Exponent == exponent && !f.Slope.IsZero);
        var chain = slopes
            ? new DoubleDoubleComplex[,] { { exponent, 1 }, { 0, exponent } }
            : new DoubleDoubleComplex[,] { { exponent } };
        forcedModes.Add(exponent, modes.Count);
        modes.Add(new Mode(ModeKind.Forced, chain, 1, -1));
    }

    private void AddJoined(ImmutableArray<Mode>.Builder modes, int b, Forcing forcing, List<Forcing> all)
    {
        if (joinedModes.ContainsKey(Key(b, forcing)) || !IsNear(model.Blocks[b], forcing.Exponent))
        {
            return;
        }

        joinedModes.Add(Key(b, forcing), modes.Count);
        var block = model.Blocks[b];
        var drive = block.Size == 1 ? [DoubleDoubleComplex.One] : model.Drive(b, forcing.Input);
        var slopes = all.Exists(f => f.Exponent == forcing.Exponent && !f.Slope.IsZero);
        modes.Add(new Mode(ModeKind.Joined, BlockResponse.Join(block, drive, forcing.Exponent, slopes),
            block.Size, model.FirstAlike(b)));
    }

    private bool IsNear(SpectralBlock block, DoubleDoubleComplex exponent)
    {
        for (var i = 0; i < block.Size; i++)
        {
            if ((block.T[i, i] - exponent).Magnitude * length.Hi < 1)
            {
                return true;
            }
        }

        return false;
    }

    private (int, DoubleDoubleComplex, int) Key(int block, Forcing forcing) =>
        (model.FirstAlike(block), forcing.Exponent, model.Blocks[block].Size == 1 ? -1 : forcing.Input);
}
