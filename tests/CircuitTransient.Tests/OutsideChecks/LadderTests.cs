namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Long ladders of equal sections against the Bessel functions of the infinite ones.</summary>
/// <remarks>Gradshteyn and Ryzhik, 8th ed., transforms 103–105 (V1): s-domain forms of J_ν; the values agree
/// with the tables of AMS 55, chapter 9 (V1: contents), and were computed (C).</remarks>
public sealed class LadderTests
{
    /// <summary>J0 … J4 at 2ωt.</summary>
    public static TheoryData<double, double[]> BesselJ => new()
    {
        { 1, [0.2238907791412357, 0.5767248077568734, 0.3528340286156377, 0.1289432494744021,
            0.03399571980756843] },
        { 2, [-0.3971498098638474, -0.06604332802354914, 0.3641281458520728, 0.4301714738756219,
            0.2811290649613601] },
        { 3, [0.1506452572509969, -0.2766838581275656, -0.2428732099601855, 0.1147683848207753,
            0.3576415947809608] },
        { 5, [-0.2459357644513483, 0.04347274616886144, 0.2546303136851206, 0.05837937930518681,
            -0.2196026861020085] },
    };

    /// <summary>2n ∫₀^(2ωt) J_2n(x)/x dx for n = 1, 2, 5.</summary>
    public static TheoryData<double, double[]> FrontOfAStep => new()
    {
        { 1, [0.4232751922431266, 0.03644544381992046, 2.554255679153226e-7] },
        { 2, [1.033021664011775, 0.3877644531983417, 2.078617279123604e-4] },
        { 5, [0.9913054507662277, 0.9562778231831156, 0.3616038331336211] },
        { 10, [0.993316687582415, 1.02298710595055, 0.9637435711805738] },
    };

    /// <summary>e^(−2x) I_n(2x) for n = 0 … 3.</summary>
    public static TheoryData<double, double[]> BesselI => new()
    {
        { 0.5, [0.46575960759364, 0.20791041534970845, 0.049938776894223539, 0.0081553077728142938] },
        { 1, [0.30850832255367104, 0.21526928924893766, 0.09323903330473338, 0.028791222639470898] },
        { 2, [0.2070019212239867, 0.17875083950243533, 0.11762650147276903, 0.061124338029666293] },
        { 5, [0.12783333716342861, 0.12126268138445552, 0.1035808008865375, 0.079830361029840517] },
    };

    [Fact]
    public void A_charge_in_the_middle_of_33_nodes_spreads_as_the_Bessel_functions()
    {
        var solved = SolvedText.Of(
            $"""
            {LadderText.Nodes(33, ("inductor", "1 H"), "1 F", charged: 17)}
            observe voltage of n[17]
            observe current through J[17]
            observe voltage of n[18]
            observe voltage of n[16]
            observe current through J[18]
            observe voltage of n[19]
            until 6 s
            """,
            1, 2, 3, 5);
        foreach (var (i, row) in BesselJ.Select(r => r.Data.Item2).Index())
        {
            Close.Within(1e-12, row[0], solved.Sample("voltage of n[17]", i));
            Close.Within(1e-12, row[1], solved.Sample("current through J[17]", i));
            Close.Within(1e-12, row[2], solved.Sample("voltage of n[18]", i));
            Close.Within(1e-12, row[2], solved.Sample("voltage of n[16]", i));
            Close.Within(1e-12, row[3], solved.Sample("current through J[18]", i));
            Close.Within(1e-12, row[4], solved.Sample("voltage of n[19]", i));
        }
    }

    [Fact]
    public void A_charge_in_the_middle_of_75_nodes_spreads_as_the_Bessel_functions()
    {
        var solved = SolvedText.Of(
            $"""
            {LadderText.Nodes(75, ("inductor", "1 H"), "1 F", charged: 38)}
            observe voltage of n[38]
            observe current through J[38]
            observe voltage of n[39]
            observe voltage of n[40]
            until 6 s
            """,
            1, 2, 3, 5);
        foreach (var (i, row) in BesselJ.Select(r => r.Data.Item2).Index())
        {
            Close.Within(Close.Computed, row[0], solved.Sample("voltage of n[38]", i));
            Close.Within(Close.Computed, row[1], solved.Sample("current through J[38]", i));
            Close.Within(Close.Computed, row[2], solved.Sample("voltage of n[39]", i));
            Close.Within(Close.Computed, row[4], solved.Sample("voltage of n[40]", i));
        }
    }

    [Theory]
    [InlineData(40)]
    [InlineData(75)] // 150 stored quantities
    public void A_step_runs_along_a_ladder_as_the_integrals_of_Bessel_functions(int sections)
    {
        var solved = SolvedText.Of(
            $"""
            {LadderText.FedByAStep(sections, ("inductor", "1 H"), "1 F")}
            observe voltage of n[1]
            observe voltage of n[2]
            observe voltage of n[5]
            until 12 s
            """,
            1, 2, 5, 10);
        foreach (var (i, row) in FrontOfAStep.Select(r => r.Data.Item2).Index())
        {
            Close.Within(Close.Computed, row[0], solved.Sample("voltage of n[1]", i));
            Close.Within(Close.Computed, row[1], solved.Sample("voltage of n[2]", i));
            Close.Within(Close.Computed, row[2], solved.Sample("voltage of n[5]", i));
        }
    }

    [Fact]
    public void A_ladder_overshoots_its_front_by_more_from_node_to_node()
    {
        var solved = SolvedText.Of(
            $"""
            {LadderText.FedByAStep(40, ("inductor", "1 H"), "1 F")}
            observe voltage of n[1]
            observe voltage of n[2]
            observe voltage of n[5]
            observe voltage of n[10]
            observe voltage of n[20]
            until 25 s
            """);
        Close.To(1.1322794874, solved.Max("voltage of n[1]"));
        Close.To(2.56781115, solved["voltage of n[1]"].Max.Time, Close.Instant);
        Close.To(1.17094072495, solved.Max("voltage of n[2]"));
        Close.To(1.21141208887, solved.Max("voltage of n[5]"));
        Close.To(1.23267208668, solved.Max("voltage of n[10]"));
        Close.To(1.24726291287, solved.Max("voltage of n[20]"));
    }

    [Theory]
    [InlineData(61)]
    [InlineData(149)]
    public void A_charge_on_a_resistive_ladder_spreads_as_the_modified_Bessel_functions(int nodes)
    {
        var middle = (nodes + 1) / 2;
        var solved = SolvedText.Of(
            $"""
            {LadderText.Nodes(nodes, ("resistor", "1 kΩ"), "1 µF", charged: middle)}
            observe voltage of n[{middle}]
            observe voltage of n[{middle + 1}]
            observe voltage of n[{middle - 2}]
            observe voltage of n[{middle + 3}]
            until 6 ms
            """,
            0.5e-3, 1e-3, 2e-3, 5e-3);
        foreach (var (i, row) in BesselI.Select(r => r.Data.Item2).Index())
        {
            Close.Within(Close.Computed, row[0], solved.Sample($"voltage of n[{middle}]", i));
            Close.Within(Close.Computed, row[1], solved.Sample($"voltage of n[{middle + 1}]", i));
            Close.Within(Close.Computed, row[2], solved.Sample($"voltage of n[{middle - 2}]", i));
            Close.Within(Close.Computed, row[3], solved.Sample($"voltage of n[{middle + 3}]", i));
        }
    }
}
