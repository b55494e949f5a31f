using CircuitTransient.Measurements.Checks;

namespace CircuitTransient.Tests.Measurements.Checks;

/// <summary>Comparisons with a route that estimates its own error.</summary>
public class IndependentValuesTests
{
    [Theory]
    [InlineData(1, "1 value left out")]
    [InlineData(2, "2 values left out")]
    public void Values_of_a_weak_estimate_are_left_out_and_counted(int count, string words)
    {
        var values = IndependentValues.None;
        for (var i = 0; i < count; i++)
        {
            values = values.With(difference: 0, estimate: 2e-6, size: 1);
        }

        Assert.Equal((0, words), (values.Compared, values.LeftOut));
    }
}
