using CircuitTransient.Numerics.Sparse;
using MathNet.Numerics.LinearAlgebra;
using Complex = System.Numerics.Complex;

namespace CircuitTransient.Tests.Numerics.Sparse;

/// <summary>Sparse factors against MathNet's dense ones (C), and what is known of their patterns.</summary>
public sealed class SparseLuTests
{
    private const double Rounding = 1.2e-16;

    [Fact]
    public void Solutions_are_those_of_dense_elimination() =>
        Check.EachDraw(200, draw =>
        {
            var a = RandomMatrix.Draw(draw, draw.Next(1, 60));
            var dense = a.Dense();
            var b = Enumerable.Range(0, a.Size).Select(_ => draw.NextDouble() - 0.5).ToArray();
            var expected = dense.Solve(Vector<double>.Build.DenseOfArray(b));
            var allowed = 100 * a.Size * Rounding * dense.ConditionNumber();
            Assert.InRange(Distance(expected.AsArray(), Solve(a, b)), 0, allowed);
        });

    [Fact]
    public void Complex_solutions_are_those_of_dense_elimination() =>
        Check.EachDraw(100, draw =>
        {
            var (a, other) = (RandomMatrix.Draw(draw, draw.Next(1, 40)), draw.NextDouble());
            var values = a.Values.Select((v, k) => new Complex(v, Math.Sin(other + k))).ToArray();
            var dense = Matrix<Complex>.Build.Dense(a.Size, a.Size);
            for (var k = 0; k < values.Length; k++)
            {
                dense[a.Places[k].Row, a.Places[k].Column] += values[k];
            }

            var b = Enumerable.Range(0, a.Size).Select(i => new Complex(Math.Cos(i), other)).ToArray();
            var expected = dense.Solve(Vector<Complex>.Build.DenseOfArray(b));
            var lu = new SparseLu<Complex>(a.Pattern);
            Assert.True(lu.Factorise(Gathered(a.Pattern, values)));
            lu.Solve(b);
            var allowed = 100 * a.Size * Rounding * dense.ConditionNumber().Real;
            Assert.InRange((Vector<Complex>.Build.DenseOfArray(b) - expected).L2Norm() / expected.L2Norm(), 0,
                allowed);
        });

    [Fact]
    public void Rows_and_columns_of_any_size_change_a_solution_by_rounding_alone() =>
        Check.EachDraw(100, draw =>
        {
            var a = RandomMatrix.Draw(draw, draw.Next(2, 50));
            var b = Enumerable.Range(0, a.Size).Select(_ => draw.NextDouble() - 0.5).ToArray();
            var rows = b.Select(_ => Math.Pow(10, (draw.NextDouble() * 24) - 12)).ToArray();
            var columns = b.Select(_ => Math.Pow(10, (draw.NextDouble() * 24) - 12)).ToArray();
            var scaled = a with
            {
                Values = [.. a.Values.Zip(a.Places, (v, p) => v * rows[p.Row] * columns[p.Column])],
            };
            var x = Solve(scaled, [.. b.Select((v, i) => v * rows[i])]);
            var expected = Solve(a, b);
            var allowed = 1000 * a.Size * Rounding * a.Dense().ConditionNumber();
            Assert.InRange(Distance(expected, [.. x.Select((v, i) => v * columns[i])]), 0, allowed);
        });

    [Fact]
    public void Other_values_on_the_pattern_follow_the_pivots_or_get_new_ones() =>
        Check.EachDraw(100, draw =>
        {
            var a = RandomMatrix.Draw(draw, draw.Next(2, 40));
            var lu = new SparseLu<double>(a.Pattern);
            Assert.True(lu.Factorise(Gathered(a.Pattern, a.Values)));
            double[] values = [.. a.Values.Select(v => v * Math.Pow(10, (draw.NextDouble() * 8) - 4))];
            var other = a with { Values = values };
            var b = Enumerable.Range(0, a.Size).Select(i => Math.Sin(i + 1)).ToArray();
            var x = (double[])b.Clone();
            Assert.True(lu.Factorise(Gathered(a.Pattern, values)));
            lu.Solve(x);
            var expected = other.Dense().Solve(Vector<double>.Build.DenseOfArray(b)).AsArray();
            var allowed = 1e5 * a.Size * Rounding * other.Dense().ConditionNumber();
            Assert.InRange(Distance(expected, x), 0, allowed);
        });

