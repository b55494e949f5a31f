using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

public sealed class ContourInversionTests
{
    [Theory]
    [InlineData(20.0)]
    [InlineData(200.0)]
    [InlineData(2000.0)]
    public void A_series_circuit_is_sampled_as_its_closed_form_says(double ohms)
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10));
        built.Resistor(1, 2, ohms);
        var coil = built.Inductor(2, 3, 1e-3);
        var capacitor = built.Capacitor(3, 0, 100e-9);
        var (samples, notJudged) = ContourInversion.Samples(built.Solve(100e-6));
        Assert.Empty(notJudged);
        var sample = Assert.Single(samples);
        var expected = SeriesCurrent(10, ohms, 1e-3, 100e-9, sample.Time);
        Near(expected, sample, new CurrentThrough(coil), 0.1);
        Near(expected, sample, new CurrentThrough(capacitor), 0.1);
    }

    [Fact]
    public void Each_set_of_positions_gets_a_sample_that_agrees_with_the_second_solve()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Sine(325, 314, 0.3), Step(20, 3e-3));
        built.Resistor(1, 2, 20e-6); // beside 10 MΩ: twelve decades in one node
        built.Resistor(2, 0, 10e6);
        var coil = built.Inductor(2, 3, 1e-3);
        var contact = built.Switch(3, 4);
        built.Capacitor(4, 5, 47e-6, 12);
        built.Resistor(5, 0, 3);
        built.Current(4, 0, Step(0.5));
        var solution = built.Solve(20e-3, [], (5e-3, [contact]));
        var (samples, notJudged) = ContourInversion.Samples(solution);
        Assert.Empty(notJudged);
        Assert.Equal(2, samples.Length);
        foreach (var sample in samples)
        {
            Near(solution, sample, new CurrentThrough(coil), 100);
            Near(solution, sample, new VoltageBetween(4, 5), 325);
            Near(solution, sample, new VoltageAcross(contact), 325);
        }
    }

    [Fact]
    public void A_ringing_circuit_is_sampled_early_enough_to_be_believed()
    {
        var built = new HandBuilt();
        built.Inductor(1, 0, 1e-6);
        built.Capacitor(1, 2, 1e-9, 5);
        built.Resistor(2, 0, 1e-3); // quality 31 623
        var solution = built.Solve(1e-3); // 5000 periods
        var sample = Assert.Single(ContourInversion.Samples(solution).Samples);
        Assert.True(sample.Time < 1e-6);
        Near(solution, sample, new VoltageBetween(1, 0), 5);
    }

    // Drawn at random: the contacts leave rows that hold rounding alone.
    [Fact]
    public void Parts_that_contacts_short_do_not_drive_the_sample_to_an_earlier_instant()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10), Sine(3, 1e4));
        for (var node = 1; node <= 5; node++)
        {
            built.Resistor(node, node - 1, 100 * node);
        }

        built.Capacitor(3, 5, 2.05e-11, 2);
        built.Capacitor(5, 0, 9.26e-10);
        built.Resistor(5, 2, 1e-6);
        built.Capacitor(3, 1, 2.55e-7);
        built.Resistor(4, 1, 1);
        built.Capacitor(4, 2, 7.09e-12);
        built.Resistor(5, 0, 1.01);
        int[] closed = [built.Switch(4, 3), built.Switch(5, 3), built.Switch(3, 1)];
        var sample = Assert.Single(ContourInversion.Samples(built.Solve(1e-3, closed)).Samples);
        Assert.Equal(0.4e-3, sample.Time, 1e-15);
    }

    [Fact]
    public void A_spent_budget_is_said()
    {
        var built = new HandBuilt();
        built.Resistor(1, 0, 1);
        built.Capacitor(1, 0, 1, 1);
        var (samples, notJudged) = ContourInversion.Samples(built.Solve(1), budget: 0);
        Assert.Empty(samples);
        Assert.Equal("the budget ends before the span from 0 s", Assert.Single(notJudged).Reason);
    }

    private static double SeriesCurrent(double volts, double ohms, double henries, double farads, double t)
    {
        var alpha = ohms / (2 * henries);
        var square = (alpha * alpha) - (1 / (henries * farads));
        var root = Math.Sqrt(Math.Abs(square));
        var shape = Math.Abs(square) < 1e-6 * alpha * alpha ? t : square > 0 ? Math.Sinh(root * t) / root
            : Math.Sin(root * t) / root;
        return volts / henries * Math.Exp(-alpha * t) * shape;
    }

    private static void Near(
        AllAtOnceSolution solution, ContourSample sample, Measurand measurand, double scale) =>
        Near(solution.ValueAt(measurand, sample.Time)!.Value, sample, measurand, scale);

    // Within its own estimate, and that estimate far below the 1e-6 at which a sample judges nothing.
    private static void Near(double expected, ContourSample sample, Measurand measurand, double scale)
    {
        var (value, error) = sample.ValueOf(measurand)!.Value;
        Assert.InRange(error, 0, 1e-7 * scale);
        Assert.InRange(value, expected - error - (1e-9 * scale), expected + error + (1e-9 * scale));
    }
}
