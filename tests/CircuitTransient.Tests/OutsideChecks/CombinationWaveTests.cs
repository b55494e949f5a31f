namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>The combination-wave generator of IEC 61000-4-5: a charged capacitor, two resistors and a coil
/// before the output, open and shorted.</summary>
/// <remarks>Structure and open-circuit transform: quoted (V2), after a paper by Carobbi (2013) and a tutorial
/// by Hesterman; the element values are from memory, the standard fixes none. All figures: computed
/// (C).</remarks>
public sealed class CombinationWaveTests
{
    private const string SetP = """
        capacitor Cc from top to ground : 5.93 µF, charged to 1 kV
        resistor Rs1 from front to ground : 20.2 Ω
        resistor Rm from front to mid : 0.814 Ω
        inductor Lr from mid to out : 10.9 µH
        resistor Rs2 from out to ground : 26.1 Ω
        """;

    private const string SetH = """
        capacitor Cc from top to ground : 6.038 µF, charged to 1 kV
        resistor Rs1 from front to ground : 25.105 Ω
        resistor Rm from front to mid : 0.941 Ω
        inductor Lr from mid to out : 10.37 µH
        resistor Rs2 from out to ground : 19.80 Ω
        """;

    private const string Voltage = "voltage of out";
    private const string Current = "current through Load";

    [Fact]
    public void Open_set_P_has_its_crest() => Crest(Open(SetP), Voltage, 942.87361021, 2.093176e-6);

    [Fact]
    public void Open_set_H_has_its_crest() => Crest(Open(SetH), Voltage, 924.24543392, 2.484612e-6);

    [Fact]
    public void Shorted_set_P_has_its_crest() => Crest(Shorted(SetP), Current, 471.122935736, 10.32226e-6);

    [Fact]
    public void Shorted_set_H_has_its_crest() => Crest(Shorted(SetH), Current, 462.087748546, 9.92772e-6);

    [Fact]
    public void Open_set_P_passes_through_its_values() =>
        Values(Open(SetP), Voltage, 880.50980005773, 844.76099558761, 470.12675657188);

    [Fact]
    public void Open_set_H_passes_through_its_values() =>
        Values(Open(SetH), Voltage, 819.82833873791, 834.07407227812, 464.37161840981);

    [Fact]
    public void Shorted_set_P_passes_through_its_values() =>
        Values(Shorted(SetP), Current, 87.801852724, 470.72572950, -27.385567692);

    [Fact]
    public void Shorted_set_H_passes_through_its_values() =>
        Values(Shorted(SetH), Current, 91.633835011, 462.06779501, -22.658123490);

    [Fact]
    public void Open_set_P_has_its_two_real_poles() =>
        RealPoles(Open(SetP), -14651.284718424, -2462871.2482023);

    [Fact]
    public void Open_set_H_has_its_two_real_poles() =>
        RealPoles(Open(SetH), -14640.927081468, -1992052.5076913);

    [Fact]
    public void Shorted_set_P_has_its_pole_pair() =>
        PolePair(Shorted(SetP), -41513.560038337, 119879.41999934);

    [Fact]
    public void Shorted_set_H_has_its_pole_pair() =>
        PolePair(Shorted(SetH), -48669.764638077, 119166.8432842);

    [Fact]
    public void Open_set_P_is_the_difference_of_two_equal_terms() => Residue(Open(SetP), 978.05566842802);

    [Fact]
    public void Open_set_H_is_the_difference_of_two_equal_terms() => Residue(Open(SetH), 965.5824433413);

    [Fact]
    public void Shorted_set_P_is_one_damped_sine() => SineAmplitude(Shorted(SetP), 765.29498780);

    [Fact]
    public void Shorted_set_H_is_one_damped_sine() => SineAmplitude(Shorted(SetH), 809.21851055);

    [Fact]
    public void Set_P_breaks_the_undershoot_limit_of_30_percent()
    {
        var wave = Shorted(SetP)[Current];
        Close.To(0.33691802272201, -wave.Min.Value!.Value / wave.Max.Value!.Value);
    }

    [Fact]
    public void Set_H_keeps_the_undershoot_limit_of_30_percent()
    {
        var wave = Shorted(SetH)[Current];
        Close.To(0.277182305432715, -wave.Min.Value!.Value / wave.Max.Value!.Value);
    }

    [Theory]
    [InlineData(SetP, 2.00133243086)]
    [InlineData(SetH, 2.00015134966781)]
    public void The_ratio_of_the_crests_is_near_2_ohms(string set, double ratio) =>
        Close.To(ratio, Open(set).Max(Voltage) / Shorted(set).Max(Current));

    [Fact]
    public void The_initial_charge_is_the_only_cause_of_the_crest()
    {
        var wave = Open(SetP)[Voltage];
        var cause = Assert.Single(wave.Contributions);
        Assert.Equal("Cc initial charge", cause.Cause);
        Close.To(wave.Max.Value!.Value, cause.AtMax!.Value, 1e-14);
    }

    private static SolvedText Open(string set) => SolvedText.Of(
        $"""
        {set}
        switch Sw from top to front : open, closes at 0 s
        observe {Voltage}
        until 60 µs
        """,
        1e-6, 10e-6, 50e-6);

    private static SolvedText Shorted(string set) => SolvedText.Of(
        $"""
        {set}
        switch Sw from top to front : open, closes at 0 s
        switch Load from out to ground : closed
        observe {Current}
        until 60 µs
        """,
        1e-6, 10e-6, 50e-6);

    private static void Crest(SolvedText solved, string name, double value, double time)
    {
        Close.To(value, solved.Max(name));
        Close.To(time, solved[name].Max.Time, Close.Instant);
    }

    private static void Values(SolvedText solved, string name, params double[] values)
    {
        for (var i = 0; i < values.Length; i++)
        {
            Close.To(values[i], solved.Sample(name, i));
        }
    }

    private static void RealPoles(SolvedText solved, double slow, double fast)
    {
        var poles = solved.Poles();
        Assert.Equal(2, poles.Length);
        Assert.All(poles, p => Assert.Equal((0, 1), (p.Im, p.Multiplicity)));
        Close.To(slow, poles[0].Re);
        Close.To(fast, poles[1].Re);
    }

    private static void PolePair(SolvedText solved, double real, double imaginary)
    {
        var pole = Assert.Single(solved.Poles());
        Close.To(real, pole.Re);
        Close.To(imaginary, pole.Im);
    }

    private static void Residue(SolvedText solved, double residue)
    {
        var poles = solved.Poles();
        foreach (var sample in solved[Voltage].Samples)
        {
            var shape = Math.Exp(poles[0].Re * sample.Time) - Math.Exp(poles[1].Re * sample.Time);
            Close.To(residue, sample.Value!.Value / shape);
        }
    }

    private static void SineAmplitude(SolvedText solved, double amplitude)
    {
        var pole = solved.Poles()[0];
        foreach (var sample in solved[Current].Samples)
        {
            var shape = Math.Exp(pole.Re * sample.Time) * Math.Sin(pole.Im * sample.Time);
            Close.To(amplitude, sample.Value!.Value / shape);
        }
    }
}
