using CircuitTransient.Circuits;
using CircuitTransient.Studies.Designs;

namespace CircuitTransient.Tests.Studies.Designs;

public class ToleranceLawTests
{
    private static readonly Tolerance Even = new(4, 10, IsNormal: false);
    private static readonly Tolerance Normal = new(4, 10, IsNormal: true);

    [Fact]
    public void An_even_law_has_straight_quantiles()
    {
        Assert.Equal(4.6, ToleranceLaw.At(Even, 0.1), 1e-14);
        Assert.Equal(3, ToleranceLaw.Variance(Even), 1e-14); // 6²/12
    }

    [Fact]
    public void A_normal_law_is_cut_at_three_deviations()
    {
        Assert.Equal(7, ToleranceLaw.At(Normal, 0.5), 1e-12);
        Assert.Equal(4, ToleranceLaw.At(Normal, 1e-17), 1e-9);
        Assert.Equal(10, ToleranceLaw.At(Normal, 1 - 1e-16), 1e-9);

        // 68.2689 % of a normal law lie within one deviation (any table); cut, it is 68.2689/99.7300 of all.
        var within = 0.682689492 / 0.997300204;
        Assert.Equal(8, ToleranceLaw.At(Normal, 0.5 + (within / 2)), 1e-8);
    }

    [Fact]
    public void Its_variance_is_what_the_cut_leaves() =>
        // 1 − 6 φ(3)/(2 Φ(3) − 1) of a deviation of 1, in 16 digits (mpmath).
        Assert.Equal(0.9733369246625415, ToleranceLaw.Variance(Normal), 1e-14);

    [Fact]
    public void Its_variance_is_that_of_its_own_quantiles()
    {
        const int count = 20_000;
        var values = Enumerable.Range(0, count)
            .Select(i => ToleranceLaw.At(Normal, (i + 0.5) / count)).ToArray();
        var mean = values.Average();

        Assert.Equal(ToleranceLaw.Variance(Normal), values.Average(v => (v - mean) * (v - mean)), 1e-5);
    }
}
