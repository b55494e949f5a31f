namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of numbers, units and expressions.</summary>
public class ValueMessageTests
{
    [Theory]
    [InlineData(
        "resistor R4 from a to b : 4,7 kΩ",
        """
        a.cause:1:27: error: `4,7` has a decimal comma; the decimal mark is a point
          resistor R4 from a to b : 4,7 kΩ
                                    ^^^
          → write `4.7 kΩ`

        """)]
    [InlineData(
        "resistor R5 from a to b : 1,200 kΩ",
        """
        a.cause:1:27: error: `1,200` has a decimal comma; the decimal mark is a point
          resistor R5 from a to b : 1,200 kΩ
                                    ^^^^^
          → write `1.200 kΩ` or, for thousands, `1200 kΩ`

        """)]
    [InlineData(
        "source S9 at a : straight lines (0 s, 0 V) (0,5 ms, 3 V)",
        """
        a.cause:1:45: error: `0,5` has a decimal comma; the decimal mark is a point
          source S9 at a : straight lines (0 s, 0 V) (0,5 ms, 3 V)
                                                      ^^^
          → write `0.5 ms`

        """)]
    [InlineData(
        "resistor R9 from a to b : 1 200 Ω",
        """
        a.cause:1:27: error: two numbers stand side by side
          resistor R9 from a to b : 1 200 Ω
                                    ^^^^^
          → write one number without blanks: `1200 Ω`

        """)]
    [InlineData(
        "source S at b : 5.000.000 V",
        """
        a.cause:1:17: error: `5.000.000` has more than one point; the point is the decimal mark
          source S at b : 5.000.000 V
                          ^^^^^^^^^
          → if the points part thousands, write `5000000 V`

        """)]
    [InlineData(
        "source S at b : 1.5 2.5 V",
        """
        a.cause:1:17: error: two numbers stand side by side
          source S at b : 1.5 2.5 V
                          ^^^^^^^
          → write one number, with one point as its decimal mark

        """)]
    public void A_decimal_comma_is_never_guessed_at(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "resistor R6 from a to b : 10 meg",
        """
        a.cause:1:30: error: `meg` is not a unit
          resistor R6 from a to b : 10 meg
                                       ^^^
          → mega is `M`, and the unit follows it: `MΩ`, `MV`

        """)]
    [InlineData(
        "resistor R7 from a to b : 10 KOhm",
        """
        a.cause:1:30: error: `KOhm` is not a unit
          resistor R7 from a to b : 10 KOhm
                                       ^^^^
          → case matters: write `10 kΩ`

        """)]
    [InlineData(
        "capacitor C1 from a to b : 10 uf",
        """
        a.cause:1:31: error: `uf` is not a unit
          capacitor C1 from a to b : 10 uf
                                        ^^
          → case matters: write `10 µF`

        """)]
    [InlineData(
        "resistor R8 from a to b : 10 ohms",
        """
        a.cause:1:30: error: `ohms` is not a unit
          resistor R8 from a to b : 10 ohms
                                       ^^^^
          → write `10 Ω`

        """)]
    [InlineData(
        "resistor R8 from a to b : 10 kOhms",
        """
        a.cause:1:30: error: `kOhms` is not a unit
          resistor R8 from a to b : 10 kOhms
                                       ^^^^^
          → write `10 kΩ`

        """)]
    [InlineData(
        "until 14 seconds",
        """
        a.cause:1:10: error: `seconds` is not a unit
          until 14 seconds
                   ^^^^^^^
          → write `14 s`

        """)]
    [InlineData(
        "value T : 2 Rdc",
        """
        a.cause:1:13: error: `Rdc` is not a unit
          value T : 2 Rdc
                      ^^^
          → units: Ω S F H V A W J C Wb Hz s Vs A²s V/s A/s min h deg ° rad %; \
        prefixes: f p n µ m k M G T; a product: `2 * Rdc`

        """)]
    [InlineData(
        "inductor L1 from a to b : 10 NH",
        """
        a.cause:1:30: error: `NH` is not a unit
          inductor L1 from a to b : 10 NH
                                       ^^
          → case matters: write `10 nH`

        """)]
    [InlineData(
        "source S at a : sine of 5 V at 10 hz",
        """
        a.cause:1:35: error: `hz` is not a unit
          source S at a : sine of 5 V at 10 hz
                                            ^^
          → case matters: write `10 Hz`

        """)]
    [InlineData(
        "until 1 day",
        """
        a.cause:1:9: error: `day` is not a unit
          until 1 day
                  ^^^
          → the units of time are `s`, `min` and `h`: write `24 h`

        """)]
    [InlineData(
        "until 1.5 days",
        """
        a.cause:1:11: error: `days` is not a unit
          until 1.5 days
                    ^^^^
          → the units of time are `s`, `min` and `h`: write `36 h`

        """)]
    [InlineData(
        "until 2 years",
        """
        a.cause:1:9: error: `years` is not a unit
          until 2 years
                  ^^^^^
          → the units of time are `s`, `min` and `h`, with prefixes `ms`, `µs`, `ns`

        """)]
    public void A_unit_that_is_none_is_named_with_the_one_meant(string text, string expected) =>
        Assert.Equal(expected.Replace("\\\n", "", StringComparison.Ordinal), Reading.Messages(text));

    [Theory]
    [InlineData(
        "value z : 1e400 V",
        """
        a.cause:1:11: error: `1e400 V` is larger than any number that can be computed with, 1.8·10³⁰⁸
          value z : 1e400 V
                    ^^^^^^^
          → write a value that a real part can have

        """)]
    [InlineData(
        "value w : 1e-400 V",
        """
        a.cause:1:11: error: `1e-400 V` is smaller than any number that can be computed with, 4.9·10⁻³²⁴
          value w : 1e-400 V
                    ^^^^^^^^
          → write `0` with its unit

        """)]
    [InlineData(
        "value v : 1e308 kV",
        """
        a.cause:1:11: error: `1e308 kV` is larger than any number that can be computed with, 1.8·10³⁰⁸
          value v : 1e308 kV
                    ^^^^^^^^
          → write a value that a real part can have

        """)]
    public void A_number_that_no_double_holds_is_an_error(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "value x : 3 * (4 + 5",
        """
        a.cause:1:15: error: the parenthesis that opens here is not closed
          value x : 3 * (4 + 5
                        ^
          → put a `)` where it ends

        """)]
    [InlineData(
        "value x : 3 * (4 + 5, 6)",
        """
        a.cause:1:21: error: `,` stands where `)` should
          value x : 3 * (4 + 5, 6)
                              ^
          → a value is written `value Rdamp : 2.2 Ω ±1 %`

        """)]
    [InlineData(
        "value y : sqr(4)",
        """
        a.cause:1:11: error: `sqr` is not a function
          value y : sqr(4)
                    ^^^
          → did you mean `sqrt`?

        """)]
    [InlineData(
        "value y : sin(4)",
        """
        a.cause:1:11: error: `sin` is not a function
          value y : sin(4)
                    ^^^
          → the functions are `sqrt`, `exp` and `ln`; a product is written with `*`

        """)]
    [InlineData(
        "value y : 3 +",
        """
        a.cause:1:14: error: the statement ends where a value should stand
          value y : 3 +
                       ^
          → a value is written `value Rdamp : 2.2 Ω ±1 %`

        """)]
    [InlineData(
        "value y : * 3",
        """
        a.cause:1:11: error: `*` stands where a value should
          value y : * 3
                    ^
          → a value is written `value Rdamp : 2.2 Ω ±1 %`

        """)]
    public void An_expression_that_does_not_close_or_call_is_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
