using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.OdeSolvers;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Three circuits whose state equations are written by hand and integrated by a general-purpose
/// library's Runge–Kutta steps of fourth order, so short that their error is below 1e-10.</summary>
public sealed class StateEquationTests
{
    private const int Steps = 40_000;

    [Fact]
    public void A_series_circuit_on_a_sine()
    {
        var solved = SolvedText.Of(
            """
            source E at s : sine of 100 V at 400 Hz phase 30°
            resistor R from s to r : 3 Ω
            inductor L from r to c : 2 mH, carrying 1 A
            capacitor C from c to ground : 10 µF, charged to -20 V
            observe current through L
            observe voltage of c
            until 5 ms
            """,
            5e-3);
        var state = Integrated([1, -20], 0, 5e-3, (t, x) =>
        [
            ((100 * Math.Sin((double.Tau * 400 * t) + (Math.PI / 6))) - (3 * x[0]) - x[1]) / 2e-3,
            x[0] / 10e-6,
        ]);
        Close.OfScale(solved.Max("current through L"), state[0], solved.Sample("current through L", 0));
        Close.OfScale(solved.Max("voltage of c"), state[1], solved.Sample("voltage of c", 0));
    }

    [Fact]
    public void A_bus_charged_through_a_resistor_that_is_bypassed()
    {
        var solved = SolvedText.Of(
            """
            source Feed at s : 500 V
            inductor L from s to a : 1 mH
            resistor Rpre from a to b : 50 Ω
            switch K from a to b : open, closes at 10 ms
            capacitor Cin from b to ground : 50 µF
            resistor Rc from b to d : 0.5 Ω
            capacitor Cbus from d to ground : 400 µF, charged to 100 V
            resistor Load from d to ground : 120 Ω
            observe current through L
            observe voltage of b
            observe voltage of d
            until 14 ms
            """,
            14e-3);
        Func<double, Func<double, double[], double[]>> equations = series => (_, x) =>
        [
            (500 - (series * x[0]) - x[1]) / 1e-3,
            (x[0] - ((x[1] - x[2]) / 0.5)) / 50e-6,
            (((x[1] - x[2]) / 0.5) - (x[2] / 120)) / 400e-6,
        ];
        var before = Integrated([0, 0, 100], 0, 10e-3, equations(50));
        var state = Integrated(before, 10e-3, 14e-3, equations(0));
        foreach (var (i, name) in new[] { "current through L", "voltage of b", "voltage of d" }.Index())
        {
            Close.OfScale(solved.Max(name), state[i], solved.Sample(name, 0));
        }
    }

    [Fact]
    public void Two_coupled_coils_under_a_ramp()
    {
        var solved = SolvedText.Of(
            """
            source E at s : ramp of 50 V from 0 s to 2 ms
            resistor R1 from s to p : 4 Ω
            inductor L1 from p to ground : 2 mH
            inductor L2 from q to ground : 8 mH
            coupling M of L1 and L2 : 0.75
            resistor R2 from q to ground : 60 Ω
            capacitor C from q to ground : 2 µF
            observe current through L1
            observe voltage of q
            until 2 ms
            """,
            2e-3);
        const double l1 = 2e-3;
        const double l2 = 8e-3;
        const double m = 0.75 * 4e-3;
        const double determinant = (l1 * l2) - (m * m);
        var state = Integrated([0, 0, 0], 0, 2e-3, (t, x) =>
        {
            var (u1, u2) = ((50 * t / 2e-3) - (4 * x[0]), x[2]);
            return
            [
                ((l2 * u1) - (m * u2)) / determinant,
                ((l1 * u2) - (m * u1)) / determinant,
                (-x[1] - (x[2] / 60)) / 2e-6,
            ];
        });
        Close.OfScale(solved.Max("current through L1"), state[0], solved.Sample("current through L1", 0));
        Close.OfScale(
            solved["voltage of q"].Greatest is { } peak ? Math.Abs(peak.Value!.Value) : 0,
            state[2], solved.Sample("voltage of q", 0));
    }

    private static double[] Integrated(
        double[] start, double from, double until, Func<double, double[], double[]> derivative)
    {
        var steps = RungeKutta.FourthOrder(
            Vector<double>.Build.Dense(start), from, until, Steps + 1,
            (t, x) => Vector<double>.Build.Dense(derivative(t, x.AsArray())));
        return steps[^1].ToArray();
    }
}
