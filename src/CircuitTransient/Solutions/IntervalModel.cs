using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>A circuit with its switches in given positions, split into its spectral blocks. Made once for
/// each set of positions and used for every interval that has them.</summary>
public sealed class IntervalModel
{
    private readonly DoubleDoubleComplex[][][] drives;
    private readonly int[] firstAlike;
    private readonly Dictionary<Measurand, Projection> projections = [];

    /// <summary>Splits a normal form.</summary>
    public IntervalModel(NormalForm form, ImmutableArray<bool> isClosed)
        : this(form, isClosed, SpectralBlocks.Of(form.A).Blocks)
    {
    }

    /// <summary>A normal form whose blocks are known, as of the same network with fewer inputs.</summary>
    internal IntervalModel(
        NormalForm form, ImmutableArray<bool> isClosed, ImmutableArray<SpectralBlock> blocks)
    {
        Form = form;
        IsClosed = isClosed;
        Blocks = blocks;
        firstAlike = FirstAlikes(blocks);
        drives = new DoubleDoubleComplex[Blocks.Length][][];
        for (var b = 0; b < Blocks.Length; b++)
        {
            var driven = Blocks[b].W.Times(form.B);
            drives[b] = new DoubleDoubleComplex[form.Layout.InputCount][];
            for (var input = 0; input < drives[b].Length; input++)
            {
                drives[b][input] = new DoubleDoubleComplex[driven.Rows];
                for (var i = 0; i < driven.Rows; i++)
                {
                    drives[b][input][i] = driven[i, input];
                }
            }
        }
    }

    /// <summary>The equations in normal form.</summary>
    public NormalForm Form { get; }

    /// <summary>For every part, whether it is a switch that is closed.</summary>
    public ImmutableArray<bool> IsClosed { get; }

    /// <summary>The blocks of poles.</summary>
    public ImmutableArray<SpectralBlock> Blocks { get; }

    /// <summary>The first block of the very same lone pole: charges that several floating capacitors hold
    /// have zero poles in common, and what of them cancels is to cancel before it is rounded.</summary>
    internal int FirstAlike(int block) => firstAlike[block];

    /// <summary>How an input drives a block: W b, one number for each row of the block.</summary>
    internal DoubleDoubleComplex[] Drive(int block, int input) => drives[block][input];

    /// <summary>How a voltage, a current or the rate of change of one is made of the blocks.</summary>
    public Projection Project(Measurand measurand)
    {
        lock (projections)
        {
            if (projections.TryGetValue(measurand, out var known))
            {
                return known;
            }
        }

        // outside the lock: threads that want other quantities need not wait
        var projection = Projection.Of(this, Outputs.Of(Form, measurand));
        lock (projections)
        {
            return projections.TryAdd(measurand, projection) ? projection : projections[measurand];
        }
    }

    private static int[] FirstAlikes(ImmutableArray<SpectralBlock> blocks)
    {
        var first = new int[blocks.Length];
        var seen = new Dictionary<(bool IsReal, DoubleDoubleComplex Pole), int>();
        foreach (var (b, block) in blocks.Index())
        {
            var isNew = block.Size > 1 || seen.TryAdd((block.IsReal, block.T[0, 0]), b);
            first[b] = isNew ? b : seen[(block.IsReal, block.T[0, 0])];
        }

        return first;
    }
}

/// <summary>A linear output seen from the spectral blocks.</summary>
/// <param name="Rows">c V for each block.</param>
/// <param name="Output">The output itself.</param>
public sealed record Projection(DoubleDoubleComplex[][] Rows, LinearOutput Output)
{
    internal static Projection Of(IntervalModel model, LinearOutput output)
    {
        var rows = new DoubleDoubleComplex[model.Blocks.Length][];
        for (var b = 0; b < rows.Length; b++)
        {
            var v = model.Blocks[b].V;
            rows[b] = new DoubleDoubleComplex[v.Columns];
            for (var i = 0; i < v.Rows; i++)
            {
                if (output.State[i].IsZero)
                {
                    continue;
                }

                for (var j = 0; j < v.Columns; j++)
                {
                    rows[b][j] += output.State[i] * v[i, j];
                }
            }
        }

        return new Projection(rows, output);
    }
}
