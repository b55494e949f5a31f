using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The functions of a segment, and those that arise where a block of poles is driven by them:
/// ∫₀^τ e^(T (τ − s)) w φ(s) ds. Where block and function are well apart over the segment the integral is a
/// multiple of φ beside the block's own motion; where some of their exponents differ by less than one over
/// the length (a pole driven by itself, always) the two stay together as the corner of exp([T w; 0 Θ] τ),
/// and no difference is divided.</summary>
internal sealed class DrivenModes
{
    private readonly ImmutableArray<SpectralBlock> blocks;
    private readonly ImmutableArray<Mode> own;
    private readonly double length;
    private readonly List<Mode> modes;
    private readonly Dictionary<(int Block, int Mode, bool IsMirrored, int Row, int Place), int> joined = [];

    public DrivenModes(ImmutableArray<SpectralBlock> blocks, SegmentBasis basis, double length)
    {
        this.blocks = blocks;
        own = basis.Modes;
        this.length = length;
        modes = [.. own];
        for (var b = 0; b < blocks.Length; b++)
        {
            for (var m = 0; m < own.Length; m++)
            {
                Join(b, m, isMirrored: false);
                if (!own[m].IsReal)
                {
                    Join(b, m, isMirrored: true);
                }
            }
        }

        Basis = new SegmentBasis([.. modes]);
    }

    /// <summary>All functions: the segment's own first.</summary>
    public SegmentBasis Basis { get; }

    /// <summary>How a block responds from rest to disturbances of laws.</summary>
    /// <param name="b">The block.</param>
    /// <param name="disturbances">For each law how its disturbance drives the block, and the disturbance
    /// itself: the real part of a sum of the segment's functions.</param>
    public List<ResponseTerm> Respond(
        int b, IReadOnlyList<(DoubleDoubleComplex[] Drive, DoubleDoubleComplex[][] Weights)> disturbances)
    {
        var terms = new List<ResponseTerm>();
        var free = new DoubleDoubleComplex[blocks[b].Size];
        for (var m = 0; m < own.Length; m++)
        {
            for (var row = 0; row < own[m].Rows; row++)
            {
                AddResponse(terms, free, b, m, row, false, Columns(m, row, false, disturbances));
                if (!own[m].IsReal)
                {
                    AddResponse(terms, free, b, m, row, true, Columns(m, row, true, disturbances));
                }
            }
        }

        // The block's own motion that makes the whole begin at rest; block b's own mode is the b-th.
        for (var i = 0; i < free.Length; i++)
        {
            for (var j = i; j < free.Length; j++)
            {
                var vector = new DoubleDoubleComplex[free.Length];
                vector[i] = free[j];
                terms.Add(new ResponseTerm(b, own[b].Carrier(i, j), false, vector));
            }
        }

        return terms;
    }

    /// <summary>What drives a block by each function of a mode's row; the real part of a complex function is
    /// half of it and half of its conjugate.</summary>
    private DoubleDoubleComplex[][] Columns(
        int m, int row, bool isMirrored,
        IReadOnlyList<(DoubleDoubleComplex[] Drive, DoubleDoubleComplex[][] Weights)> disturbances)
    {
        var mode = own[m];
        var columns = new DoubleDoubleComplex[mode.Order - row][];
        for (var c = 0; c < columns.Length; c++)
        {
            columns[c] = new DoubleDoubleComplex[disturbances.Count == 0 ? 0 : disturbances[0].Drive.Length];
            foreach (var (drive, weights) in disturbances)
            {
                var weight = weights[m][mode.Carrier(row, row + c)];
                weight = mode.IsReal ? weight.Re
                    : (isMirrored ? weight.Conjugate : weight) * (DoubleDouble)0.5;
                for (var i = 0; i < drive.Length && !weight.IsZero; i++)
                {
                    columns[c][i] += drive[i] * weight;
                }
            }
        }

        return columns;
    }

