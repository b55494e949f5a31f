using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Numerics;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

/// <summary>The second solve on the circuits where equations degenerate.</summary>
public sealed class HardCircuitTests
{
    private const double Tight = 1e-13; // relative to the scale

    [Fact]
    public void An_ideal_transformer_shows_the_load_by_the_square_of_its_ratio()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(100));
        var coil = built.Inductor(1, 2, 2e-3);
        var transformer = built.Transformer(2, 0, 3, 4, 10); // the secondary floats
        var load = built.Resistor(3, 4, 0.5);
        var solution = built.Solve(1e-3);
        var expected = 100 / 50.0 * (1 - Math.Exp(-50 / 2e-3 * 1e-5));
        Near(expected, solution.ValueAt(new CurrentThrough(coil), 1e-5), 2);
        Near(expected, solution.ValueAt(new CurrentThrough(transformer), 1e-5), 2);
        Near(10 * expected, solution.ValueAt(new CurrentThrough(load), 1e-5), 20);
        Near(50 * expected, solution.ValueAt(new VoltageBetween(2, 0), 1e-5), 100);
        Assert.Equal(double.NaN, solution.ValueAt(new VoltageBetween(3, 0), 1e-5));
    }

    [Fact]
    public void Coils_coupled_without_leakage_share_one_flux()
    {
        // k = 1, turns 2 to 1, source behind 3 Ω, 5 Ω on the secondary: at 0+ the primary sees 4·5 Ω, and
        // the flux grows with τ = L1 (1/3 + 1/20).
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(46));
        built.Resistor(1, 2, 3);
        var primary = built.Inductor(2, 0, 4e-3);
        var secondary = built.Inductor(3, 0, 1e-3);
        var load = built.Resistor(3, 0, 5);
        built.Couple(primary, secondary, 1);
        var solution = built.Solve(0.01);
        var tau = 4e-3 * ((1 / 3.0) + (1 / 20.0));
        foreach (var t in new[] { 0, 1e-4, 2e-3, 0.01 })
        {
            var decay = Math.Exp(-t / tau);
            Near(40 * decay, solution.ValueAt(new VoltageBetween(2, 0), t), 46);
            Near(20 * decay, solution.ValueAt(new VoltageAcross(load), t), 46);
            Near((46 - (40 * decay)) / 3, solution.ValueAt(new CurrentThrough(primary), t), 16);
        }
    }

    [Fact]
    public void Dependent_sources_of_every_kind_follow_their_controls()
    {
        var built = new HandBuilt();
        var source = built.Voltage(1, 0, Step(2));
        var resistor = built.Resistor(1, 2, 1e3);
        var capacitor = built.Capacitor(2, 0, 1e-6);
        built.Dependent(3, 0, true, 5, new VoltageBetween(2, 0));
        built.Resistor(3, 0, 1e3);
        built.Dependent(4, 0, true, 200, new CurrentThrough(resistor));
        built.Dependent(5, 0, false, -3, new CurrentThrough(capacitor)); // pushes into node 5
        var shunt = built.Resistor(5, 0, 10);
        var mirror = built.Dependent(6, 0, false, 1e-3, new VoltageAcross(capacitor));
        built.Resistor(6, 0, 1e3);
        var delivered = built.Dependent(7, 0, true, 1, new CurrentThrough(source, Delivered: true));
        built.Resistor(7, 0, 1);
        var solution = built.Solve(1e-2);
        const double T = 0.7e-3;
        var current = 2e-3 * Math.Exp(-T / 1e-3);
        var voltage = 2 - (1e3 * current);
        Near(5 * voltage, solution.ValueAt(new VoltageBetween(3, 0), T), 10);
        Near(200 * current, solution.ValueAt(new VoltageBetween(4, 0), T), 1);
        Near(3 * current, solution.ValueAt(new CurrentThrough(shunt), T), 1e-2);
        Near(1e-3 * voltage, solution.ValueAt(new CurrentThrough(mirror), T), 1e-2);
        Near(-voltage, solution.ValueAt(new VoltageBetween(6, 0), T), 2);
        Near(current, solution.ValueAt(new VoltageAcross(delivered), T), 1e-2);
        Near(-current / 1e-3, solution.ValueAt(new RateOfChange(new CurrentThrough(resistor)), T), 2);
    }

    [Fact]
    public void Contacts_in_parallel_leave_only_their_own_currents_open()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10));
        var first = built.Switch(1, 2);
        var second = built.Switch(1, 2);
        var alone = built.Switch(2, 3);
        var resistor = built.Resistor(3, 0, 5);
        var solution = built.Solve(1, [first, second, alone]);
        Assert.Equal(double.NaN, solution.ValueAt(new CurrentThrough(first), 0.5));
        Assert.Equal(double.NaN, solution.ValueAt(new CurrentThrough(second), 0.5));
        Near(2, solution.ValueAt(new CurrentThrough(alone), 0.5), 2);
        Near(2, solution.ValueAt(new CurrentThrough(resistor), 0.5), 2);
    }

    [Fact]
    public void A_node_between_open_contacts_has_no_voltage_and_harms_no_other()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10));
        var first = built.Switch(1, 2);
        var second = built.Switch(2, 3);
        built.Resistor(3, 0, 5);
        built.Capacitor(3, 0, 1e-3, 4);
        var solution = built.Solve(1e-2);
        Assert.Equal(double.NaN, solution.ValueAt(new VoltageBetween(2, 0), 1e-3));
        Assert.Equal(double.NaN, solution.ValueAt(new VoltageAcross(second), 1e-3));
        Near(0, solution.ValueAt(new CurrentThrough(first), 1e-3), 1);
        Near(4 * Math.Exp(-1e-3 / 5e-3), solution.ValueAt(new VoltageBetween(3, 0), 1e-3), 4);
    }

    [Fact]
    public void A_floating_group_of_capacitors_holds_its_charge_for_ever()
    {
        // Node 2 between two capacitors keeps C1 v1 − C2 v2; the source divides over them.
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(9), Step(3, 5));
        built.Resistor(1, 3, 1e-3);
        built.Capacitor(3, 2, 2e-6, 1);
        built.Capacitor(2, 0, 1e-6, 4);
        var solution = built.Solve(1e6);
        // Charge on node 2: −2 µC + 4 µC; v2 = (2·V + 2)/3.
        Near(20 / 3.0, solution.ValueAt(new VoltageBetween(2, 0), 4), 10);
        Near(26 / 3.0, solution.ValueAt(new VoltageBetween(2, 0), 1e6), 10);
    }

    [Fact]
    public void An_oscillation_of_25_MHz_keeps_its_phase_for_a_second()
    {
        var built = new HandBuilt();
        built.Inductor(1, 0, 40e-9);
        built.Capacitor(1, 0, 1e-9, 5);
        var solution = built.Solve(1);
        var omega = 1 / DoubleDouble.Sqrt(DoubleDouble.FromProduct(40e-9, 1e-9));
        foreach (var t in new[] { 0.3, 1 })
        {
            var cos = (double)DoubleDouble.SinCos(omega * t).Cos;
            Near(5 * cos, solution.ValueAt(new VoltageBetween(1, 0), t), 5);
        }
    }

    [Fact]
    public void A_train_of_pulses_settles_to_its_periodic_state()
    {
        // Period T, width W, RC = 1 ms: from rest, after n periods v = V (e^(W/τ) − 1)/(e^(T/τ) − 1) (1 −
        // e^(−nT/τ)).
        const double T = 0.3e-3, W = 0.1e-3, Tau = 1e-3;
        var pieces = Enumerable.Range(0, 1000)
            .SelectMany(k => new[] { Step(5, k * T), Step(-5, (k * T) + W) });
        var built = new HandBuilt();
        built.Voltage(1, 0, [.. pieces]);
        built.Resistor(1, 2, 1e3);
        built.Capacitor(2, 0, 1e-6);
        var solution = built.Solve(1000 * T);
        foreach (var n in new[] { 1, 10, 1000 })
        {
            var expected = 5 * double.ExpM1(W / Tau) / double.ExpM1(T / Tau) * (1 - Math.Exp(-n * T / Tau));
            Near(expected, solution.ValueAt(new VoltageBetween(2, 0), n * T, before: true), 5);
        }
    }

    [Fact]
    public void Ramps_decays_and_sloped_sines_enter_exactly()
    {
        // A pure integrator: 1 F fed by a current; the integral of each piece is written out.
        var built = new HandBuilt();
        built.Current(0, 1, new WavePiece(0.5, 2.5, 1, 3, 0, 0, 0, "ramp"));
        built.Current(0, 1, new WavePiece(0, double.PositiveInfinity, 2, 0, 4, 0, 0, "decay"));
        built.Current(0, 1, new WavePiece(0, double.PositiveInfinity, 0, 1, 0.3, 7, 0, "swelling"));
        built.Capacitor(1, 0, 1);
        var solution = built.Solve(3);
        var p = new System.Numerics.Complex(-0.3, 7);
        var swelling = ((((3 * p) - 1) * System.Numerics.Complex.Exp(3 * p)) + 1) / (p * p);
        var expected = 2 + (3 * 2.0) + (0.5 * (1 - Math.Exp(-12))) + swelling.Real;
        Near(expected, solution.ValueAt(new VoltageBetween(1, 0), 3), 10);
    }

    [Fact]
    public void A_negative_resistance_grows()
    {
        var built = new HandBuilt();
        built.Resistor(1, 0, -2);
        built.Capacitor(1, 0, 0.5, 1e-3);
        Near(1e-3 * Math.Exp(20), built.Solve(20).ValueAt(new VoltageBetween(1, 0), 20), 1e-3 * Math.Exp(20));
        var endless = built.Solve(1000);
        Assert.NotNull(endless.Rest);
        Assert.Null(endless.ValueAt(new VoltageBetween(1, 0), 900));
    }

    [Fact]
    public void What_has_no_unique_solution_is_not_judged()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(1));
        built.Voltage(1, 0, Step(2));
        var solution = built.Solve(1);
        Assert.Equal("no unique solution from 0 s on", solution.Rest?.Reason);
        Assert.Null(solution.ValueAt(new VoltageBetween(1, 0), 0.5));
    }

    [Fact]
    public void A_spent_budget_leaves_the_rest_unjudged()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, [.. Enumerable.Range(0, 100).Select(k => Step(1, k))]);
        built.Resistor(1, 2, 1);
        built.Capacitor(2, 0, 1);
        var schedule = new SwitchingSchedule([new SwitchedInterval(0, built.Positions([]))], 100);
        var solution = AllAtOnceSolution.Solve(built.Circuit(), schedule, budget: 10_000);
        Assert.InRange(solution.Until, 1, 99);
        Assert.Equal($"the budget of the second solve ends at {solution.Until:R} s", solution.Rest?.Reason);
        Assert.NotNull(solution.ValueAt(new VoltageBetween(2, 0), solution.Until));
        Assert.Null(solution.ValueAt(new VoltageBetween(2, 0), solution.Until + 0.1));
    }

    private static void Near(double expected, double? actual, double scale)
    {
        Assert.NotNull(actual);
        Assert.InRange(actual.Value, expected - (Tight * scale), expected + (Tight * scale));
    }
}
