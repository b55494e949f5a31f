namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of quantities and bounds.</summary>
public class QuantityMessageTests
{
    [Theory]
    [InlineData(
        "observe voltage on bus",
        """
        a.cause:1:17: error: `on` stands where `of`, `from` or `across` should
          observe voltage on bus
                          ^^
          → did you mean `of`?

        """)]
    [InlineData(
        "observe volage of bus",
        """
        a.cause:1:9: error: `volage` stands where a quantity should
          observe volage of bus
                  ^^^^^^
          → did you mean `voltage`?

        """)]
    [InlineData(
        "observe bus",
        """
        a.cause:1:9: error: `bus` stands where a quantity should
          observe bus
                  ^^^
          → write `voltage of NODE`, `voltage across PART`, `current through PART`, `energy in PART`

        """)]
    [InlineData(
        "observe current in R1",
        """
        a.cause:1:17: error: `in` stands where `through` or `delivered by` should
          observe current in R1
                          ^^
          → write `voltage of NODE`, `voltage across PART`, `current through PART`, `energy in PART`

        """)]
    [InlineData(
        "observe energy of C1",
        """
        a.cause:1:16: error: `of` stands where `in` or `delivered by` should
          observe energy of C1
                         ^^
          → write `voltage of NODE`, `voltage across PART`, `current through PART`, `energy in PART`

        """)]
    [InlineData(
        "observe current through K1 as inrush",
        """
        a.cause:1:31: error: `inrush` stands where the label in quotes should
          observe current through K1 as inrush
                                        ^^^^^^
          → an observation is written `observe current through Ls as "inrush" from 1.8 s to 6 s`

        """)]
    [InlineData(
        "require voltage of bus below 3 V",
        """
        a.cause:1:24: error: `below` stands where `at most`, `at least` or `between` should
          require voltage of bus below 3 V
                                 ^^^^^
          → bounds are `at most 1.1 kV`, `at least 48 V`, `between -5 A and 200 A`

        """)]
    [InlineData(
        "observe settling time of voltage of b",
        """
        a.cause:1:38: error: the statement ends where `within` should stand
          observe settling time of voltage of b
                                               ^
          → an observation is written `observe current through Ls as "inrush" from 1.8 s to 6 s`

        """)]
    [InlineData(
        "observe rise time of overshoot of voltage of b",
        """
        a.cause:1:22: error: `overshoot` stands where a quantity should
          observe rise time of overshoot of voltage of b
                               ^^^^^^^^^
          → write `voltage of NODE`, `voltage across PART`, `current through PART`, `energy in PART`

        """)]
    [InlineData(
        "dependent source A from a to b : 10 voltage of c",
        """
        a.cause:1:37: error: `voltage` stands where `times` should
          dependent source A from a to b : 10 voltage of c
                                              ^^^^^^^
          → it is written `dependent source Amp from out to minus : 10 times voltage from a to b`

        """)]
    public void A_quantity_that_is_none_is_named_with_the_one_meant(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "require voltage of b <= 5 V",
        """
        a.cause:1:22: error: `<=` is no bound
          require voltage of b <= 5 V
                               ^^
          → write `at most 5 V`

        """)]
    [InlineData(
        "require voltage of b >= 5 V",
        """
        a.cause:1:22: error: `>=` is no bound
          require voltage of b >= 5 V
                               ^^
          → write `at least 5 V`

        """)]
    [InlineData(
        "require voltage of b < 5 V",
        """
        a.cause:1:22: error: `<` is no bound
          require voltage of b < 5 V
                               ^
          → write `at most 5 V`

        """)]
    [InlineData(
        "require voltage of b ≥ 5 V",
        """
        a.cause:1:22: error: `≥` is no bound
          require voltage of b ≥ 5 V
                               ^
          → write `at least 5 V`

        """)]
    [InlineData(
        "require voltage of b <=",
        """
        a.cause:1:22: error: `<=` is no bound
          require voltage of b <=
                               ^^
          → write `at most`

        """)]
    public void A_sign_of_comparison_is_answered_with_the_words_of_a_bound(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
