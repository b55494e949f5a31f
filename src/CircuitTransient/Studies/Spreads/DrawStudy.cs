using System.Collections.Immutable;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Random draws of all values within their tolerances, a Latin hypercube a block. Memory does not
/// grow with the draws: figures are counted as they come, and of single draws only the first are
/// kept.</summary>
internal sealed class DrawStudy
{
    /// <summary>How many draws are kept with all their figures.</summary>
    public const int MostRows = 20_000;

    private const int DrawsInStep = 500; // no more than these are lost by an interruption
    private const long MostKept = 4_000_000; // numbers kept for exact quantiles: 32 MB
    private const int MostNamed = 20; // unsolvable draws that are named

    private readonly PointBatch batch;
    private readonly SpreadOptions options;
    private readonly LatinHypercube design;
    private readonly FigureTally[] tallies;
    private readonly double[] rows;
    private readonly List<long> unsolvableDraws = [];
    private long unsolvable;

    /// <summary>A study without a draw so far.</summary>
    /// <param name="batch">Works points out.</param>
    /// <param name="options">How many draws, and their seed.</param>
    /// <param name="ranges">Of each figure: between what the hard extremes lie.</param>
    public DrawStudy(PointBatch batch, SpreadOptions options, ImmutableArray<(double From, double To)> ranges)
    {
        (this.batch, this.options) = (batch, options);
        design = new LatinHypercube(options.Seed, batch.ValueCount, options.Draws);
        var capacity = options.Draws * batch.Figures.Length <= MostKept ? (int)options.Draws : 0;
        tallies = [.. batch.Figures.Select((figure, f) => Tally(figure, capacity, ranges[f]))];
        rows = new double[RowCount * batch.Reported.Length];
    }

    /// <summary>How many draws are made.</summary>
    public long Done { get; private set; }

    /// <summary>Makes the draws that are left.</summary>
    public void Run(Action<SpreadProgress> report)
    {
        double[] points = [];
        long cube = -1;
        while (Done < options.Draws)
        {
            if (Done / LatinHypercube.MostInCube != cube)
            {
                cube = Done / LatinHypercube.MostInCube;
                points = Points(cube);
            }

            var first = (int)(Done - (cube * LatinHypercube.MostInCube));
            var count = Math.Min(DrawsInStep, design.SizeOf(cube) - first);
            var k = batch.ValueCount;
            Add(batch.At(points[(first * k)..((first + count) * k)]));
            report(new SpreadProgress("draws", Done, options.Draws));
        }
    }

    /// <summary>The values of the first draws, one draw after another.</summary>
    public double[] FirstPoints(long count)
    {
        var points = new List<double>();
        for (long cube = 0; points.Count < count * batch.ValueCount; cube++)
        {
            points.AddRange(Points(cube));
        }

        return [.. points.Take((int)(count * batch.ValueCount))];
    }

    /// <summary>What the draws tell.</summary>
    public DrawFindings Finish(ImmutableArray<WaveformBand> envelopes) => new(
        Done, unsolvable, [.. unsolvableDraws],
        [.. tallies.Take(batch.Reported.Length).Select(tally => tally.Statistics(Done))],
        [.. rows], [.. FirstPoints(RowCount)], (int)RowCount,
        [.. tallies.Skip(batch.Reported.Length).Select(tally => tally.Statistics(Done).Holding!)], envelopes);

    /// <summary>Writes what was gathered so far.</summary>
    public void Save(BinaryWriter to)
    {
        to.Write(Done);
        to.Write(unsolvable);
        to.Write(unsolvableDraws.Count);
        unsolvableDraws.ForEach(to.Write);
        foreach (var tally in tallies)
        {
            tally.Save(to);
        }

        foreach (var value in rows.AsSpan(0, RowNumbers))
        {
            to.Write(value);
        }
    }

    /// <summary>Reads what <see cref="Save"/> wrote of the same study.</summary>
    public void Load(BinaryReader from)
    {
        (Done, unsolvable) = (from.ReadInt64(), from.ReadInt64());
        var named = from.ReadInt32();
        for (var i = 0; i < named; i++)
        {
            unsolvableDraws.Add(from.ReadInt64());
        }

        foreach (var tally in tallies)
        {
            tally.Load(from);
        }

        for (var i = 0; i < RowNumbers; i++)
        {
            rows[i] = from.ReadDouble();
        }
    }

    private long RowCount => Math.Min(options.Draws, MostRows);

    private int RowNumbers => (int)Math.Min(rows.Length, Done * batch.Reported.Length);

    private static FigureTally Tally(StudyFigure figure, int capacity, (double From, double To) range) =>
        new(capacity, range.From, range.To,
            Judgement.IsJudged(figure) ? value => Judgement.Holds(figure, value) : null);

    private double[] Points(long cube)
    {
        var points = design.Points(cube);
        var values = batch.Varied.Values;
        for (var i = 0; i < points.Length; i++)
        {
            points[i] = ToleranceLaw.At(values[i % values.Length].Tolerance!, points[i]);
        }

        return points;
    }

    private void Add(BatchFigures found)
    {
        var figures = batch.Reported.Length;
        for (var i = 0; i < found.Solved.Length; i++, Done++)
        {
            if (!found.Solved[i])
            {
                unsolvable++;
                if (unsolvableDraws.Count < MostNamed)
                {
                    unsolvableDraws.Add(Done + 1);
                }
            }

            for (var f = 0; f < batch.Figures.Length; f++)
            {
                var place = (Done * figures) + f;
                if (f < figures && place < rows.Length)
                {
                    rows[place] = found.Value(i, f);
                }

                if (found.Solved[i])
                {
                    tallies[f].Add(found.Value(i, f));
                }
            }
        }
    }
}
