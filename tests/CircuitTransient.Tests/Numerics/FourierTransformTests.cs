using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class FourierTransformTests
{
    [Fact]
    public void The_transform_is_its_defining_sum()
    {
        Complex[] x = [1, 2.5, -3, new(0, 1), 4, 0, -1, 7];
        var expected = Enumerable.Range(0, 8).Select(k => Enumerable.Range(0, 8).Aggregate(
            Complex.Zero, (sum, n) => sum + (x[n] * Complex.Exp(new(0, -2 * Math.PI * k * n / 8)))));

        var transformed = (Complex[])x.Clone();
        FourierTransform.Transform(transformed);

        Assert.All(
            expected.Zip(transformed), pair => Assert.Equal(0, (pair.First - pair.Second).Magnitude, 1e-13));
    }

    [Fact]
    public void The_correlation_is_its_defining_sum_for_every_shift()
    {
        double[] a = [3, -1, 4, 1, 5];
        double[] b = [2, 7, 1];

        var sums = FourierTransform.Correlate(a, b);

        for (var shift = -2; shift <= 4; shift++)
        {
            var expected = Enumerable.Range(0, 3).Where(n => n + shift >= 0 && n + shift < 5)
                .Sum(n => a[n + shift] * b[n]);
            Assert.Equal(expected, sums[shift + 2], 1e-12);
        }
    }

    [Fact]
    public void A_length_that_is_no_power_of_two_is_refused() =>
        Assert.Throws<ArgumentException>(() => FourierTransform.Transform(new Complex[6]));
}