    private void AddResponse(
        List<ResponseTerm> terms, DoubleDoubleComplex[] free, int b, int m, int row, bool isMirrored,
        DoubleDoubleComplex[][] columns)
    {
        if (Array.TrueForAll(columns, c => Array.TrueForAll(c, x => x.IsZero)))
        {
            return;
        }

        var mode = own[m];
        if (IsNear(b, m, isMirrored))
        {
            AddJoined(terms, b, m, row, isMirrored, columns);
            return;
        }

        Solve(blocks[b], mode, row, isMirrored, columns);
        for (var c = 0; c < columns.Length; c++)
        {
            terms.Add(new ResponseTerm(m, mode.Carrier(row, row + c), isMirrored, columns[c]));
        }

        for (var i = 0; i < free.Length; i++)
        {
            free[i] -= columns[0][i];
        }
    }

    /// <summary>The multiples M of the functions in row r of exp(Θ τ), in place of the drive X:
    /// M Θᵀ − T M = X, column by column from the last.</summary>
    private static void Solve(
        SpectralBlock block, Mode mode, int row, bool isMirrored, DoubleDoubleComplex[][] columns)
    {
        for (var c = columns.Length - 1; c >= 0; c--)
        {
            var exponent = Entry(mode, row + c, row + c, isMirrored);
            for (var i = block.Size - 1; i >= 0; i--)
            {
                var sum = columns[c][i];
                for (var k = c + 1; k < columns.Length; k++)
                {
                    sum -= columns[k][i] * Entry(mode, row + c, row + k, isMirrored);
                }

                for (var j = i + 1; j < block.Size; j++)
                {
                    sum += block.T[i, j] * columns[c][j];
                }

                columns[c][i] = sum / (exponent - block.T[i, i]);
            }
        }
    }

    private void AddJoined(
        List<ResponseTerm> terms, int b, int m, int row, bool isMirrored, DoubleDoubleComplex[][] columns)
    {
        var size = blocks[b].Size;
        for (var place = 0; place < size; place++)
        {
            var index = joined[(b, m, isMirrored, row, place)];
            for (var c = 0; c < columns.Length; c++)
            {
                if (columns[c][place].IsZero)
                {
                    continue;
                }

                for (var i = 0; i <= place; i++)
                {
                    var vector = new DoubleDoubleComplex[size];
                    vector[i] = columns[c][place];
                    terms.Add(new ResponseTerm(
                        index, modes[index].Carrier(i, place + 1 + c), false, vector));
                }
            }
        }
    }

    private void Join(int b, int m, bool isMirrored)
    {
        if (!IsNear(b, m, isMirrored))
        {
            return;
        }

        for (var row = 0; row < own[m].Rows; row++)
        {
            for (var place = 0; place < blocks[b].Size; place++)
            {
                joined.Add((b, m, isMirrored, row, place), modes.Count);
                var triangle = Joint(blocks[b], place, own[m], row, isMirrored);
                modes.Add(new Mode(
                    triangle.GetLength(0) == 2 ? ModeKind.Joined : ModeKind.Pole, triangle, place + 1, b));
            }
        }
    }

    /// <summary>[T e_k e₁ᵀ; 0 Θ]: the first k + 1 rows of the block, driven in the last by the first function
    /// of a row of exp(Θ τ).</summary>
    private static DoubleDoubleComplex[,] Joint(
        SpectralBlock block, int place, Mode mode, int row, bool isMirrored)
    {
        var rows = place + 1;
        var order = rows + mode.Order - row;
        var joint = new DoubleDoubleComplex[order, order];
        for (var i = 0; i < rows; i++)
        {
            for (var j = i; j < rows; j++)
            {
                joint[i, j] = block.T[i, j];
            }
        }

        joint[place, rows] = DoubleDoubleComplex.One;
        for (var i = row; i < mode.Order; i++)
        {
            for (var j = i; j < mode.Order; j++)
            {
                joint[rows + i - row, rows + j - row] = Entry(mode, i, j, isMirrored);
            }
        }

        return joint;
    }

    private bool IsNear(int b, int m, bool isMirrored)
    {
        for (var i = 0; i < blocks[b].Size; i++)
        {
            for (var j = 0; j < own[m].Order; j++)
            {
                var apart = (blocks[b].T[i, i] - Entry(own[m], j, j, isMirrored)).Magnitude;
                if (apart * length < 1)
                {
                    return true;
                }
            }
        }

        return false;
    }

    private static DoubleDoubleComplex Entry(Mode mode, int i, int j, bool isMirrored) =>
        isMirrored ? mode.Triangle[i, j].Conjugate : mode.Triangle[i, j];
}
