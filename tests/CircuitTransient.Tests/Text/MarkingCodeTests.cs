using CircuitTransient.Text;

namespace CircuitTransient.Tests.Text;

/// <summary>Marking codes of IEC 60062:2016, as quoted in secondary sources.</summary>
public class MarkingCodeTests
{
    [Theory]
    [InlineData("R47", 0.47)]
    [InlineData("R047", 0.047)]
    [InlineData("K47", 470.0)]
    [InlineData("k47", 470.0)]
    [InlineData("M47", 0.47e6)]
    [InlineData("4R7", 4.7)]
    [InlineData("470R", 470.0)]
    [InlineData("4K7", 4.7e3)]
    [InlineData("4k7", 4.7e3)]
    [InlineData("47K3", 47.3e3)]
    [InlineData("470K", 470e3)]
    [InlineData("4M7", 4.7e6)]
    [InlineData("2M2", 2.2e6)]
    [InlineData("4L7", 4.7e-3)]
    public void A_resistor_is_marked_in_ohms(string text, double ohms)
    {
        Assert.True(MarkingCode.TryRead(text, Dimension.Resistance, out var value));
        Assert.Equal(ohms, value);
    }

    // The letters m and F are from memory.
    [Theory]
    [InlineData("4n7", 4.7e-9)]
    [InlineData("1µ0", 1e-6)]
    [InlineData("10p", 10e-12)]
    [InlineData("47p", 47e-12)]
    [InlineData("3u3", 3.3e-6)]
    [InlineData("2m2", 2.2e-3)]
    [InlineData("1F5", 1.5)]
    [InlineData("n47", 0.47e-9)]
    [InlineData("p47", 0.47e-12)]
    [InlineData("µ47", 0.47e-6)]
    [InlineData("u47", 0.47e-6)]
    [InlineData("m47", 0.47e-3)]
    public void A_capacitor_is_marked_in_farads(string text, double farads)
    {
        Assert.True(MarkingCode.TryRead(text, Dimension.Capacitance, out var value));
        Assert.Equal(farads, value);
    }

    // Common practice, no source.
    [Theory]
    [InlineData("3u3", 3.3e-6)]
    [InlineData("3µ3", 3.3e-6)]
    [InlineData("22n", 22e-9)]
    public void An_inductor_is_marked_in_henries(string text, double henries)
    {
        Assert.True(MarkingCode.TryRead(text, Dimension.Inductance, out var value));
        Assert.Equal(henries, value);
    }

    [Theory]
    [InlineData("4n7")]
    [InlineData("47p")]
    [InlineData("2m2")]
    public void The_letter_of_a_capacitor_marks_no_resistor(string text) =>
        Assert.False(MarkingCode.TryRead(text, Dimension.Resistance, out _));

    [Theory]
    [InlineData("R")]
    [InlineData("47")]
    [InlineData("")]
    [InlineData("L47")]
    [InlineData("C1")]
    [InlineData("M2")]
    [InlineData("4.7k")]
    [InlineData("4k7k")]
    [InlineData("Rpre")]
    [InlineData("4x7")]
    public void A_name_or_number_is_no_marking_code(string text) =>
        Assert.False(MarkingCode.TryRead(text, out _));
}
