using CircuitTransient.Circuits;
using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class WorstObservationTests
{
    [Fact]
    public void The_requirement_exceeded_most_comes_before_a_rating_nearly_used_up()
    {
        var worst = WorstObservation.Find(SampleResults.Inrush())!;
        Assert.Equal("current through Ls", worst.Observation.Name);
        Assert.True(worst.AtMax);
        Assert.Equal("the requirement exceeded most", worst.Why);
    }

    [Fact]
    public void The_side_of_the_worst_value_is_the_side_that_matters()
    {
        var result = SampleResults.Inrush();
        var broken = result.Requirements[1] with { Worst = new(result.Observations[1].Min.Value, 1.8047) };
        var worst = WorstObservation.Find(result with { Requirements = [result.Requirements[0], broken] })!;
        Assert.False(worst.AtMax);
        Assert.Equal(result.Observations[1].Min, worst.Extreme);
    }

    [Fact]
    public void A_rating_is_found_under_the_name_of_the_node()
    {
        var result = SampleResults.Inrush();
        result = result with { Requirements = [], Circuit = result.Circuit with { Requirements = [] } };
        var worst = WorstObservation.Find(result)!;
        Assert.Equal("voltage of bus", worst.Observation.Name); // Cbus stands between bus and the reference
        Assert.Equal("nearest to its rating", worst.Why);
    }

    [Fact]
    public void Without_demands_it_is_the_first() =>
        Assert.Equal("the first observed", WorstObservation.Find(SampleResults.Bare())!.Why);

    [Fact]
    public void A_limit_on_the_reversed_voltage_is_drawn_with_its_sign_turned()
    {
        var result = SampleResults.Inrush();
        var reversed = result.Circuit.Requirements[0] with
        {
            Quantity = new VoltageBetween(0, 3),
            Bound = new Limits(-1100, 50),
        };
        var circuit = result.Circuit with { Requirements = [reversed] };
        var limits = PlotLimit.On(result with { Circuit = circuit }, result.Observations[0]);
        Assert.Equal([1100.0, -50.0], limits.Select(limit => limit.Value));
        Assert.Equal(["at most 1.100 kV", "at least -50.00 V"], limits.Select(limit => limit.Words));
    }

    [Fact]
    public void A_limit_holds_from_the_event_it_counts_from()
    {
        var result = SampleResults.Inrush();
        var contactor = new Switch(false, null, null, [])
        {
            Name = "Kmain",
            From = 1,
            To = 2,
            Span = new(0, 0),
        };
        var late = result.Circuit.Requirements[0] with
        {
            Window = new(new Instant(0.5, new EventReference(3, 0)), null),
        };
        var circuit = result.Circuit with
        {
            Requirements = [late],
            Parts = result.Circuit.Parts.Add(contactor),
        };
        var limit = Assert.Single(PlotLimit.On(result with { Circuit = circuit }, result.Observations[0]));
        Assert.Equal(2.3, limit.From, 12);
        Assert.Equal(14, limit.To);
    }
}
