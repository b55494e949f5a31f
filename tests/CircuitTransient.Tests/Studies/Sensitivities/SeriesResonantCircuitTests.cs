using System.Numerics;
using CircuitTransient.Circuits;
using CircuitTransient.Studies;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Studies.Sensitivities;

/// <summary>A step onto a series RLC circuit: ω₀ = 1/√(LC), ζ = R/2 · √(C/L), peak current V √(C/L) e^(−g) at
/// h/ω₀ with h = arccos ζ / √(1 − ζ²), g = ζ h (any handbook of electrical engineering; differentiated here
/// by hand).</summary>
public class SeriesResonantCircuitTests
{
    private const double V = 10, R = 60, L = 1e-3, C = 1e-7;

    private static readonly double Zeta = R / 2 * Math.Sqrt(C / L);

    [Fact]
    public void The_peak_has_the_derivatives_of_its_closed_form()
    {
        var peak = Step(R).Figure("max of current through L1");
        var h = Math.Acos(Zeta) / Math.Sqrt(1 - (Zeta * Zeta));
        var growth = Zeta * ((h / (1 - (Zeta * Zeta))) - (Zeta / (1 - (Zeta * Zeta)))); // ζ dg/dζ
        Close.To(V * Math.Sqrt(C / L) * Math.Exp(-Zeta * h), peak.Value);
        AssertRelative([1, -growth, -0.5 + (growth / 2), 0.5 - (growth / 2)], peak.Slopes, peak.Value);
    }

    [Fact]
    public void The_instant_of_the_peak_has_the_derivatives_of_its_closed_form()
    {
        var peak = Step(R).Figure("max of current through L1");
        var square = 1 - (Zeta * Zeta);
        var h = Math.Acos(Zeta) / Math.Sqrt(square);
        var growth = Zeta * ((Zeta * h / square) - (1 / square)) / h; // ζ/h dh/dζ
        Close.To(Math.Sqrt(L * C) * h, peak.Time!.Value, Close.Instant);
        AssertRelative(
            [0, growth, 0.5 - (growth / 2), 0.5 + (growth / 2)], peak.TimeSlopes, Math.Sqrt(L * C) * h);
    }

    [Fact]
    public void The_poles_have_the_derivatives_of_the_roots_of_the_quadratic()
    {
        var pole = Assert.Single(Step(R).Analysis.Poles(0));
        var p = pole.Pole;
        Complex[] expected =
        [
            0, // L p² + R p + 1/C = 0, differentiated
            -p / ((2 * L * p) + R),
            -p * p / ((2 * L * p) + R),
            1 / (C * C) / ((2 * L * p) + R),
        ];
        for (var k = 0; k < expected.Length; k++)
        {
            Close.Within(1e-11 * expected[k].Magnitude, 0, (expected[k] - pole.Slopes[k]).Magnitude);
        }
    }

    /// <summary>i = V/L · t e^(−αt) S(β² t²) with S(x) = sinh √x / √x, α = R/2L, β² = α² − 1/LC; at the
    /// double pole, R = 2 √(L/C) = 200 Ω, S = 1 and S′ = 1/6.</summary>
    [Theory]
    [InlineData(0)]
    [InlineData(1e-9)]
    [InlineData(-1e-9)]
    [InlineData(1e-13)]
    [InlineData(-1e-4)]
    public void A_double_pole_and_one_nearly_so_lose_no_digits(double away)
    {
        var r = 200 * (1 + away);
        var analysis = Step(r).Analysis;
        double[] times = [1e-6, 5e-6, 10e-6, 20e-6, 50e-6];
        double[] values = new double[5], jacobian = new double[20];
        Assert.True(analysis.Samples(new CurrentThrough(2), times, values, jacobian));
        var alpha = r / (2 * L);
        var beta = (alpha * alpha) - (1 / (L * C));
        for (var k = 0; k < times.Length; k++)
        {
            var t = times[k];
            var x = beta * t * t;
            var s = 1 + (x / 6 * (1 + (x / 20 * (1 + (x / 42)))));
            var slope = t * t / 6 * (1 + (x / 10 * (1 + (x / 28))));
            var wave = V / L * t * Math.Exp(-alpha * t);
            double[] expected =
            [
                wave * s / V,
                wave * ((-t / (2 * L) * s) + (slope * alpha / L)),
                wave * ((-s / L) + (t * r / (2 * L * L) * s)
                    + (slope * ((-alpha * r / (L * L)) + (1 / (L * L * C))))),
                wave * slope / (L * C * C),
            ];
            double[] scales = [0.0037, 3.7e-4, 37, 7e5]; // the largest of each over these instants
            Close.OfScale(0.037, wave * s, values[k], 1e-12);
            for (var v = 0; v < 4; v++)
            {
                Close.OfScale(scales[v], expected[v], jacobian[(4 * k) + v], 1e-10);
            }
        }
    }

    [Fact]
    public void Of_poles_that_coincide_the_mean_is_derived()
    {
        var pole = Assert.Single(Step(200).Analysis.Poles(0));
        Assert.Equal(2, pole.Multiplicity);
        Close.To(-1 / (2 * L), pole.Slopes[1].Real);
        Close.To(200 / (2 * L * L), pole.Slopes[2].Real);
    }

    private static Derived Step(double r) => Derived.Of(
        FormattableString.Invariant($"""
            source    Feed at in : {V} V
            resistor  R1   from in to a : {r:R} Ω
            inductor  L1   from a to b : {L:R} H
            capacitor C1   from b to ground : {C:R} F
            observe current through L1
            until 200 µs
            """),
        [.. new[] { "Feed", "R1", "L1", "C1" }.Select(n => new PartValueTarget(n))]);

    private static void AssertRelative(
        double[] expected, IReadOnlyList<double?> slopes, double value)
    {
        double[] nominal = [V, R, L, C];
        for (var k = 0; k < expected.Length; k++)
        {
            Close.Within(1e-10, expected[k], slopes[k]!.Value * nominal[k] / value);
        }
    }
}
