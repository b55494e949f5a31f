using CircuitTransient.Tests.Syntax;
using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Text;

/// <summary>Values as they are written: number, space, unit (SI brochure 5.3.3), a zero before the
/// point.</summary>
public class EngineeringNumberTests
{
    private static readonly string[] Units = ["V", "Ω", "A²s", "V/s", "s", ""];

    [Theory]
    [InlineData(1284.4, "V", "1.284 kV")]
    [InlineData(212.4e-6, "s", "212.4 µs")]
    [InlineData(-0.5631, "A", "-563.1 mA")]
    [InlineData(0.0, "V", "0 V")]
    [InlineData(999.96, "V", "1.000 kV")]
    [InlineData(999.94, "V", "999.9 V")]
    [InlineData(1e-15, "F", "1.000 fF")]
    [InlineData(1e-16, "F", "100.0·10⁻¹⁸ F")]
    [InlineData(4.7e12, "Ω", "4.700 TΩ")]
    [InlineData(1e15, "V", "1.000·10¹⁵ V")]
    public void A_value_takes_the_prefix_that_leaves_one_to_three_digits(
        double value, string unit, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(value, unit));

    [Theory]
    [InlineData(71.9e3, "A²s", "71.90·10³ A²s")]
    [InlineData(63.6, "A²s", "63.60 A²s")]
    [InlineData(0.0123, "A²s", "0.01230 A²s")]
    [InlineData(0.00123, "A²s", "1.230·10⁻³ A²s")]
    [InlineData(1235.0, "%", "1235 %")]
    [InlineData(0.05, "%", "0.05000 %")]
    [InlineData(-12.5, "°", "-12.50 °")]
    [InlineData(1e7, "%", "10.00·10⁶ %")]
    [InlineData(0.98, "", "0.9800")]
    [InlineData(19700.0, "", "19.70·10³")]
    public void Some_units_never_take_a_prefix(double value, string unit, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(value, unit));

    [Theory]
    [InlineData(5e8, "500.0 V/µs")]
    [InlineData(7.12e9, "7.120 kV/µs")]
    [InlineData(4500.0, "4.500 V/ms")]
    [InlineData(45.0, "45.00 V/s")]
    public void A_rate_is_written_as_the_trade_writes_it(double value, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(value, "V/s"));

    [Theory]
    [InlineData(1, "1 kV")]
    [InlineData(2, "1.3 kV")]
    [InlineData(7, "1.284400 kV")]
    public void The_number_of_digits_may_be_chosen(int digits, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(1284.4, "V", digits));

    [Theory]
    [InlineData(double.NaN, "undetermined")]
    [InlineData(double.PositiveInfinity, "infinite")]
    [InlineData(double.NegativeInfinity, "-infinite")]
    public void What_is_no_number_is_said_in_words(double value, string text) =>
        Assert.Equal(text, EngineeringNumber.Format(value, "V"));

    [Fact]
    public void What_is_printed_reads_back_to_the_printed_digits() =>
        Gen.Select(
                Gen.Double[-1, 1].Where(m => Math.Abs(m) > 0.05), Gen.Int[-14, 13], Gen.Int[1, 15],
                Gen.Int[0, 5].Select(i => Units[i]))
            .OnEach(
                (mantissa, exponent, digits, unit) =>
                {
                    var value = mantissa * Math.Pow(10, exponent);
                    var read = Reading.Value(EngineeringNumber.Format(value, unit, digits));

                    // Half a unit of the last digit, at most 10^(1 - digits) of the value, and a rounding of
                    // the read.
                    var allowed = (0.5 * Math.Pow(10, 1 - digits)) + 4e-16;
                    return Math.Abs(read - value) <= allowed * Math.Abs(value);
                },
                iter: 2000, seed: "0000KJ2mYgS1");
}