    [Fact]
    public void Columns_that_share_too_few_rows_are_singular_whatever_their_values() =>
        Check.EachDraw(50, draw =>
        {
            var a = RandomMatrix.Draw(draw, draw.Next(6, 30));
            var shared = draw.Next(1, 4); // rows for one column more
            var places = a.Places.Select(p => p.Column <= shared ? (p.Row % shared, p.Column) : p).ToArray();
            var pattern = SparsePattern.Of(a.Size, places);
            Assert.False(new SparseLu<double>(pattern).Factorise(Gathered(pattern, a.Values)));
        });

    [Fact]
    public void Equal_rows_are_singular()
    {
        var pattern = SparsePattern.Of(3, [(0, 0), (0, 1), (1, 0), (1, 1), (2, 2)]);
        var lu = new SparseLu<double>(pattern);
        Assert.False(lu.Factorise([1, 1, 2, 2, 5]));
        Assert.True(lu.Factorise([1, 1, 2, 3, 5]));
    }

    [Fact]
    public void A_matrix_that_is_a_tree_gets_no_fill() =>
        Check.EachDraw(20, draw =>
        {
            var size = draw.Next(2, 300);
            var places = new List<(int Row, int Column)> { (0, 0) };
            for (var i = 1; i < size; i++)
            {
                var above = draw.Next(0, i);
                places.AddRange([(i, i), (i, above), (above, i)]);
            }

            var pattern = SparsePattern.Of(size, places.ToArray());
            var values = Gathered(pattern, [.. places.Select(p => p.Row == p.Column ? 1000.0 : -1)]);
            var lu = new SparseLu<double>(pattern);
            Assert.True(lu.Factorise(values));
            Assert.Equal(places.Count, lu.FactorCount);
        });

    [Fact]
    public void A_square_grid_fills_no_more_than_good_orders_do()
    {
        const int side = 40;
        var places = new List<(int Row, int Column)>();
        for (var i = 0; i < side * side; i++)
        {
            places.Add((i, i));
            if (i % side > 0)
            {
                places.AddRange([(i, i - 1), (i - 1, i)]);
            }

            if (i >= side)
            {
                places.AddRange([(i, i - side), (i - side, i)]);
            }
        }

        var pattern = SparsePattern.Of(side * side, places.ToArray());
        var lu = new SparseLu<double>(pattern);
        Assert.True(lu.Factorise(Gathered(pattern, [.. places.Select(p => p.Row == p.Column ? 4.1 : -1)])));

        // Nested dissection: 31/4 n log2 n in one factor (A. George, SIAM J. Numer. Anal. 10, 1973, from
        // memory); the order by rows fills 2 side³.
        Assert.InRange(lu.FactorCount, pattern.Count, 2 * 7.75 * side * side * Math.Log2(side));
    }

    private static double[] Solve(RandomMatrix a, double[] b)
    {
        var lu = new SparseLu<double>(a.Pattern);
        Assert.True(lu.Factorise(Gathered(a.Pattern, a.Values)));
        double[] x = [.. b];
        lu.Solve(x);
        return x;
    }

    private static T[] Gathered<T>(SparsePattern pattern, T[] values)
        where T : System.Numerics.INumberBase<T>
    {
        var gathered = new T[pattern.Count];
        for (var k = 0; k < values.Length; k++)
        {
            gathered[pattern.Slots[k]] += values[k];
        }

        return gathered;
    }

    private static double Distance(double[] expected, double[] actual) =>
        Math.Sqrt(expected.Zip(actual, (a, b) => (a - b) * (a - b)).Sum() / expected.Sum(a => a * a));

    private sealed record RandomMatrix(int Size, (int Row, int Column)[] Places, double[] Values)
    {
        public SparsePattern Pattern { get; } = SparsePattern.Of(Size, Places);

        // A permutation hidden in it keeps it regular; some places occur twice.
        public static RandomMatrix Draw(Random draw, int size)
        {
            var permutation = Enumerable.Range(0, size).ToArray();
            draw.Shuffle(permutation);
            var places = permutation.Select((row, column) => (row, column)).ToList();
            for (var k = 0; k < 3 * size; k++)
            {
                places.Add((draw.Next(size), draw.Next(size)));
            }

            return new RandomMatrix(
                size, [.. places],
                [.. places.Select((_, k) => k < size ? 1 + draw.NextDouble() : (2 * draw.NextDouble()) - 1)]);
        }

        public Matrix<double> Dense()
        {
            var dense = Matrix<double>.Build.Dense(Size, Size);
            for (var k = 0; k < Places.Length; k++)
            {
                dense[Places[k].Row, Places[k].Column] += Values[k];
            }

            return dense;
        }
    }

    private static class Check
    {
        public static void EachDraw(int count, Action<Random> test)
        {
            for (var seed = 1; seed <= count; seed++)
            {
                test(new Random(seed));
            }
        }
    }
}
