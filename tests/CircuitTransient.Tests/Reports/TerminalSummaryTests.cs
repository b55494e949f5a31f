using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class TerminalSummaryTests
{
    [Fact]
    public void Without_observations_there_is_no_heading_for_them() =>
        Assert.DoesNotContain(
            "Observed from",
            TerminalSummary.Write(SampleResults.Inrush() with { Observations = [] }, []));

    [Fact]
    public void No_line_is_wider_than_a_hundred_columns()
    {
        TransientResult[] results = [SampleResults.Inrush(), SampleResults.Awkward(), SampleResults.Bare()];
        foreach (var result in results)
        {
            var text = TerminalSummary.Write(result, [new string('x', 250)]);
            Assert.All(text.Split('\n'), line => Assert.InRange(DisplayWidth.Of(line), 0, 100));
        }
    }

    [Fact]
    public void The_whole_summary_reads_so() => Assert.Equal(
        """
        Pre-charge and bypass (bullwheel-bus.cause)
        One of 2 requirements is broken; one of 3 ratings is exceeded; one part leaves the range its value
        is good for.

          broken by 29.33 A       current through Ls at most 100 A      129.3 A at 1.802 s, 1.500 ms after
                                  from 1.8 s to 6 s because "making     Kmain closes
                                  capacity" (line 18)
          held, 147.8 V to spare  voltage across Cbus at most 1.1 kV    952.2 V at 1.803 s, 3.000 ms after
                                  (line 19)                             Kmain closes
          Cbus is linear up to 900.0 V but reaches 952.2 V: the figure may be too low

        Switchings, with what each switch saw just before and just after
          200.0 ms  Kpre closes   792.0 V  → 0 V across  0 A  → 9.650 A through
           1.800 s  Kmain closes  26.36 V  → 0 V across  0 A  → undetermined through  bounces are not
                                                                                      modelled

        Observed from 0 s to 14.00 s
          voltage of bus      max   950.4 V  at 1.803 s, 3.100 ms after Kmain closes
                              min   140.0 V  at the start
                              end   932.0 V  tends to 932.0 V
          current through Ls  max   129.3 A  at 1.802 s, 1.500 ms after Kmain closes
                              min  -98.78 A  at 1.805 s, 4.700 ms after Kmain closes
                              end       0 A  tends to 0 A

        At the instants asked for (each cause's share stands in results.json)
          current through Ls  1.000 ms  0 A
                              2.500 ms  0 A

        What makes the 129.3 A of current through Ls (at 1.802 s, 1.500 ms after Kmain closes; the
        requirement exceeded most)
          Supply makes 150.2 A of it, Cbus initial charge takes 20.88 A off. Cbus initial charge holds it
          down: without it the highest value would be 150.2 A.
          From the start: the sources, and what was stored at t = 0, carried through every switching
                                                                         its own peak  max without
            Supply               +150.2 A  116.1 %        ██████   150.2 A at 1.802 s     -20.88 A
            Cbus initial charge  -20.88 A  -16.1 %       █        -20.88 A at 1.802 s      150.2 A
          Since Kmain closes: what each part held just before it, and the sources from then on
            Supply                         +4.577 kA   3539 %        ██████
            Cbus charge when Kmain closes  -4.448 kA  -3439 %  ██████
            large causes cancel: Supply 4.577 kA against Cbus charge when Kmain closes 4.448 kA: 129.3 A

        Read off the waveforms
          rise time of voltage of bus  1.006 s  10 to 90 % of the final value

        Ratings, the most used first
          Cbus  peak current  no finite value  of 20.00 A           exceeded without limit
          Cbus  peak voltage          952.2 V  of 1.100 kV  86.6 %  held
          Rpre  energy               1.760 kJ  of 2.600 kJ  67.7 %  held
          no rating given: Ls

        Impulses: ideal parts joined or parted with more than they could hold
          at 1.800 s, when Kmain closes: 1.200 µC through Resr; a contact resistance makes it finite
          at 6.000 s, 4.200 s after Kmain closes: 20.00 mVs across Ls
          lost in them: 250.0 µJ

        Self-checks: all 2 hold; nearest to its limit is sum of the causes against one solve, 3.1e-13 of
          1e-8 allowed.
        Not judged: numerical inversion: its own error estimate is 3e-5.

        Warnings
          line 7: node `x` is touched by one part only
          a peak lies at the end of the study

        Cautions
          danger: Cbus stands at 930.6 V at the end of the study (common threshold, verify in IEC 60204-1)
          note: Cbus holds 2.4 kJ (common practice, no source)

        Files
          output/bullwheel-bus/results.json

        This is the result of a linear model and a calculation aid; the applicable code and a licensed
        practitioner decide.
        """ + "\n",
        TerminalSummary.Write(SampleResults.Inrush(), ["output/bullwheel-bus/results.json"]));

    [Fact]
    public void A_study_without_demands_says_that_there_is_no_verdict()
    {
        var lines = TerminalSummary.Write(SampleResults.Bare(), []).Split('\n');
        Assert.Equal("Nothing was required or rated, so there is no verdict.", lines[1]);
        Assert.Contains("Ratings: no rating given for any part.", lines);
        Assert.DoesNotContain("Files", lines);
    }

    [Fact]
    public void Colour_only_adds_attributes()
    {
        var plain = TerminalSummary.Write(SampleResults.Inrush(), []);
        var coloured = TerminalSummary.Write(SampleResults.Inrush(), [], colour: true);
        Assert.DoesNotContain('\u001b', plain);
        Assert.NotEqual(plain, coloured);
        var stripped = coloured.Replace("\u001b[1m", "").Replace("\u001b[34m", "").Replace("\u001b[0m", "");
        Assert.Equal(plain, stripped);
    }

    [Fact]
    public void A_name_cannot_command_the_terminal()
    {
        var text = TerminalSummary.Write(SampleResults.Awkward(), []);
        Assert.DoesNotContain('\u001b', text);
        Assert.DoesNotContain('\u202e', text);
    }

    [Fact]
    public void A_failed_self_check_comes_first()
    {
        var result = SampleResults.Inrush() with { SelfChecks = [new("energy", 3e-5, 1e-9, false)] };
        var lines = TerminalSummary.Write(result, []).Split('\n');
        Assert.Equal("A self-check failed: do not use these figures.", lines[1]);
        Assert.Contains("  energy  worst 3e-5, allowed 1e-9", lines);
    }

    [Fact]
    public void A_peak_that_still_rises_at_the_end_is_said_to()
    {
        var result = SampleResults.Inrush();
        var text = TerminalSummary.Write(
            result with { Observations = [result.Observations[0] with { EndsRising = true }] }, []);
        Assert.Contains("still rising at the end", text.Replace("\n", " "));
    }

    [Fact]
    public void The_event_at_the_start_replaces_the_absolute_time()
    {
        var result = SampleResults.Bare() with { Events = [new(0, "KB", true, 5, 0, 0, 0, null)] };
        Assert.Equal("298.0 µs after KB closes", InstantWords.At(result, 298e-6));
        Assert.Equal("just before KB closes", InstantWords.At(result, 0, InstantSide.Before));
    }

    [Fact]
    public void Switches_that_the_answer_decides_are_said_to_keep_their_instants()
    {
        var result = SampleResults.Inrush();
        var breaker = new Switch(true, null, null, [new(false, new AtInstant(new(0.01, null)), 0, new(0, 0))])
        {
            Name = "Q1",
            From = 1,
            To = 2,
            Span = new(0, 0),
        };
        var circuit = result.Circuit with { Parts = result.Circuit.Parts.Add(breaker) };
        var text = TerminalSummary.Write(result with { Circuit = circuit }, []);
        Assert.Contains("  instants of the full answer kept for Q1\n", text);
    }

    [Fact]
    public void Very_many_causes_are_summed_up()
    {
        var result = SampleResults.Bare();
        var names = Enumerable.Range(1, 20).Select(i => $"S[{i}]").ToArray();
        var waves = Enumerable.Range(1, 20).Select(i => (Func<double, double>)(_ => i)).ToArray();
        var sum = SampleResults.Observed("voltage of a", "V", result.SampleTimes, [.. names], [.. waves]);
        var lines = TerminalSummary.Write(result with { Observations = [sum] }, []).Split('\n');
        // 210 V in all; the eleven largest are 20 to 10, which leaves 9 + 8 + … + 1 = 45.
        Assert.Contains("    9 smaller ones  +45.00 V  21.4 %", lines);
    }

    [Fact]
    public void A_wave_without_a_limit_is_not_said_to_tend_anywhere()
    {
        var result = SampleResults.Bare();
        var wave = result.Observations[0] with { End = 5, Final = null };
        var lines = TerminalSummary.Write(result with { Observations = [wave] }, []).Split('\n');
        Assert.Contains("                end  5.000 V  goes on swinging or has no limit", lines);
    }

    [Fact]
    public void What_rounding_left_over_is_written_as_zero()
    {
        var result = SampleResults.Bare();
        var wave = result.Observations[0] with { Min = new(-34.69e-18, 0, InstantSide.At, 0), End = 4e-11 };
        var lines = TerminalSummary.Write(result with { Observations = [wave] }, []).Split('\n');
        Assert.Contains("                min       0 V  at the start", lines);
        Assert.Contains("                end  40.00 pV  tends to 5.000 V", lines);
    }
}
