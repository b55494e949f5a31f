using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Syntax;

/// <summary>Numbers with their units as read.</summary>
public class NumberTests
{
    // The expected double is what the compiler makes of the decimal literal: the nearest one.
    [Theory]
    [InlineData("22 \u00B5F", 22e-6)]
    [InlineData("22uF", 22e-6)]
    [InlineData("22 \u03BCF", 22e-6)]
    [InlineData("0.3 µF", 0.3e-6)]
    [InlineData("5.6 mF", 5.6e-3)]
    [InlineData("1e-3 nF", 1e-12)]
    [InlineData("1.1 pF", 1.1e-12)]
    [InlineData("7 fF", 7e-15)]
    public void A_capacitance_is_the_double_nearest_to_what_is_written(string text, double farads)
    {
        var number = Reading.Number(text);

        Assert.Equal((farads, Dimension.Capacitance, true), (number.Value, number.Dimension, number.HasUnit));
    }

    [Theory]
    [InlineData("4.7 k\u03A9", 4.7e3)]
    [InlineData("4.7 k\u2126", 4.7e3)]
    [InlineData("4.7kOhm", 4.7e3)]
    [InlineData("4.7 kohm", 4.7e3)]
    [InlineData("4.7\u00A0kΩ", 4.7e3)]
    [InlineData("4.7\u202FkΩ", 4.7e3)]
    [InlineData("12 mΩ", 12e-3)]
    [InlineData("1.5 MΩ", 1.5e6)]
    [InlineData("3 GΩ", 3e9)]
    [InlineData("2 TΩ", 2e12)]
    [InlineData(".5 Ω", 0.5)]
    [InlineData("1E3 Ω", 1e3)]
    [InlineData("1e\u22123 Ω", 1e-3)]
    public void A_resistance_is_read_in_every_spelling(string text, double ohms)
    {
        var number = Reading.Number(text);

        Assert.Equal((ohms, Dimension.Resistance), (number.Value, number.Dimension));
    }

    [Theory]
    [InlineData("540 V", 540.0, "V")]
    [InlineData("3 mA", 3e-3, "A")]
    [InlineData("2.6 kJ", 2.6e3, "J")]
    [InlineData("7.64 kW", 7.64e3, "W")]
    [InlineData("45 µC", 45e-6, "C")]
    [InlineData("3 mWb", 3e-3, "Wb")]
    [InlineData("3 mVs", 3e-3, "Wb")]
    [InlineData("20 mS", 20e-3, "S")]
    [InlineData("50 Hz", 50.0, "Hz")]
    [InlineData("1.4 MHz", 1.4e6, "Hz")]
    [InlineData("180 µH", 180e-6, "H")]
    [InlineData("500 V/µs", 500e6, "V/s")]
    [InlineData("2 kA/ms", 2e6, "A/s")]
    [InlineData("3 V/s", 3.0, "V/s")]
    [InlineData("40 A²s", 40.0, "A²s")]
    [InlineData("40A^2s", 40.0, "A²s")]
    [InlineData("71.9·10³ A²s", 71.9e3, "A²s")]
    [InlineData("71.9·10^3 A^2s", 71.9e3, "A²s")]
    [InlineData("71.9×10³ A²s", 71.9e3, "A²s")]
    [InlineData("12·10⁻³ A²s", 12e-3, "A²s")]
    [InlineData("12·10^-3 A²s", 12e-3, "A²s")]
    [InlineData("10³ A²s", 1e3, "A²s")]
    [InlineData("1.5 min", 90.0, "s")]
    [InlineData("0.1 h", 360.0, "s")]
    [InlineData("1.8 s", 1.8, "s")]
    [InlineData("5 %", 0.05, "")]
    [InlineData("0.1%", 0.001, "")]
    [InlineData("2 rad", 2.0, "")]
    public void Every_unit_is_read_with_its_dimension(string text, double value, string unit)
    {
        var number = Reading.Number(text);

        Assert.Equal((value, unit, true), (number.Value, Unit.SymbolOf(number.Dimension), number.HasUnit));
    }

    // The third: 254.54·π/180 with 40 digits (mpmath 1.3.0).
    [Theory]
    [InlineData("60 deg", Math.PI / 3)]
    [InlineData("90°", Math.PI / 2)]
    [InlineData("254.54 °", 4.442561078026366)]
    public void An_angle_becomes_radians(string text, double radians) =>
        Assert.Equal(radians, Reading.Number(text).Value, 1e-12);

    [Fact]
    public void A_prefix_without_a_unit_scales_and_leaves_the_unit_missing()
    {
        var number = Reading.Number("4.7 k");

        Assert.Equal((4.7e3, false, null), (number.Value, number.HasUnit, number.Mark));
    }

    [Theory]
    [InlineData("4k7", 4.7e3)]
    [InlineData("2M2", 2.2e6)]
    [InlineData("4n7", 4.7e-9)]
    [InlineData("3µ3", 3.3e-6)]
    [InlineData("82k", 82e3)]
    public void A_marking_code_is_kept_with_its_text(string text, double value)
    {
        var number = Reading.Number(text);

        Assert.Equal((value, false, text), (number.Value, number.HasUnit, number.Mark));
    }

    [Fact]
    public void A_minus_sign_from_print_is_a_minus_sign() =>
        Assert.Equal("(-5V)", Reading.Show(Reading.Expression("\u22125 V")));

    [Fact]
    public void A_unit_binds_tighter_than_a_power() =>
        Assert.Equal("(5V ^ 2?)", Reading.Show(Reading.Expression("5 V^2")));

    [Fact]
    public void Every_prefix_gives_the_nearest_double() =>
        Gen.Select(Gen.Double[0.001, 1000], Gen.Int[0, 9]).OnEach(
            (mantissa, index) =>
            {
                var (prefix, exponent) = ("fpnµm kMGT"[index].ToString().Trim(), (3 * index) - 15);
                var nearest = double.Parse($"{mantissa:F9}e{exponent}");
                return Reading.Number($"{mantissa:F9} {prefix}V").Value == nearest;
            },
            iter: 2000, seed: "0000KJ2mYgS1");

    [Fact]
    public void A_number_of_more_than_a_thousand_characters_is_refused()
    {
        Assert.Equal(1.0, Reading.Number("1." + new string('0', 998)).Value);
        Assert.StartsWith("a.cause:1:11: error: the number has more than 1000 characters\n",
            Reading.Messages("value x : 1." + new string('0', 999)));
    }
}
