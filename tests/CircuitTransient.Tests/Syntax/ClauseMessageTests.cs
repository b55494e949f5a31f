namespace CircuitTransient.Tests.Syntax;

/// <summary>What is said of clauses and switch events.</summary>
public class ClauseMessageTests
{
    [Theory]
    [InlineData(
        "capacitor C2 from q to minus : 5.6 mF charged to 140 V",
        """
        a.cause:1:39: error: `charged` is left over behind what the statement says
          capacitor C2 from q to minus : 5.6 mF charged to 140 V
                                                ^^^^^^^
          → put a comma before it: `, charged …`

        """)]
    [InlineData(
        "capacitor C3 from q to minus : 5.6 mF, chargd to 140 V, ratd 3 V",
        """
        a.cause:1:40: error: `chargd` stands where a clause should
          capacitor C3 from q to minus : 5.6 mF, chargd to 140 V, ratd 3 V
                                                 ^^^^^^
          → did you mean `charged`?
        a.cause:1:57: error: `ratd` stands where a clause should
          capacitor C3 from q to minus : 5.6 mF, chargd to 140 V, ratd 3 V
                                                                  ^^^^
          → did you mean `rated`?

        """)]
    [InlineData(
        "capacitor C3 from q to minus : 5.6 mF, charged 140 V",
        """
        a.cause:1:48: error: `140` stands where `to` should
          capacitor C3 from q to minus : 5.6 mF, charged 140 V
                                                         ^^^
          → clauses are `charged to`, `carrying`, `rated`, `linear up to`, `closes at`, `opens at`

        """)]
    [InlineData(
        "capacitor C3 from q to minus : 5.6 mF, 140 V",
        """
        a.cause:1:40: error: `140` stands where a clause should
          capacitor C3 from q to minus : 5.6 mF, 140 V
                                                 ^^^
          → clauses are `charged to`, `carrying`, `rated`, `linear up to`, `closes at`, `opens at`

        """)]
    [InlineData(
        "resistor R24 from a to b : 3 Ω,",
        """
        a.cause:1:31: error: the comma promises a clause, and none follows
          resistor R24 from a to b : 3 Ω,
                                        ^
          → take the comma away, or go on in the next line

        """)]
    [InlineData(
        "capacitor C10 from a to b : 3 µF, charged to Vdc + 5 V",
        """
        a.cause:1:46: error: a sum inside a clause stands in parentheses
          capacitor C10 from a to b : 3 µF, charged to Vdc + 5 V
                                                       ^^^^^^^^^
          → write `(Vdc + 5 V)`

        """)]
    [InlineData(
        "resistor R24 from a to b : 3 Ω 5",
        """
        a.cause:1:32: error: `5` is left over behind what the statement says
          resistor R24 from a to b : 3 Ω 5
                                         ^
          → clauses follow a comma, comments a `#`, and a statement has its own line

        """)]
    [InlineData(
        "circuit \"a\" \"b\"",
        """
        a.cause:1:13: error: `"b"` is left over behind what the statement says
          circuit "a" "b"
                      ^^^
          → clauses follow a comma, comments a `#`, and a statement has its own line

        """)]
    public void A_clause_that_is_none_is_named_with_the_one_meant(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));

    [Theory]
    [InlineData(
        "switch K1 from a to b : closes at 3 s",
        """
        a.cause:1:25: error: whether the switch starts open or closed is not said
          switch K1 from a to b : closes at 3 s
                                  ^^^^^^
          → write `: open, closes at …`

        """)]
    [InlineData(
        "switch K1 from a to b : opens at 3 s",
        """
        a.cause:1:25: error: whether the switch starts open or closed is not said
          switch K1 from a to b : opens at 3 s
                                  ^^^^^
          → write `: closed, opens at …`

        """)]
    [InlineData(
        "switch K1 from a to b : closed resistance 3 mΩ",
        """
        a.cause:1:25: error: whether the switch starts open or closed is not said
          switch K1 from a to b : closed resistance 3 mΩ
                                  ^^^^^^
          → write `: closed, closed resistance …`

        """)]
    [InlineData(
        "switch K2 from a to b : oben, closes at 3 s",
        """
        a.cause:1:25: error: `oben` stands where `open` or `closed` should
          switch K2 from a to b : oben, closes at 3 s
                                  ^^^^
          → did you mean `open`?

        """)]
    [InlineData(
        "switch K3 from a to b : open, closes on 3 s",
        """
        a.cause:1:38: error: `on` stands where `at` or `when` should
          switch K3 from a to b : open, closes on 3 s
                                               ^^
          → write `closes at 1.8 s`, `opens at 5 ms after K1 opens`, `closes when voltage of bus …`

        """)]
    [InlineData(
        "switch K4 from a to b : closed, opens at next current zero",
        """
        a.cause:1:33: error: from when the switch waits for the current zero is not said
          switch K4 from a to b : closed, opens at next current zero
                                          ^^^^^
          → write `opens at 10 ms at next current zero`

        """)]
    [InlineData(
        "switch K5 from a to b : closed, opens at 5 ms at current zero",
        """
        a.cause:1:50: error: `current` stands where `next` should
          switch K5 from a to b : closed, opens at 5 ms at current zero
                                                           ^^^^^^^
          → write `at next current zero`

        """)]
    [InlineData(
        "switch K6 from a to b : closed, opens when voltage of bus above 3 V",
        """
        a.cause:1:59: error: `above` stands where `rises above` or `falls below` should
          switch K6 from a to b : closed, opens when voltage of bus above 3 V
                                                                    ^^^^^
          → write `closes at 1.8 s`, `opens at 5 ms after K1 opens`, `closes when voltage of bus …`

        """)]
    [InlineData(
        "switch K7 from a to b : closed, opens at 3 ms after K8 close",
        """
        a.cause:1:56: error: `close` stands where `closes` or `opens` should
          switch K7 from a to b : closed, opens at 3 ms after K8 close
                                                                 ^^^^^
          → did you mean `closes`?

        """)]
    public void A_switch_says_how_it_starts_and_when_it_acts(string text, string expected) =>
        Assert.Equal(expected, Reading.Messages(text));
}
