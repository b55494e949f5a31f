using CircuitTransient.Numerics;
using CircuitTransient.Numerics.Sparse;

namespace CircuitTransient.Tests.Numerics.Sparse;

public sealed class SparseRefinementTests
{
    // Whole numbers and their products are exact, so the solution is known in every digit.
    [Fact]
    public void Twice_the_digits_of_the_factors_come_out()
    {
        for (var seed = 1; seed <= 20; seed++)
        {
            var draw = new Random(seed);
            var size = draw.Next(2, 60);
            var places = new List<(int Row, int Column)>();
            var values = new List<double>();
            for (var i = 0; i < size; i++)
            {
                Add(i, i, Math.ScaleB(1, draw.Next(0, 20)));
                Add(draw.Next(size), i, draw.Next(-9, 10));
                Add(i, draw.Next(size), draw.Next(-9, 10));
            }

            // thirds have no end in binary
            DoubleDouble[] x = [.. Enumerable.Range(1, size).Select(i => (DoubleDouble)i / 3)];
            var pattern = SparsePattern.Of(size, places.ToArray());
            var (matrix, b) = (new DoubleDouble[pattern.Count], new DoubleDouble[size]);
            for (var k = 0; k < places.Count; k++)
            {
                matrix[pattern.Slots[k]] += values[k];
                b[places[k].Row] += values[k] * x[places[k].Column];
            }

            var lu = new SparseLu<double>(pattern);
            Assert.True(lu.Factorise([.. matrix.Select(v => v.Hi)]));
            var solved = SparseRefinement.Solve(lu, pattern, matrix, b);
            Assert.NotNull(solved);
            for (var i = 0; i < size; i++)
            {
                Assert.InRange(Math.Abs(((solved[i] - x[i]) / x[i]).Hi), 0, 1e-22); // a condition of some 1e8
            }

            void Add(int row, int column, double value)
            {
                places.Add((row, column));
                values.Add(value);
            }
        }
    }

    // 2⁻⁷⁰ is lost to factors in double, so no turn gains a digit.
    [Fact]
    public void A_matrix_singular_but_for_digits_beyond_the_factors_is_not_solved()
    {
        var pattern = SparsePattern.Of(2, [(0, 0), (1, 0), (0, 1), (1, 1)]);
        DoubleDouble[] values =
            [1, 1.0 / 3, 3, DoubleDouble.FromProduct(1.0 / 3, 3) + Math.ScaleB(1, -70)];
        var lu = new SparseLu<double>(pattern);
        var solved = lu.Factorise([.. values.Select(v => v.Hi)])
            ? SparseRefinement.Solve(lu, pattern, values, [1, 2])
            : null;
        Assert.Null(solved);
    }
}
