namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of waves.</summary>
public class WaveMessageTests
{
    [Theory]
    [InlineData(
        "source S2 from a to b : stp of 325 V",
        """
        a.cause:1:25: error: `stp` stands where the value of the source should
          source S2 from a to b : stp of 325 V
                                  ^^^
          → did you mean `step`?

        """)]
    [InlineData(
        "source S3 from a to b : sine of 325 V at 50 Hz phase 30° phase 3",
        """
        a.cause:1:58: error: `phase` is said twice
          source S3 from a to b : sine of 325 V at 50 Hz phase 30° phase 3
                                                                   ^^^^^
          → leave one of them out

        """)]
    [InlineData(
        "source S4 from a to b : 5 V at 3 ms",
        """
        a.cause:1:25: error: `5 V` is a constant; it does not start at an instant
          source S4 from a to b : 5 V at 3 ms
                                  ^^^
          → write `step of 5 V at …`, and a sum inside a wave in parentheses

        """)]
    [InlineData(
        "source S5 from a to b : step 8 A at 400 ms",
        """
        a.cause:1:30: error: `8` stands where `of` and the rest of the wave should
          source S5 from a to b : step 8 A at 400 ms
                                       ^
          → write `step of 8 A at 400 ms`

        """)]
    [InlineData(
        "source S6 from a to b : square of 8 A",
        """
        a.cause:1:25: error: `square` stands where the value of the source should
          source S6 from a to b : square of 8 A
                                  ^^^^^^
          → one pulse: `rectangular pulse of 24 V from 1 ms to 3 ms`; several: `pulse train of …`

        """)]
    [InlineData(
        "source S6 from a to b : pulse of 5 V from 1 ms to 2 ms",
        """
        a.cause:1:25: error: `pulse` stands where the value of the source should
          source S6 from a to b : pulse of 5 V from 1 ms to 2 ms
                                  ^^^^^
          → one pulse: `rectangular pulse of 24 V from 1 ms to 3 ms`; several: `pulse train of …`

        """)]
    [InlineData(
        "source S7 from a to b : ramp of 8 A from 3 s",
        """
        a.cause:1:45: error: the statement ends where `to` should stand
          source S7 from a to b : ramp of 8 A from 3 s
                                                      ^
          → a ramp is written `ramp of 12 V from 40 ns to 42.5 ns`

        """)]
    [InlineData(
        "source S7 from a to b : impulse of 8 kA",
        """
        a.cause:1:40: error: the statement ends where the front and half-value times should stand
          source S7 from a to b : impulse of 8 kA
                                                 ^
          → an impulse is written `impulse of 6 kV 1.2/50 µs from 1 ms`

        """)]
    [InlineData(
        "source S8 from a to b : impulse of 8 kA 8/x µs",
        """
        a.cause:1:43: error: `x` stands where the half-value time should
          source S8 from a to b : impulse of 8 kA 8/x µs
                                                    ^
          → an impulse is written `impulse of 6 kV 1.2/50 µs from 1 ms`

        """)]
    [InlineData(
        "source S9 at a : straight lines",
        """
        a.cause:1:32: error: the statement ends where a point `(TIME, VALUE)` should stand
          source S9 at a : straight lines
                                         ^
          → write `straight lines (0 s, 0 V) (1 ms, 5 V)` or `straight lines in file "surge.csv"`

        """)]
    [InlineData(
        "source S9 at a : straight lines in file surge.csv",
        """
        a.cause:1:41: error: `surge` stands where the name of a file in quotes should
          source S9 at a : straight lines in file surge.csv
                                                  ^^^^^
          → write `straight lines (0 s, 0 V) (1 ms, 5 V)` or `straight lines in file "surge.csv"`

        """)]
    public void A_wave_that_is_none_is_named_with_the_one_meant(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
