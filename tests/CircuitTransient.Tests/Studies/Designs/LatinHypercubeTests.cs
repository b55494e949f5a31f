using CircuitTransient.Studies.Designs;

namespace CircuitTransient.Tests.Studies.Designs;

public class LatinHypercubeTests
{
    [Theory]
    [InlineData(2000, 0)]
    [InlineData(12_345, 0)]
    [InlineData(12_345, 1)]
    [InlineData(12_345, 2)]
    public void Every_slice_of_every_coordinate_holds_one_point(long count, long cube)
    {
        var design = new LatinHypercube(7, 4, count);
        var size = design.SizeOf(cube);
        var points = design.Points(cube);

        for (var c = 0; c < 4; c++)
        {
            var slices = Enumerable.Range(0, size).Select(i => (int)(points[(i * 4) + c] * size)).Order();
            Assert.Equal(Enumerable.Range(0, size), slices);
        }
    }

    [Fact]
    public void A_long_series_is_made_of_whole_cubes_and_a_rest()
    {
        var design = new LatinHypercube(7, 2, 12_345);

        Assert.Equal([5000, 5000, 2345], Enumerable.Range(0, 3).Select(c => design.SizeOf(c)));
    }

    [Fact]
    public void A_seed_gives_one_series_and_another_seed_another()
    {
        var points = new LatinHypercube(7, 3, 9000).Points(1);

        Assert.Equal(points, new LatinHypercube(7, 3, 9000).Points(1));
        Assert.NotEqual(points, new LatinHypercube(8, 3, 9000).Points(1));
        Assert.NotEqual(points[..300], new LatinHypercube(7, 3, 9000).Points(0)[..300]);
    }

    [Fact]
    public void The_mean_of_a_sum_is_far_better_than_by_independent_points()
    {
        // McKay, Beckman and Conover 1979 (from memory): of a sum of functions of single coordinates the
        // slices leave only what varies within them, 1/n each instead of 1/√n.
        const int count = 1000;
        var points = new LatinHypercube(3, 5, count).Points(0);
        var mean = Enumerable.Range(0, count).Average(i => points.AsSpan(i * 5, 5).ToArray().Sum(Math.Exp));

        // Independent points would miss by some 5·0.49/√5000 = 0.035.
        Assert.Equal(5 * (Math.E - 1), mean, 1e-3);
    }

    [Fact]
    public void Coordinates_are_not_tied_to_each_other()
    {
        const int count = 2000;
        var points = new LatinHypercube(3, 2, count).Points(0);
        var tie = Enumerable.Range(0, count)
            .Average(i => 12 * (points[2 * i] - 0.5) * (points[(2 * i) + 1] - 0.5));

        Assert.InRange(tie, -0.09, 0.09); // four times 1/√n
    }
}
