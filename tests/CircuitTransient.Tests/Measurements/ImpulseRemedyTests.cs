using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements;

/// <summary>Every impulsive event says which real part would make it finite, and of what order that
/// is.</summary>
public sealed class ImpulseRemedyTests
{
    [Theory]
    [InlineData("S", "milliohms for a power contact", """
        capacitor C1 at a : 1 µF, charged to 10 V
        capacitor C2 at b : 1 µF
        switch S from a to b : open, closes at 1 ms
        resistor R at b : 1 kΩ
        """)]
    [InlineData("L", "tens to hundreds of picofarads", """
        source Feed at a : 10 V
        resistor R from a to b : 1 Ω
        inductor L from b to c : 1 mH
        switch S at c : closed, opens at 5 ms
        """)]
    [InlineData("S", "tens of picofarads", """
        source Feed at a : 10 V
        resistor R from a to b : 1 Ω
        inductor L from b to c : 1 mH
        switch S at c : closed, opens at 5 ms
        """)]
    [InlineData("Feed", "milliohms to an ohm", """
        source Feed at a : step of 10 V at 1 ms
        capacitor C at a : 1 µF
        """)]
    [InlineData("Amp", "milliohms to an ohm", """
        source Feed at a : step of 10 V at 1 ms
        resistor R at a : 1 kΩ
        dependent source Amp at b : 2 times voltage of a
        capacitor C at b : 1 µF
        """)]
    [InlineData("I", "tens of picofarads", """
        source I from ground to a : step of 2 A at 1 ms
        inductor L at a : 1 mH
        """)]
    [InlineData("C1", "milliohms for a film", """
        capacitor C1 at a : 1 µF, charged to 10 V
        capacitor C2 at a : 1 µF
        resistor R at a : 1 kΩ
        """)]
    public void The_part_that_is_too_ideal_is_told_its_real_value(string part, string order, string text)
    {
        var solved = SolvedText.Of(text + "\nobserve voltage of a\nuntil 10 ms");
        var impulse = solved.Result.Intervals.SelectMany(i => i.Impulses).First(i => i.Part == part);
        Assert.Contains(order, impulse.Remedy, StringComparison.Ordinal);
    }
}
