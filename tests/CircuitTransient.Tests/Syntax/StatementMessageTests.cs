namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of statements as a whole.</summary>
public class StatementMessageTests
{
    [Theory]
    [InlineData(
        "resitor R1 from a to b : 82 Ω",
        """
        a.cause:1:1: error: no statement starts with `resitor`
          resitor R1 from a to b : 82 Ω
          ^^^^^^^
          → did you mean `resistor`?

        """)]
    [InlineData(
        "R1 a b 82",
        """
        a.cause:1:1: error: no statement starts with `R1`
          R1 a b 82
          ^^
          → statements start with `resistor`, `source`, `switch`, `observe`, `require` or another key word

        """)]
    [InlineData(
        "\"R1\" a b 82",
        """
        a.cause:1:1: error: `"R1"` stands where a key word should
          "R1" a b 82
          ^^^^
          → statements start with `resistor`, `source`, `switch`, `observe`, `require` or another key word

        """)]
    [InlineData(
        "circuit \"a\"\n  12 V",
        """
        a.cause:2:3: error: `12` stands where a key word should
          12 V
          ^^
          → statements start with `resistor`, `source`, `switch`, `observe`, `require` or another key word

        """)]
    public void A_statement_that_no_key_word_starts_is_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "resistor R2 form a to b : 82 Ω",
        """
        a.cause:1:13: error: `form` stands where `from` or `at` should
          resistor R2 form a to b : 82 Ω
                      ^^^^
          → did you mean `from`?

        """)]
    [InlineData(
        "resistor from a to b : 82 Ω",
        """
        a.cause:1:10: error: the name is missing before `from`
          resistor from a to b : 82 Ω
                   ^^^^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    [InlineData(
        "resistor R3 from a to b 82 Ω",
        """
        a.cause:1:25: error: `82` stands where `:` and the value should
          resistor R3 from a to b 82 Ω
                                  ^^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    [InlineData(
        "resistor R3 from a",
        """
        a.cause:1:19: error: the statement ends where `to` should stand
          resistor R3 from a
                            ^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    [InlineData(
        "source at a : 3 V",
        """
        a.cause:1:8: error: the name is missing before `at`
          source at a : 3 V
                 ^^
          → a source is written `source Feed from bus to minus : 540 V`

        """)]
    [InlineData(
        "coupling of L1 and L2 : 0.98",
        """
        a.cause:1:10: error: the name is missing before `of`
          coupling of L1 and L2 : 0.98
                   ^^
          → a coupling is written `coupling M1 of Lp and Ls : 0.98`, or `: 3 mH`

        """)]
    [InlineData(
        "coupling M1 of L1 und L2 : 0.98",
        """
        a.cause:1:19: error: `und` stands where `and` should
          coupling M1 of L1 und L2 : 0.98
                            ^^^
          → did you mean `and`?

        """)]
    [InlineData(
        "transformer T1 primary from p to minus secondary from s to t : turns 10 to 1",
        """
        a.cause:1:40: error: `secondary` stands where `,` should
          transformer T1 primary from p to minus secondary from s to t : turns 10 to 1
                                                 ^^^^^^^^^
          → write `transformer T1 primary from p to minus, secondary from s to t : turns 10 to 1`

        """)]
    [InlineData(
        "dependent Amp from a to b : 10 times voltage of c",
        """
        a.cause:1:11: error: `Amp` stands where `source` should
          dependent Amp from a to b : 10 times voltage of c
                    ^^^
          → it is written `dependent source Amp from out to minus : 10 times voltage from a to b`

        """)]
    public void Terminals_that_are_missing_or_misspelt_are_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "resistor R22 from 3x to b : 3 Ω",
        """
        a.cause:1:19: error: the name `3x` starts with a digit
          resistor R22 from 3x to b : 3 Ω
                            ^^
          → put it in quotes: `"3x"`

        """)]
    [InlineData(
        "resistor R[k*2] from a to b : 3 Ω",
        """
        a.cause:1:11: error: an index is a whole number, or a counter and what is added to it
          resistor R[k*2] from a to b : 3 Ω
                    ^^^
          → write `[3]`, `[k]`, `[k+1]` or `[k-1]`

        """)]
    [InlineData(
        "resistor R23 from \"\" to b : 3 Ω",
        """
        a.cause:1:19: error: a name in quotes has no character
          resistor R23 from "" to b : 3 Ω
                            ^^
          → write the name between the quotes

        """)]
    [InlineData(
        "resistor R23 from + to b : 3 Ω",
        """
        a.cause:1:19: error: `+` stands where the name of a node should
          resistor R23 from + to b : 3 Ω
                            ^
          → a resistor is written `resistor Rpre from b to bus : 82 Ω`

        """)]
    public void A_name_that_is_none_is_named(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
