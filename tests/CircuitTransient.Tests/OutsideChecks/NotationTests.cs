using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Values as the trade writes them, read into a circuit and written back.</summary>
public sealed class NotationTests
{
    // IEC 60062:2016: the letter takes the place of the decimal mark; quoted (V2). m and F: from memory.
    [Theory]
    [InlineData("R47", 0.47)]
    [InlineData("4R7", 4.7)]
    [InlineData("470R", 470)]
    [InlineData("4K7", 4.7e3)]
    [InlineData("47K3", 47.3e3)]
    [InlineData("470K", 470e3)]
    [InlineData("4M7", 4.7e6)]
    public void A_resistor_is_marked_by_its_code(string code, double ohms) =>
        Close.To(ohms, Part<Resistor>($"resistor X from a to ground : {code}").Resistance.Nominal, 1e-15);

    [Theory]
    [InlineData("4n7", 4.7e-9)]
    [InlineData("1µ0", 1e-6)]
    [InlineData("10p", 10e-12)]
    public void A_capacitor_is_marked_by_its_code(string code, double farads)
    {
        var capacitor = Part<Capacitor>($"capacitor X from a to ground : {code}");
        Close.To(farads, capacitor.Capacitance.Nominal, 1e-15);
    }

    // SI brochure, 5.3.3 (V1): number, space, unit; case tells k from K and m from M.
    [Theory]
    [InlineData(10e3, "Ω", "10.00 kΩ")]
    [InlineData(2.2e-6, "F", "2.200 µF")]
    [InlineData(4.7e6, "Ω", "4.700 MΩ")]
    [InlineData(0.47, "V", "470.0 mV")]
    public void A_value_is_written_as_number_space_prefix_and_unit(double value, string unit, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(value, unit));

    [Theory]
    [InlineData(10e3, "Ω")]
    [InlineData(2.2e-6, "F")]
    [InlineData(33e-12, "H")]
    [InlineData(325.3, "V")]
    public void What_is_written_is_read_back(double value, string unit)
    {
        var written = EngineeringNumber.Format(value, unit);
        var read = unit switch
        {
            "Ω" => Part<Resistor>($"resistor X from a to ground : {written}").Resistance,
            "F" => Part<Capacitor>($"capacitor X from a to ground : {written}").Capacitance,
            "H" => Part<Inductor>($"inductor X from a to ground : {written}").Inductance,
            _ => Part<Capacitor>($"capacitor X from a to ground : 1 F, charged to {written}").InitialVoltage!,
        };
        Close.To(value, read.Nominal, 1e-15);
    }

    // 22nd CGPM (2003), Resolution 10 (V1): point or comma may mark the decimal, so that "1,200" has two
    // readings.
    [Theory]
    [InlineData("1,200 Ω")]
    [InlineData("4,7 kΩ")]
    public void A_comma_within_a_number_is_refused(string value)
    {
        var outcome = TransientAnalysis.Check(Text($"resistor X from a to ground : {value}"), NoFile);
        Assert.False(outcome.Succeeded);
    }

    private static T Part<T>(string statement)
        where T : Part
    {
        var outcome = TransientAnalysis.Check(Text(statement), NoFile);
        return Assert.IsType<T>(outcome.Value!.Parts.Single(p => p.Name == "X"));
    }

    private static SourceText Text(string statement) =>
        new("check.cause", statement + "\nresistor Load from a to ground : 1 Ω\nuntil 1 s\n");

    private static Outcome<SourceText> NoFile(string path) => throw new InvalidOperationException(path);
}
