using CircuitTransient.Tests.OutsideChecks;
using CsCheck;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Current zeros in circuits drawn at random, where no closed form is at hand.</summary>
public sealed class RandomZeroTests
{
    private static readonly Gen<(double R, double L, double C, double Phase, double After)> Drawing =
        Gen.Select(
            Gen.Double[1, 100], Gen.Double[1, 50], Gen.Double[1, 50], Gen.Double[0, 360],
            Gen.Double[0.1, 15]);

    [Fact]
    public void The_current_is_zero_where_it_is_parted_and_kept_its_sign_until_then() =>
        Drawing.OnEach(
            drawing =>
            {
                var (r, l, c, phase, after) = drawing;
                var circuit = $"""
                    source Feed at in : sine of 325 V at 50 Hz phase {phase:F3}°
                    resistor R from in to a : {r:F4} Ω
                    inductor L from a to b : {l:F4} mH
                    capacitor C at b : {c:F4} µF
                    resistor Load from b to d : {r:F4} Ω
                    observe current through Load
                    until 60 ms

                    """;
                var parted = SolvedText.Of(
                    $"{circuit}switch Q at d : closed, opens at {after:F4} ms at next current zero");
                var time = Assert.Single(parted.Result.Events).Time;
                var from = after * 1e-3;
                double[] instants =
                    [.. Enumerable.Range(1, 99).Select(k => from + ((time - from) * k / 100))];
                var kept = SolvedText.Of($"{circuit}switch Q at d : closed", [.. instants, time]);
                var values = kept.Samples("current through Load");
                Assert.Single(values[..^1].Select(Math.Sign).Distinct());
                Close.OfScale(kept.Max("current through Load"), 0, values[^1], 1e-11);
            },
            seed: "0000000000000", iter: 12);
}
