namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>One capacitor discharged through one resistor.</summary>
/// <remarks>A resistor maker's sheet, quoted (V2): 195 µF from 1500 V to 320 V through 50 Ω takes
/// 0.015062769 s; time constant 0.00975 s, 45 000 W, 219.375 J. Further digits: computed (C).</remarks>
public sealed class CapacitorDischargeTests
{
    private const string Through50Ohms = """
        capacitor C from a to ground : 195 µF, charged to 1500 V
        resistor R from a to ground : 50 Ω
        observe voltage of a
        observe energy in C
        observe time after which voltage of a stays below 320 V
        until 1 s
        """;

    [Fact]
    public void It_reaches_320_V_when_the_sheet_says() =>
        Close.To(320, SolvedText.Of(Through50Ohms, 0.0150627690651).Sample("voltage of a", 0));

    [Fact]
    public void Its_time_constant_is_the_sheets() =>
        Close.To(-1 / 0.00975, Assert.Single(SolvedText.Of(Through50Ohms).Poles()).Re);

    [Fact]
    public void The_resistor_takes_the_sheets_power_and_energy()
    {
        var solved = SolvedText.Of(Through50Ohms);
        var resistor = solved.Result.Parts.Single(p => p.Name == "R");
        Close.To(45000, resistor.PeakPower!.Value!.Value);
        Close.To(219.375, resistor.Energy!.Value);
        Close.To(219.375, solved.Max("energy in C"));
    }

    [Fact]
    public void The_computed_resistance_takes_20_seconds() =>
        Close.To(320, SolvedText.Of(
            """
            capacitor C from a to ground : 195 µF, charged to 1500 V
            resistor R from a to ground : 66388.8555733 Ω
            observe voltage of a
            until 30 s
            """,
            20).Sample("voltage of a", 0));
}
