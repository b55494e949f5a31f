namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of titles, studies and blocks.</summary>
public class StudyMessageTests
{
    [Theory]
    [InlineData(
        "note no quotes",
        """
        a.cause:1:6: error: `no` stands where the note in quotes should
          note no quotes
               ^^
          → a note is written `note "Kmain bypasses the charging resistor."`

        """)]
    [InlineData(
        "circuit Title",
        """
        a.cause:1:9: error: `Title` stands where the title in quotes should
          circuit Title
                  ^^^^^
          → the title is written `circuit "Bullwheel bus"`

        """)]
    [InlineData(
        "start setled",
        """
        a.cause:1:7: error: `setled` stands where `as stated` or `settled` should
          start setled
                ^^^^^^
          → did you mean `settled`?

        """)]
    [InlineData(
        "reference minus",
        """
        a.cause:1:11: error: `minus` stands where `is` should
          reference minus
                    ^^^^^
          → the reference conductor is written `reference is minus`

        """)]
    [InlineData(
        "until",
        """
        a.cause:1:6: error: the statement ends where a value should stand
          until
               ^
          → the end of the study is written `until 14 s`

        """)]
    [InlineData(
        "repeat 40",
        """
        a.cause:1:1: error: the `repeat` that starts here has no `end`
          repeat 40
          ^^^^^^
          → write `end` on a line of its own behind its last line
        a.cause:1:10: error: the statement ends where `as` should stand
          repeat 40
                   ^
          → a repetition is written `repeat 40 as k`, and `end` closes it

        """)]
    [InlineData(
        "assembly filter terminals in, out",
        """
        a.cause:1:1: error: the `assembly` that starts here has no `end`
          assembly filter terminals in, out
          ^^^^^^^^
          → write `end` on a line of its own behind its last line
        a.cause:1:17: error: `terminals` stands where `with` should
          assembly filter terminals in, out
                          ^^^^^^^^^
          → an assembly is written `assembly filter with terminals in, out, ret`, and `end` closes it

        """)]
    [InlineData(
        "place filter as X with in = , out = b",
        """
        a.cause:1:29: error: `,` stands where a value should
          place filter as X with in = , out = b
                                      ^
          → it is written `place filter as Stage1 with in = a, out = b, ret = minus`

        """)]
    [InlineData(
        "place filter with in = a",
        """
        a.cause:1:14: error: `with` stands where `as` should
          place filter with in = a
                       ^^^^
          → it is written `place filter as Stage1 with in = a, out = b, ret = minus`

        """)]
    public void What_the_other_statements_lack_is_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "repeat 40 as k\nresistor R24 from a to b : 3 Ω",
        """
        a.cause:1:1: error: the `repeat` that starts here has no `end`
          repeat 40 as k
          ^^^^^^
          → write `end` on a line of its own behind its last line

        """)]
    [InlineData(
        "assembly f with terminals a\nrepeat 3 as k\nend",
        """
        a.cause:1:1: error: the `assembly` that starts here has no `end`
          assembly f with terminals a
          ^^^^^^^^
          → write `end` on a line of its own behind its last line

        """)]
    [InlineData(
        "end",
        """
        a.cause:1:1: error: this `end` closes nothing
          end
          ^^^
          → `end` closes `repeat` or `assembly`; a study ends with `until`

        """)]
    public void Blocks_that_do_not_open_or_close_are_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "resistor R24 from a to b : 3 Ω,\nresistor R25 from a to b : 4 Ω",
        """
        a.cause:1:31: error: the comma promises a clause, and none follows
          resistor R24 from a to b : 3 Ω,
                                        ^
          → take the comma away, or go on in the next line

        """)]
    [InlineData(
        "value x :\nresistor R25 from a to b : 4,5 Ω",
        """
        a.cause:1:10: error: the statement ends where a value should stand
          value x :
                   ^
          → a value is written `value Rdamp : 2.2 Ω ±1 %`
        a.cause:2:28: error: `4,5` has a decimal comma; the decimal mark is a point
          resistor R25 from a to b : 4,5 Ω
                                     ^^^
          → write `4.5 Ω`

        """)]
    [InlineData(
        "repeat 2 as k\nresistor R25 from a to b : 4 Ω,\nend",
        """
        a.cause:2:31: error: the comma promises a clause, and none follows
          resistor R25 from a to b : 4 Ω,
                                        ^
          → take the comma away, or go on in the next line

        """)]
    public void A_line_that_only_seems_to_go_on_is_a_statement_of_its_own(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
