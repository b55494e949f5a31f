using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

public sealed class AllAtOnceSolutionTests
{
    private const double Tight = 1e-13; // relative to the scale: the values come out of double-doubles

    // Series R, L, C on a step: i = V/L · (e^(p1 t) − e^(p2 t))/(p1 − p2), written here for each kind of
    // damping.
    [Theory]
    [InlineData(20.0)]
    [InlineData(200.0)] // 2√(L/C) exactly, both poles at −1e5
    [InlineData(200.0000002)]
    [InlineData(2000.0)]
    public void A_series_circuit_follows_its_closed_form(double ohms)
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10));
        built.Resistor(1, 2, ohms);
        var coil = built.Inductor(2, 3, 1e-3);
        built.Capacitor(3, 0, 100e-9);
        var solution = built.Solve(100e-6);
        foreach (var t in new[] { 0, 1e-6, 5e-6, 10e-6, 50e-6, 100e-6 })
        {
            var expected = SeriesCurrent(10, ohms, 1e-3, 100e-9, t);
            Near(expected, solution.ValueAt(new CurrentThrough(coil), t), 0.1);
        }
    }

    [Fact]
    public void A_double_pole_gives_the_printed_figures_of_a_critically_damped_circuit()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Step(10));
        built.Resistor(1, 2, 200);
        var coil = built.Inductor(2, 3, 1e-3);
        built.Capacitor(3, 0, 100e-9);
        var solution = built.Solve(50e-6);
        // t e^(−t/10 µs) · 10 kA/s, computed with 40 digits (mpmath 1.3.0).
        Near(9.048374180359596e-3, solution.ValueAt(new CurrentThrough(coil), 1e-6), 0.04);
        Near(36.78794411714423e-3, solution.ValueAt(new CurrentThrough(coil), 10e-6), 0.04);
        Near(3.368973499542734e-3, solution.ValueAt(new CurrentThrough(coil), 50e-6), 0.04);
    }

    [Fact]
    public void Two_capacitors_joined_by_an_ideal_contact_keep_their_charge()
    {
        // 100 µF at 12 V onto 47 µF empty: an article on two capacitors, quoted (V2); the fraction that is
        // lost: Singal, arXiv:1309.5034, quoted (V2).
        var built = new HandBuilt();
        built.Capacitor(1, 0, 100e-6, 12);
        built.Capacitor(2, 0, 47e-6);
        var contact = built.Switch(1, 2);
        var solution = built.Solve(2e-3, [], (1e-3, [contact]));
        Near(12, solution.ValueAt(new VoltageBetween(1, 0), 1e-3, before: true), 12);
        Near(1200.0 / 147, solution.ValueAt(new VoltageBetween(1, 0), 1e-3), 12);
        Near(1200.0 / 147, solution.ValueAt(new VoltageBetween(2, 0), 2e-3), 12);
        Near(383.673469387755e-6, solution.ImpulseAt(new CurrentThrough(contact), 1e-3), 1e-3);
        Near(7.2e-3, solution.StoredEnergyAt(1e-3, before: true), 1e-2);
        Near(7.2e-3 - 2.30204081632653e-3, solution.StoredEnergyAt(1e-3), 1e-2);
    }

    [Theory]
    [InlineData(1e-3)]
    [InlineData(1.0)]
    [InlineData(1e3)]
    public void Two_capacitors_joined_by_a_resistor_settle_at_their_own_pace(double ohms)
    {
        var built = new HandBuilt();
        built.Capacitor(1, 0, 100e-6, 12);
        built.Capacitor(2, 0, 47e-6);
        var contact = built.Switch(1, 2, closedOhms: ohms);
        var tau = ohms * 100e-6 * 47e-6 / 147e-6;
        var solution = built.Solve(20 * tau, [contact]);
        Near(12 / ohms * Math.Exp(-1), solution.ValueAt(new CurrentThrough(contact), tau), 12 / ohms);
        Near(1200.0 / 147, solution.ValueAt(new VoltageBetween(2, 0), 20 * tau), 12, 1e-8);
    }

    [Fact]
    public void A_source_on_an_empty_capacitor_delivers_its_charge_at_once()
    {
        // 10 V on 100 µF without resistance: 1000 µC.
        var built = new HandBuilt();
        var source = built.Voltage(1, 0, Step(10));
        var capacitor = built.Capacitor(1, 0, 100e-6);
        var solution = built.Solve(1);
        Near(1e-3, solution.ImpulseAt(new CurrentThrough(capacitor), 0), 1e-3);
        Near(-1e-3, solution.ImpulseAt(new CurrentThrough(source), 0), 1e-3);
        Near(10, solution.ValueAt(new VoltageAcross(capacitor), 0), 10);
        Near(0, solution.ValueAt(new CurrentThrough(capacitor), 0.5), 1e-3);
        Near(5e-3, solution.StoredEnergyAt(0.5), 1e-2);
    }

    [Fact]
    public void A_coil_cut_by_an_opening_contact_loses_its_flux_and_two_share_it()
    {
        // Two coils in series through a node whose bypass contact opens: L1 i1 + L2 i2 is kept.
        var built = new HandBuilt();
        var first = built.Inductor(0, 1, 2e-3, 3);
        var second = built.Inductor(1, 0, 1e-3);
        var bypass = built.Switch(1, 0);
        var solution = built.Solve(2, [bypass], (1, []));
        Near(3, solution.ValueAt(new CurrentThrough(first), 0.5), 3);
        Near(2, solution.ValueAt(new CurrentThrough(first), 1), 3);
        Near(2, solution.ValueAt(new CurrentThrough(second), 1.5), 3);
        Near(-2e-3, solution.ImpulseAt(new VoltageAcross(first), 1), 1e-2);
        Near(2e-3, solution.ImpulseAt(new VoltageBetween(1, 0), 1), 1e-2);
        var cut = new HandBuilt();
        var coil = cut.Inductor(0, 1, 5, 4);
        cut.Resistor(1, 2, 10);
        var contact = cut.Switch(2, 0);
        var opened = cut.Solve(2, [contact], (1, []));
        Near(4 * Math.Exp(-2), opened.ValueAt(new CurrentThrough(coil), 1, before: true), 4);
        Near(0, opened.ValueAt(new CurrentThrough(coil), 1), 4);
        Near(20 * Math.Exp(-2), opened.ImpulseAt(new VoltageAcross(contact), 1), 20);
    }

    [Fact]
    public void An_undamped_ring_keeps_its_phase_over_a_hundred_thousand_cycles()
    {
        var built = new HandBuilt();
        var coil = built.Inductor(1, 0, 1e-6);
        built.Capacitor(1, 0, 1e-9, 5);
        var solution = built.Solve(0.02);
        foreach (var t in new[] { 1e-3, 0.0123456789, 0.0199 })
        {
            // √(LC) of the doubles as given, in double-doubles: 1e5 cycles leave a double's rounding of ω at
            // 1e-10.
            var omega = 1 / DoubleDouble.Sqrt(DoubleDouble.FromProduct(1e-6, 1e-9));
            var (sin, cos) = DoubleDouble.SinCos(omega * t);
            Near(5 * (double)cos, solution.ValueAt(new VoltageBetween(1, 0), t), 5);
            Near((double)(sin * 5.0 / (omega * 1e-6)), solution.ValueAt(new CurrentThrough(coil), t), 0.16);
        }
    }

    [Fact]
    public void A_long_ladder_with_one_charged_capacitor_follows_the_Bessel_functions()
    {
        // v_n = V0 e^(−2t/RC) I_n(2t/RC) on an infinite ladder, computed with 40 digits (mpmath 1.3.0).
        // Thirty sections to either side stand for infinity up to t = RC (I_30(2) is 1e-33).
        var built = new HandBuilt();
        for (var node = 1; node <= 61; node++)
        {
            built.Capacitor(node, 0, 1, node == 31 ? 1 : 0);
            if (node > 1)
            {
                built.Resistor(node - 1, node, 1);
            }
        }

        var solution = built.Solve(1);
        double[][] expected =
        [
            [0.46575960759364, 0.20791041534971, 0.049938776894224, 0.0081553077728143],
            [0.30850832255367, 0.21526928924894, 0.093239033304733, 0.028791222639471],
        ];
        for (var n = 0; n < 4; n++)
        {
            Near(expected[0][n], solution.ValueAt(new VoltageBetween(31 + n, 0), 0.5), 1);
            Near(expected[1][n], solution.ValueAt(new VoltageBetween(31 - n, 0), 1), 1);
        }
    }

    [Fact]
    public void The_stiff_ladder_of_a_published_test_set_gives_its_states()
    {
        // STIFF DETEST A2 (Enright, Hull, Lindberg, BIT 15 (1975), from memory; equations seen in public
        // code), an RC ladder of nine nodes; values computed with 40 digits (mpmath 1.3.0).
        var built = new HandBuilt();
        for (var node = 1; node <= 9; node++)
        {
            built.Resistor(node - 1, node, 1);
            built.Capacitor(node, 0, node switch { 1 => 1 / 900.0, 9 => 1e-3, _ => 1 });
        }

        built.Resistor(9, 10, 1);
        built.Voltage(10, 0, Step(1));
        var solution = built.Solve(120);
        double[] atTen =
        [
            0.039671490865897, 0.079349233997973, 0.13028065708858, 0.19737384834051, 0.28435293115599,
            0.39321824706257, 0.5237534679529, 0.67325262807861, 0.83662284604455,
        ];
        double[] atEnd =
        [
            0.099999125529383, 0.1999982511574, 0.29999755431852, 0.39999710575209, 0.49999695099416,
            0.59999710575492, 0.6999975543239, 0.79999825116477, 0.899999125538,
        ];
        for (var node = 1; node <= 9; node++)
        {
            Near(atTen[node - 1], solution.ValueAt(new VoltageBetween(node, 0), 10), 1);
            Near(atEnd[node - 1], solution.ValueAt(new VoltageBetween(node, 0), 120), 1);
        }
    }

    [Fact]
    public void A_coil_closed_onto_the_mains_carries_the_offset_current()
    {
        // i = V/|Z| · (sin(ωt + φ − θ) − sin(φ − θ) e^(−Rt/L)).
        const double R = 0.1, L = 2e-3, Omega = 2 * Math.PI * 50, Phase = 0.7;
        var built = new HandBuilt();
        built.Voltage(1, 0, Sine(325, Omega, Phase));
        built.Resistor(1, 2, R);
        var coil = built.Inductor(2, 0, L);
        var solution = built.Solve(0.5);
        var angle = Math.Atan2(Omega * L, R);
        var size = 325 / double.Hypot(R, Omega * L);
        foreach (var t in new[] { 1e-3, 0.01, 0.123, 0.5 })
        {
            var expected = size
                * (Math.Sin((Omega * t) + Phase - angle) - (Math.Sin(Phase - angle) * Math.Exp(-R / L * t)));
            Near(expected, solution.ValueAt(new CurrentThrough(coil), t), size);
        }
    }

    [Fact]
    public void A_time_constant_a_million_million_times_the_shortest_keeps_its_digits()
    {
        // A microohm busbar with a picofarad stray beside a megaohm bleeder on a microfarad: 1e-18 s against
        // 1 s. With the two nodes' charge balance solved by hand the slow pole is p = −(a − √(a² − 4b))/2 of
        // s² + a s + b.
        var built = new HandBuilt();
        built.Capacitor(1, 0, 1e-6, 100);
        built.Resistor(1, 0, 1e6);
        built.Resistor(1, 2, 1e-6);
        built.Capacitor(2, 0, 1e-12);
        var solution = built.Solve(2);
        DoubleDouble c1 = 1e-6, c2 = 1e-12, slow = DoubleDouble.One / 1e6, fast = DoubleDouble.One / 1e-6;
        var a = ((slow + fast) / c1) + (fast / c2);
        var b = slow * fast / (c1 * c2);
        var root = DoubleDouble.Sqrt((a * a) - (b * 4.0));
        var fastPole = -(a + root) * 0.5;
        var slowPole = b / fastPole;
        // v1(0) = 100, v1'(0) = −100 (slow + fast)/c1.
        var rate = (slow + fast) * -100.0 / c1;
        var slowPart = (rate - (fastPole * 100.0)) / (slowPole - fastPole);
        foreach (var t in new[] { 0.5, 1, 2.0 })
        {
            var expected = (double)(slowPart * DoubleDouble.Exp(slowPole * t));
            Near(expected, solution.ValueAt(new VoltageBetween(1, 0), t), 100);
        }
    }

    private static double SeriesCurrent(double volts, double ohms, double henries, double farads, double t)
    {
        var alpha = ohms / (2 * henries);
        var square = (alpha * alpha) - (1 / (henries * farads));
        var root = Math.Sqrt(Math.Abs(square));
        var shape = Math.Abs(square) < 1e-6 * alpha * alpha ? t * (1 + (square * t * t / 6))
            : square > 0 ? Math.Sinh(root * t) / root
            : Math.Sin(root * t) / root;
        return volts / henries * Math.Exp(-alpha * t) * shape;
    }

    private static void Near(double expected, double? actual, double scale, double tolerance = Tight)
    {
        Assert.NotNull(actual);
        Assert.InRange(actual.Value, expected - (tolerance * scale), expected + (tolerance * scale));
    }
}
