using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Project;
using CircuitTransient.Tests.Studies.Scans;

namespace CircuitTransient.Tests.Reports.Studies;

public class ScanSummaryTests
{
    // v = g·v has any current as its solution where g = 1.
    private const string Gap = """
        source Feed at a : 1 V
        resistor R from a to b : 1 kΩ
        dependent source E from b to ground : 2 times voltage of b
        observe current through R
        require current through R at most 1 A
        until 1 ms
        """;

    private const string Charged = """
        source    I from ground to a : 1 mA
        switch    S from a to b : closed, opens at 3 ms
        resistor  R from a to ground : 1 kΩ
        capacitor C from b to ground : 1 µF, linear up to 0.97 V
        observe voltage of b
        require voltage of b at most 1 V
        require voltage of b at most 2 V from 1 ms
        until 10 ms
        """;

    [Fact]
    public void The_first_words_say_that_some_points_have_no_solution() =>
        Assert.Equal(
            "Wherever there is a solution everything required and rated holds for E from 0.5000 to 1.500. "
            + "One of 5 points has no solution.",
            Verdict(Gap, ("--part", "E from 0.5 to 1.5 in 4 steps")));

    // 1 V (1 − exp(−t/1 ms)) = 0.97 V at t = 3.507 ms
    [Fact]
    public void The_verdict_carries_where_a_part_is_past_what_it_is_linear_up_to()
    {
        var result = Scanning.Run(Charged, ("--event", "S opens from 2 ms to 4 ms in 4 steps"));

        Assert.Equal(
            "Everything required and rated holds for S opening from 2.000 ms to 4.000 ms; in doubt above "
            + "3.507 ms: C leaves the range its value is good for.",
            ScanSummary.Verdict(result));
        Assert.Equal(-1e-3 * Math.Log(0.03), result.Linear.Single().Scan.Breaks.Single().At[0], 1e-12);
        Assert.Equal([false, false, false, false, true], result.Points.Select(p => p.IsInDoubt));
        Assert.Contains("C is linear up to 970.0 mV but reaches 981.7 mV at S opens at 4.000 ms",
            Summary(result));
    }

    [Fact]
    public void A_narrow_scatter_has_digits_enough_and_tells_its_rows_apart()
    {
        var result = Scanning.Run(Charged, ("--scatter", "S opens by 0.5 µs"));

        Assert.Contains("from 2.99950 ms to 3.00050 ms", ScanSummary.Verdict(result));
        Assert.Contains("greatest voltage of b (at most 1 V)", Summary(result));
        Assert.Contains("greatest voltage of b (at most 2 V", Summary(result));
    }

    [Fact]
    public void A_scatter_that_would_begin_before_the_study_or_end_after_it_says_so()
    {
        var verdict = Verdict(Charged, ("--scatter", "S opens by 8 ms"));

        Assert.Contains("from 0 s (cut there: nothing is earlier) to 10.00 ms (cut there: the study ends)",
            verdict);
    }

    [Fact]
    public void Least_median_and_greatest_are_in_order_and_a_current_that_never_flows_is_zero()
    {
        var result = Scanning.Run(
            Repository.Read("netlists/bullwheel-bus.cause"), ("--scatter", "Kmain closes by 0.5 ms"));

        Assert.All(result.Scatter!.Figures.Where(f => f.Quantiles.Length > 0), f =>
        {
            Assert.All(
                f.Quantiles, q => Assert.InRange(q.Value, f.Scan.Least!.Value, f.Scan.Greatest!.Value));
            Assert.Equal(f.Quantiles.OrderBy(q => q.Value), f.Quantiles);
        });
        Assert.DoesNotContain("·10⁻", Summary(result));
    }

    [Fact]
    public void An_event_that_leaves_the_window_of_a_requirement_is_said() =>
        Assert.Contains(
            "`voltage of b at most 2 V from 1 ms` counts on fixed times, which do not hold the instant of S "
            + "opening from 500.0 µs to 1.000 ms",
            ScanSummary.Remarks(Scanning.Run(
                Charged, ("--event", "S opens from 0.5 ms to 4 ms in 7 steps"))).First());

    [Fact]
    public void What_is_equal_over_both_values_is_equal_throughout()
    {
        var result = Scanning.Run(
            Charged, ("--part", "R from 1 kΩ to 2 kΩ in 2 steps"),
            ("--event", "S opens from 2 ms to 4 ms in 2 steps"));

        Assert.Matches("min of voltage of b +0 V +throughout", Summary(result));
    }

    private static string Verdict(string circuit, params (string, string)[] said) =>
        ScanSummary.Verdict(Scanning.Run(circuit, said));

    private static string Summary(ScanResult result) => string.Join(
        ' ', ScanSummary.Write(result, []).Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));
}
