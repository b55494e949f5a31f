using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

public sealed class LimitTheoremsTests
{
    [Fact]
    public void Initial_values_come_out_beside_an_impulse()
    {
        // Two capacitors joined by the closing contact, each with a load: 1200/147 V just after, and the
        // currents that go with it.
        var built = new HandBuilt();
        var first = built.Capacitor(1, 0, 100e-6, 12);
        built.Resistor(1, 0, 30);
        built.Capacitor(2, 0, 47e-6);
        var load = built.Resistor(2, 0, 50);
        var contact = built.Switch(1, 2);
        var solution = built.Solve(5e-3, [], (0.1e-3, [contact]));
        var before = 12 * Math.Exp(-0.1e-3 / (30 * 100e-6));
        var after = before * 100 / 147;
        var limits = LimitTheorems.InitialAt(solution, 0.1e-3);
        Assert.NotNull(limits);
        Near(after, limits, new VoltageBetween(2, 0), 12);
        Near(after / 50, limits, new CurrentThrough(load), 1);
        Near(-(after / 30) - (after / 50) + (47.0 / 147 * ((after / 30) + (after / 50))), limits,
            new CurrentThrough(first), 1);
    }

    [Fact]
    public void Final_values_come_out_whatever_the_spread_of_time_constants()
    {
        // 1e-18 s against 1 s, with a divider to settle at 10 · 1e6/(1e6 + 1e6 + 1e-6).
        var built = new HandBuilt();
        built.Voltage(3, 0, Step(10));
        built.Resistor(3, 1, 1e6);
        var capacitor = built.Capacitor(1, 0, 1e-6, 100);
        built.Resistor(1, 2, 1e-6);
        built.Resistor(2, 0, 1e6);
        built.Capacitor(2, 0, 1e-12);
        var limits = LimitTheorems.Final(built.Solve(1));
        Assert.NotNull(limits);
        Near(5, limits, new VoltageBetween(1, 0), 100);
        Near(0, limits, new CurrentThrough(capacitor), 1e-4);
    }

    [Fact]
    public void A_floating_charge_stays_in_the_final_value()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(9));
        built.Resistor(1, 3, 10);
        built.Capacitor(3, 2, 2e-6, 1);
        built.Capacitor(2, 0, 1e-6, 4);
        var limits = LimitTheorems.Final(built.Solve(1e-6));
        Assert.NotNull(limits);
        Near(20 / 3.0, limits, new VoltageBetween(2, 0), 10);
    }

    [Fact]
    public void Where_no_span_begins_there_is_no_initial_value()
    {
        var built = new HandBuilt();
        built.Resistor(1, 0, 1);
        built.Capacitor(1, 0, 1, 1);
        Assert.Null(LimitTheorems.InitialAt(built.Solve(1), 0.5));
    }

    private static void Near(double expected, LimitValues limits, Measurand measurand, double scale)
    {
        var (value, error) = limits.ValueOf(measurand)!.Value;
        Assert.InRange(error, 0, 1e-10 * scale);
        Assert.InRange(value, expected - (1e-11 * scale), expected + (1e-11 * scale));
    }
}
