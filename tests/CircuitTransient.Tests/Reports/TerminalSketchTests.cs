using System.Collections.Immutable;
using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

/// <summary>The sketch beneath the worst observation's table.</summary>
public class TerminalSketchTests
{
    private static readonly ImmutableArray<double> Times =
        [.. Enumerable.Range(0, 1001).Select(i => i / 1000.0)];

    [Fact]
    public void A_sine_swings_about_a_dotted_zero_between_its_extremes()
    {
        var lines = Lines(t => 325 * Math.Sin(2 * Math.PI * t));

        Assert.Equal(10, lines.Length);
        Assert.StartsWith("       325 V ", lines[0]);
        Assert.StartsWith("         0 V ", lines[4]);
        Assert.StartsWith("      -325 V ", lines[8]);
        Assert.Contains("····", lines[4]);
        Assert.EndsWith("1.00 s", lines[9]);

        // The first row holds what is above 1 − 3/17 of the crest: from asin(14/17)/2π = 0.154 of the period
        // on, the 12th of 72 columns; the last row half a period later.
        Assert.Equal(13 + 11, lines[0].IndexOfAny(['█', '▀', '▄']));
        Assert.Equal(13 + 47, lines[8].IndexOfAny(['█', '▀', '▄']));
    }

    [Fact]
    public void A_constant_above_zero_is_one_line() =>
        Assert.Equal(72, Lines(_ => 5)[0].Count(c => c == '▀'));

    [Fact]
    public void Nothing_is_drawn_of_nothing() => Assert.Empty(Lines(_ => 0));

    [Fact]
    public void Only_a_terminal_that_is_wide_enough_gets_it()
    {
        var result = SampleResults.Inrush();
        var wide = TerminalSummary.Write(result, [], terminalWidth: 100);

        Assert.Contains('▄', wide);
        Assert.All(wide.Split('\n'), line => Assert.InRange(line.Length, 0, 100));
        Assert.DoesNotContain('▄', TerminalSummary.Write(result, [], terminalWidth: 99));
        Assert.DoesNotContain('▄', TerminalSummary.Write(result, []));
    }

    private static ImmutableArray<string> Lines(Func<double, double> wave)
    {
        var observed = SampleResults.Observed("voltage of a", "V", Times, ["Feed"], [wave]);
        var result = SampleResults.Bare() with { SampleTimes = Times, Observations = [observed] };
        return TerminalSketch.Lines(result, observed);
    }
}
