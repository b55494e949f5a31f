using System.Numerics;
using CircuitTransient.Reports.Studies;

namespace CircuitTransient.Tests.Studies.Scans;

/// <summary>Two series resonances on one source, both tuned by the same capacitance: at every scanned point
/// the current is far below its limit, between two pairs of them it is far above.</summary>
public class BreakBetweenPointsTests
{
    private const string Filters = """
        start settled
        value Ct : 2 µF
        source    E at s : sine of 1 V at 1 kHz
        inductor  L1 from s to a : 10 mH
        resistor  R1 from a to b : 0.5 Ω
        capacitor C1 from b to ground : Ct
        inductor  L2 from s to c : 18 mH
        resistor  R2 from c to d : 0.25 Ω
        capacitor C2 from d to ground : Ct
        observe current through E
        require current through E at most 0.8 A
        until 2 ms
        """;

    private static readonly (string, string) Coarse = ("--value", "Ct from 1 µF to 4 µF in 5 steps");

    [Fact]
    public void Each_narrow_break_between_two_points_that_hold_is_found_with_both_its_edges()
    {
        var result = Scanning.Run(Filters, Coarse);
        var margin = result.Findings[^1];
        var index = result.Figures.IndexOf(margin.Figure);

        // C = 1/(ω²L): 2.533 µF and 1.407 µF lie between points.
        Assert.All(result.Points, p => Assert.True(p.Found!.Values[index] > 0));
        Assert.False(margin.HoldsThroughout);
        Assert.Equal([true, false, true, false], margin.Breaks.Select(b => b.HoldsBelow));
        Assert.All(margin.Breaks, found =>
        {
            var c = found.At[0];
            Assert.Equal(0.8, (Admittance(10e-3, 0.5, c) + Admittance(18e-3, 0.25, c)).Magnitude, 1e-7);
        });
        Assert.InRange(margin.Breaks[0].At[0], 1e-6, 1.407e-6);
        Assert.InRange(margin.Breaks[3].At[0], 2.533e-6, 2.8e-6);
        Assert.Equal(3, margin.Holding.Length);
        Assert.Equal(0, margin.LeftOver);
    }

    [Fact]
    public void The_higher_of_two_narrow_resonances_is_the_greatest()
    {
        // At its resonance the one branch carries 1 V/0.25 Ω = 4 A, the other hardly anything.
        var greatest = Scanning.Run(Filters, Coarse).Of("max of current through E").Greatest!;

        Assert.Equal(1 / (Math.Pow(double.Tau * 1e3, 2) * 18e-3), greatest.At[0], 1e-9);
        Assert.Equal(
            (Admittance(10e-3, 0.5, greatest.At[0]) + Admittance(18e-3, 0.25, greatest.At[0])).Magnitude,
            greatest.Value, 1e-7);
    }

    [Fact]
    public void The_summary_says_where_it_breaks_and_what_can_still_be_missed()
    {
        var result = Scanning.Run(Filters, Coarse);

        Assert.StartsWith("For Ct everything required and rated holds only from 1.000 µF to",
            ScanSummary.Verdict(result));
        Assert.EndsWith(
            "a break between them that bends more sharply, there and back, is not seen.",
            ScanSummary.Searched(result));
    }

    [Fact]
    public void A_map_that_holds_at_all_its_points_and_breaks_between_them_says_so()
    {
        // The greatest power is at Rb = Ri + Ra with the least Ra: 100/(4 · 1010) W = 24.75 mW.
        var result = Scanning.Run(
            """
            source    Feed at a : 10 V
            resistor  Ri from a to b : 1 kΩ
            resistor  Ra from b to c : 200 Ω
            resistor  Rb from c to ground : 300 Ω
            require power in Rb at most 24.74 mW
            until 1 ms
            """,
            ("--part", "Ra from 10 Ω to 400 Ω in 2 steps"), ("--part", "Rb from 700 Ω to 1.5 kΩ in 2 steps"));

        Assert.Equal(24.74e-3 - (100.0 / 4040), result.Findings[^1].Worst!.Value, 1e-12);
        Assert.StartsWith(
            "Everything required and rated holds at all 9 points of Ra from 10.00 Ω to 400.0 Ω over Rb from "
            + "700.0 Ω to 1.500 kΩ, but breaks between them.",
            ScanSummary.Verdict(result));
        Assert.Contains("within a field of the map", ScanSummary.Searched(result));
    }

    private static Complex Admittance(double l, double r, double c)
    {
        const double omega = double.Tau * 1e3;
        return 1 / new Complex(r, (omega * l) - (1 / (omega * c)));
    }
}
