using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Tests.Studies.Spreads;

/// <summary>What the search finds against every corner solved one by one, on random circuits.</summary>
public class WorstCornerTests
{
    public static TheoryData<ulong> Seeds => [.. Enumerable.Range(1, 4).Select(i => (ulong)i)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void No_corner_is_worse_than_the_worst_found(ulong seed)
    {
        var text = RandomText(seed);
        var spread = Spreading.Of(text);
        var every = EveryCorner(text);

        Assert.True(spread.Account.AllCorners);
        for (var f = 0; f < spread.Figures.Length; f++)
        {
            var range = spread.Figures[f];
            var values = every.Select(p => p[f]).OfType<double>().ToArray();
            var scale = Scale(every, f);
            Assert.InRange(values.Max() - range.Greatest!.Value, double.NegativeInfinity, scale);
            Assert.InRange(range.Least!.Value - values.Min(), double.NegativeInfinity, scale);
            Assert.True(!range.Greatest.IsCorner || Math.Abs(values.Max() - range.Greatest.Value) <= scale);
            Assert.True(!range.Least.IsCorner || Math.Abs(values.Min() - range.Least.Value) <= scale);
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Single_exchanges_find_the_worst_corner_too(ulong seed)
    {
        // The search that stands in where there are too many corners, on circuits whose corners can be
        // counted.
        var text = RandomText(seed);
        var (varied, _) = Spreading.Varied(text);
        var batch = new PointBatch(
            varied, StudyFigures.Of(varied.Circuit), 1, TestContext.Current.CancellationToken);
        var ranges = new ValueRanges(varied.Values);
        var best = new BestPoints(batch.Figures.Length);
        var alone = batch.At([.. Enumerable.Range(0, ranges.Count)
            .SelectMany(i => new[] { ranges.Lowest(i), ranges.Highest(i) }.SelectMany(end =>
                ranges.Nominal.Select((nominal, j) => i == j ? end : nominal)))]);

        new CornerSearch(batch, ranges, best).Search(alone, randomCorners: 4, _ => { });

        var every = EveryCorner(text);
        for (var f = 0; f < batch.Figures.Length; f++)
        {
            var values = every.Select(p => p[f]).OfType<double>().ToArray();
            var scale = Scale(every, f);
            Assert.Equal(values.Max(), best[f, 1].Value, scale);
            Assert.Equal(values.Min(), best[f, -1].Value, scale);
        }
    }

    // A least value of nothing has the digits of the greatest one beside it.
    private static double Scale(List<ImmutableArray<double?>> every, int figure) =>
        1e-9 * every.Max(p => Math.Max(Math.Abs(p[figure] ?? 0), Math.Abs(p[figure ^ 1] ?? 0)));

    /// <summary>The figures at every corner by the exact engine, no search.</summary>
    private static List<ImmutableArray<double?>> EveryCorner(string text)
    {
        var (varied, _) = Spreading.Varied(text);
        var figures = StudyFigures.Of(varied.Circuit);
        var every = new List<ImmutableArray<double?>>();
        for (var corner = 0; corner < 1 << varied.Values.Length; corner++)
        {
            double[] point = [.. varied.Values.Select((v, i) =>
                (corner & (1 << i)) == 0 ? v.Tolerance!.Lowest : v.Tolerance!.Highest)];
            every.Add(StudySolver.At(varied.At(point).Value!, figures).Value!.Values);
        }

        return every;
    }

    /// <summary>A ladder of random parts behind a switch, six of them with a tolerance.</summary>
    private static string RandomText(ulong seed)
    {
        var generator = new CounterGenerator(seed);
        ulong next = 0;
        string Value(double low, double high, string unit) =>
            (low * Math.Pow(high / low, generator.Uniform(0, next++)))
                .ToString("0.###e0", CultureInfo.InvariantCulture)
            + $" {unit} ±{5 + generator.Below(20, 1, next++)} %";
        return $"""
            source    Feed at s : {Value(5, 500, "V")}
            switch    K1 from s to a : open, closes at 10 µs
            resistor  R1 from a to b : {Value(0.5, 50, "Ω")}
            inductor  L1 from b to c : {Value(20e-6, 2e-3, "H")}
            capacitor C1 from c to ground : {Value(0.2e-6, 20e-6, "F")}
            resistor  R2 from c to d : {Value(1, 200, "Ω")}
            capacitor C2 from d to ground : {Value(0.2e-6, 20e-6, "F")}
            resistor  R3 from d to ground : 1 kΩ
            observe voltage of c
            observe current through L1
            observe voltage of d
            until 5 ms
            """;
    }
}
