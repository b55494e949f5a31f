using CircuitTransient.Measurements;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Sources broken down by their edges.</summary>
public class EdgeCauseTests
{
    private const string Ring = """
        resistor R from a to b : 3 Ω
        inductor L from b to c : 100 µH
        capacitor C at c : 1 µF, charged to 2 V
        observe voltage of c
        observe current through L
        observe energy in R
        until 400 µs

        """;

    [Fact]
    public void A_pulse_by_edge_is_the_pulse()
    {
        double[] at = [30e-6, 47e-6, 63e-6, 180e-6, 400e-6];
        const string feed = "source Feed at a : rectangular pulse of 10 V from 20 µs to 60 µs";
        var pulse = SolvedText.Of(Ring + feed, at);
        var rise = SolvedText.Of(Ring + "source Feed at a : step of 10 V at 20 µs", at);
        var fall = SolvedText.Of(Ring + "source Feed at a : step of -10 V at 60 µs", at);
        var cut = SolvedText.By(Breakdown.Edge, Ring + feed, at);

        const string whole = "Feed pulse from 20 µs";
        Assert.Equal(
            [
                new CauseName("C initial charge", CauseKind.Stored),
                new CauseName("Feed rise at 20 µs", CauseKind.Edge, "Feed") { Pulse = whole, From = 20e-6 },
                new CauseName("Feed fall at 60 µs", CauseKind.Edge, "Feed") { Pulse = whole, From = 60e-6 },
            ],
            cut.Result.Causes);
        for (var k = 0; k < at.Length; k++)
        {
            var edges = cut["voltage of c"].Samples[k].ByCause;
            Close.OfScale(20, rise["voltage of c"].Samples[k].ByCause[1]!.Value, edges[1]!.Value, 1e-12);
            Close.OfScale(20, fall["voltage of c"].Samples[k].ByCause[1]!.Value, edges[2]!.Value, 1e-12);
            var all = pulse["voltage of c"].Samples[k].ByCause[1]!.Value;
            Close.OfScale(20, all, edges[1]!.Value + edges[2]!.Value, 1e-12);
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    public void The_edges_of_a_source_add_up_to_it_through_switchings(int seed)
    {
        var text = RandomNetwork.Draw(seed).Text();
        double[] at = [0.7e-3, 2e-3, 3e-3, 5e-3, 8e-3];
        AddUp(SolvedText.Of(text, at), SolvedText.By(Breakdown.Edge, text, at));
    }

    [Fact]
    public void They_do_so_from_a_settled_start_through_decided_events_jumps_and_impulses()
    {
        const string text = """
            source Feed at a : 20 V + sine of 5 V at 700 Hz phase 40° +
                pulse train of 9 V width 0.2 ms every 0.7 ms from 0.1 ms count 4 +
                straight lines (1 ms, 3 V) (1.5 ms, 7 V) (1.5 ms, -1 V) (2 ms, 0 V)
            resistor R from a to b : 40 Ω
            capacitor C at b : 3 µF
            inductor L from b to d : 5 mH
            resistor Rl at d : 25 Ω
            switch Q from b to e : open, closes when voltage of b rises above 14 V,
                opens at 2.2 ms at next current zero
            capacitor C2 at e : 1 µF, charged to 3 V
            capacitor C3 at a : 2 µF
            observe voltage of b
            observe voltage across Rl
            observe current through L
            observe current through R
            observe energy in Rl
            start settled
            until 3 ms
            """;
        double[] at = [0.15e-3, 1.2e-3, 1.5e-3, 2.5e-3, 3e-3];
        var whole = SolvedText.Of(text, at);
        var cut = SolvedText.By(Breakdown.Edge, text, at);

        AddUp(whole, cut);
        Assert.Equal(2, whole.Result.Events.Length);
        foreach (var (one, other) in whole.Result.Events.Zip(cut.Result.Events))
        {
            Close.OfScale(3e-3, one.Time, other.Time, 1e-13);
        }

        Assert.NotEmpty(whole.Result.Intervals.SelectMany(i => i.Impulses));
        Assert.Equal(
            whole.Result.Intervals.SelectMany(i => i.Impulses).Select(i => i.Part),
            cut.Result.Intervals.SelectMany(i => i.Impulses).Select(i => i.Part));
    }

    [Fact]
    public void An_edge_after_the_end_of_the_study_is_no_cause()
    {
        var cut = SolvedText.By(Breakdown.Edge,
            Ring + "source Feed at a : pulse train of 1 V width 10 µs every 150 µs count 9000");

        Assert.Equal(1 + 6, cut.Result.Causes.Length); // C, and the three pulses that begin by 400 µs
    }

    [Fact]
    public void Too_many_edges_are_refused_before_they_are_solved()
    {
        const string text = """
            source Feed at a : pulse train of 1 V width 10 ns every 30 ns count 9000
            resistor R at a : 3 Ω
            until 100 µs
            """;
        var outcome = TransientAnalysis.Run(
            new SourceText("check.cause", text), AnalysisOptions.Default with { By = Breakdown.Edge },
            _ => throw new InvalidOperationException(), TestContext.Current.CancellationToken);

        Assert.Equal(
            """
            check.cause:1:1: error: `Feed` has 6668 edges within the study; at most 300 are told apart in all
            """,
            DiagnosticText.Render(Assert.IsType<Mistakes>(outcome).Diagnostics[0]).Split('\n')[0]);
    }

    [Theory]
    [InlineData("ramp of 12.3 V from 1.1 ms to 3.7 ms")]
    [InlineData("sine of 3 V at 3 kHz")]
    [InlineData("straight lines (0 s, 0 V) (1.1 ms, 5.3 V) (3.7 ms, 0.7 V)")]
    public void A_wave_without_a_jump_makes_no_impulse_in_a_capacitor_across_it(string wave)
    {
        var solved = SolvedText.Of(
            $"source S at a : {wave}\ncapacitor C at a : 1 µF\nobserve current through C\nuntil 10 ms");

        Assert.Empty(solved.Result.Intervals.SelectMany(i => i.Impulses));
    }

    private static void AddUp(SolvedText whole, SolvedText cut)
    {
        foreach (var observed in whole.Result.Observations)
        {
            var edges = cut[observed.Name];
            var scale = Math.Max(Math.Abs(observed.Max.Value ?? 0), Math.Abs(observed.Min.Value ?? 0));
            for (var k = 0; k < observed.Samples.Length; k++)
            {
                Close.OfScale(scale, observed.Samples[k].Value!.Value,
                    edges.Samples[k].ByCause.Sum(v => v!.Value), 1e-12);
            }

            if (observed.Contributions.Any(c => c.Cause == "joint"))
            {
                continue; // what two edges of one source have together is joint; the source's own is not
            }

            for (var c = 0; c < whole.Result.Causes.Length; c++)
            {
                var own = OfCause(whole.Result.Causes[c].Name);
                for (var k = 0; k < observed.Samples.Length; k++)
                {
                    Close.OfScale(scale, observed.Samples[k].ByCause[c]!.Value,
                        own.Sum(e => edges.Samples[k].ByCause[e]!.Value), 1e-12);
                }

                if (observed.Max.Value is not null)
                {
                    Close.OfScale(scale, observed.Contributions[c].AtMax!.Value,
                        own.Sum(e => edges.Contributions[e].AtMax!.Value), 1e-12);
                }
            }
        }

        int[] OfCause(string name) => [.. Enumerable.Range(0, cut.Result.Causes.Length)
            .Where(e => cut.Result.Causes[e].Name == name || cut.Result.Causes[e].Of == name)];
    }
}
