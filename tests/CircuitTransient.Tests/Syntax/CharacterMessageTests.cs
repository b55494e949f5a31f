namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of characters that mean nothing.</summary>
public class CharacterMessageTests
{
    [Theory]
    [InlineData(
        "capacitor C9 from “a” to b : 3 µF",
        """
        a.cause:1:19: error: `“` (U+201C) means nothing in a circuit
          capacitor C9 from “a” to b : 3 µF
                            ^
          → put names and texts in straight double quotes, `"`

        """)]
    [InlineData(
        "resistor R20 from a to b : 3 Ω;",
        """
        a.cause:1:31: error: `;` (U+003B) means nothing in a circuit
          resistor R20 from a to b : 3 Ω;
                                        ^
          → a statement ends with its line; comments start with `#`

        """)]
    [InlineData(
        "resistor R21 from a to b : – 3 Ω",
        """
        a.cause:1:28: error: `–` (U+2013) means nothing in a circuit
          resistor R21 from a to b : – 3 Ω
                                     ^
          → write the minus sign as `-`

        """)]
    [InlineData(
        "resistor R21 from a to b : 3. Ω",
        """
        a.cause:1:29: error: `.` (U+002E) means nothing in a circuit
          resistor R21 from a to b : 3. Ω
                                      ^
          → write digits on both sides of the decimal point: `0.5`, `5.0`

        """)]
    [InlineData(
        "resistor R21 from a to b : 3 Ω ☃",
        """
        a.cause:1:32: error: `☃` (U+2603) means nothing in a circuit
          resistor R21 from a to b : 3 Ω ☃
                                         ^
          → leave it out; in a name, put the whole name in quotes

        """)]
    [InlineData(
        "resistor _R from a to b : 3 Ω",
        """
        a.cause:1:10: error: `_` (U+005F) means nothing in a circuit
          resistor _R from a to b : 3 Ω
                   ^
          → a name starts with a letter, or stands in quotes

        """)]
    [InlineData(
        "circuit \"open quote",
        """
        a.cause:1:9: error: the quote that opens here is not closed on its line
          circuit "open quote
                  ^^^^^^^^^^^
          → put a `"` where the text ends

        """)]
    public void A_character_that_means_nothing_is_named_with_its_code(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
