namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Lines of resistance and capacitance in equal sections, and a published stiff test that is
/// one.</summary>
public sealed class ResistiveLineTests
{
    // Delays of the last of n sections, in units of total R times total C: computed (C). The mean delay
    // (n + 1)/(2n): limit RC/2 quoted (V2).
    [Theory]
    [InlineData(1, 0.69314718, 2.30258509)]
    [InlineData(3, 0.50030561, 1.40347152)]
    [InlineData(10, 0.41624849, 1.13682626)]
    [InlineData(30, 0.39133177, 1.06576560)]
    [InlineData(100, 0.38253163, 1.04144218)]
    public void The_last_section_reaches_half_and_nine_tenths_in_time(int sections, double half, double most)
    {
        var solved = SolvedText.Of(
            $"""
            {LadderText.FedByAStep(sections, ("resistor", $"1 Ω / {sections}"), $"1 F / {sections}")}
            observe voltage of n[{sections}]
            until 3 s
            """,
            half, most);
        const double eightDigits = 2e-8; // the instants are given with eight decimals, the slope is near 1
        Close.Within(eightDigits, 0.5, solved.Sample($"voltage of n[{sections}]", 0));
        Close.Within(eightDigits, 0.9, solved.Sample($"voltage of n[{sections}]", 1));
        Close.To((sections + 1) / (2.0 * sections), solved.Poles().Sum(p => -1 / p.Re));
    }

    // STIFF DETEST A2: Enright, Hull and Lindberg, BIT 15 (1975) 10–48; its equations seen in public code
    // (V1: akroshko/odetojava at 12150e89), start and end from memory; values computed (C).
    private static readonly (double Time, double[] Values)[] Stiff =
    [
        (0.01, [2.5195263001898e-19, 7.1590158982325e-19, 5.2080035787956e-16, 3.2545686930041e-13,
            1.6983000400133e-10, 7.106548407697e-8, 2.2369837724245e-5, 0.0047151855402551,
            0.50223429327438]),
        (1, [1.076256702877e-5, 2.1591923280462e-5, 1.5293330371067e-4, 9.9063342245362e-4,
            0.005501145408065, 0.025567002989908, 0.09658117282932, 0.28631824950245, 0.64311734275629]),
        (10, [0.039671490865897, 0.079349233997973, 0.13028065708858, 0.19737384834051, 0.28435293115599,
            0.39321824706257, 0.5237534679529, 0.67325262807861, 0.83662284604455]),
        (120, [0.099999125529383, 0.1999982511574, 0.29999755431852, 0.39999710575209, 0.49999695099416,
            0.59999710575492, 0.6999975543239, 0.79999825116477, 0.899999125538]),
    ];

    private static readonly double[] StiffPoles =
    [
        -0.1015146278871955, -0.4292885428863981, -0.9998680009467149, -1.757357582938296,
        -2.578778197153869, -3.312957691366919, -3.819442991202326, -1800.500417052845, -2000.500375312774,
    ];

    [Fact]
    public void The_stiff_test_A2_is_a_ladder_and_is_met()
    {
        var solved = StiffLadder();
        foreach (var (i, (_, values)) in Stiff.Index())
        {
            for (var k = 0; k < values.Length; k++)
            {
                Close.Within(1e-10, values[k], solved.Sample($"voltage of n{k + 1}", i));
            }
        }
    }

    [Fact]
    public void The_stiff_test_A2_has_its_eigenvalues()
    {
        foreach (var (expected, pole) in StiffPoles.Zip(StiffLadder().Poles()))
        {
            Close.To(expected, pole.Re, 1e-13); // sixteen digits given
        }
    }

    private static SolvedText StiffLadder()
    {
        var resistors = Enumerable.Range(1, 9)
            .Select(k => $"resistor R{k} from n{k} to {(k == 1 ? "ground" : $"n{k - 1}")} : 1 Ω");
        var capacitors = Enumerable.Range(1, 9).Select(k =>
            $"capacitor C{k} from n{k} to ground : {(k == 1 ? "1 F / 900" : k == 9 ? "1 mF" : "1 F")}");
        var observed = Enumerable.Range(1, 9).Select(k => $"observe voltage of n{k}");
        return SolvedText.Of(
            $"""
            source E at s : step of 1 V
            resistor R10 from s to n9 : 1 Ω
            {string.Join('\n', [.. resistors, .. capacitors, .. observed])}
            until 130 s
            """,
            [.. Stiff.Select(s => s.Time)]);
    }
}
