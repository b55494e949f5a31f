namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of tolerances.</summary>
public class ToleranceMessageTests
{
    [Theory]
    [InlineData(
        "resistor R10 from a to b : 82 Ω ±5",
        """
        a.cause:1:33: error: a tolerance is in per cent, or between two values
          resistor R10 from a to b : 82 Ω ±5
                                          ^^
          → write `±5 %`

        """)]
    [InlineData(
        "resistor R11 from a to b : 82 Ω ±5 Ω",
        """
        a.cause:1:33: error: a tolerance is in per cent, or between two values
          resistor R11 from a to b : 82 Ω ±5 Ω
                                          ^^^^
          → write `between LEAST and GREATEST`

        """)]
    [InlineData(
        "resistor R12 from a to b : 82 Ω ±Ω",
        """
        a.cause:1:34: error: `Ω` stands where a number and `%` should
          resistor R12 from a to b : 82 Ω ±Ω
                                           ^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    [InlineData(
        "resistor R13 from a to b : 82 Ω, rated 3 W ±5 %",
        """
        a.cause:1:44: error: a rating has no tolerance
          resistor R13 from a to b : 82 Ω, rated 3 W ±5 %
                                                     ^^^^
          → leave the tolerance out

        """)]
    [InlineData(
        "capacitor C1 from a to b : 82 nF, linear up to 3 V ±5 %",
        """
        a.cause:1:52: error: a limit has no tolerance
          capacitor C1 from a to b : 82 nF, linear up to 3 V ±5 %
                                                             ^^^^
          → leave the tolerance out

        """)]
    [InlineData(
        "source S1 from a to b : sine of 325 V ±5 % at 50 Hz",
        """
        a.cause:1:39: error: a tolerance may not stand inside a wave
          source S1 from a to b : sine of 325 V ±5 % at 50 Hz
                                                ^^^^
          → name the value: `value Peak : 325 V ±5 %`, and write `Peak` in the wave

        """)]
    [InlineData(
        "source S1 from a to b : 5 V + step of 3 V at 1 ms ±5 %",
        """
        a.cause:1:51: error: only a constant source has a tolerance behind its value
          source S1 from a to b : 5 V + step of 3 V at 1 ms ±5 %
                                                            ^^^^
          → name the value: `value Peak : 325 V ±5 %`, and write `Peak` in the wave

        """)]
    [InlineData(
        "dependent source A from a to b : 10 ±1 % times voltage of c",
        """
        a.cause:1:37: error: the factor of a dependent source has no tolerance of its own
          dependent source A from a to b : 10 ±1 % times voltage of c
                                              ^^^^
          → name the factor: `value Gain : 10 ±2 %`, and write `Gain times …`

        """)]
    [InlineData(
        "transformer T1 primary at p, secondary at s : turns 10 to 1 ±1 %",
        """
        a.cause:1:61: error: a number of turns has no tolerance of its own
          transformer T1 primary at p, secondary at s : turns 10 to 1 ±1 %
                                                                      ^^^^
          → name it: `value Turns : 10 ±1 %`

        """)]
    [InlineData(
        "require voltage of bus at most 3 V ± 2 %",
        """
        a.cause:1:36: error: a bound has no tolerance
          require voltage of bus at most 3 V ± 2 %
                                             ^^^^^
          → state the bound that counts

        """)]
    [InlineData(
        "resistor R14 from a to b : 82 Ω between 80 Ω to 90 Ω",
        """
        a.cause:1:46: error: `to` stands where `and` should
          resistor R14 from a to b : 82 Ω between 80 Ω to 90 Ω
                                                       ^^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    public void A_tolerance_is_in_per_cent_and_where_it_may_stand(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
