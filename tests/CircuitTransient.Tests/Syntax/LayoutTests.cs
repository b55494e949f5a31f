namespace CircuitTransient.Tests.Syntax;

/// <summary>Lines, comments, quotes and names.</summary>
public class LayoutTests
{
    private const string OneResistor =
        "SimplePart(Resistor, R1, Terminals(a, b), 4Ω, [Rated(3W), Rated(2V)])";

    [Theory]
    [InlineData("resistor R1 from a to b : 4 Ω, rated 3 W, rated 2 V")]
    [InlineData("\uFEFF   resistor\tR1 from\u00A0a to b : 4 Ω, rated 3 W, rated 2 V   # a comment")]
    [InlineData("\r\n# x\r\nresistor R1 from a to b : 4 Ω, rated 3 W, rated 2 V\r\n\r\n")]
    [InlineData("resistor R1 from a to b :\n  4 Ω,\n  rated 3 W,\r\n\trated 2 V")]
    [InlineData("resistor R1 from a to b : # value\n 4 Ω, # first\n # a line\n rated 3 W, rated 2 V")]
    public void A_statement_may_be_laid_out_freely(string text) =>
        Assert.Equal(OneResistor, Reading.Of(text));

    [Theory]
    [InlineData("value x : 1 V +\n 2 V")]
    [InlineData("value x : 1 V + # more\r\n 2 V")]
    public void A_trailing_sign_goes_on_to_the_next_line(string text) =>
        Assert.Equal("Value(x, (1V + 2V))", Reading.Of(text));

    [Fact]
    public void A_trailing_minus_goes_on_to_the_next_line() =>
        Assert.Equal("Value(x, (1V - 2V))", Reading.Of("value x : 1 V \u2212\n 2 V"));

    [Fact]
    public void A_blank_line_ends_what_would_go_on() =>
        Assert.StartsWith("a.cause:1:31: error: the comma promises a clause, and none follows",
            Reading.Messages("resistor R1 from a to b : 4 Ω ,\n\nrated 3 W"));

    [Fact]
    public void Key_words_are_names_where_names_stand() =>
        Assert.Equal(
            "SimplePart(Resistor, from, Terminals(to, at), rated, [])\n"
            + "Assembly(end, [source, value, end], [])",
            Reading.Of("resistor from from to to at : rated\n"
                + "assembly end with terminals source,\n value,\n end\nend"));

    [Fact]
    public void Names_have_any_letters_and_stay_apart_by_case() =>
        Assert.Equal(
            "SimplePart(Resistor, Rδ_1, Terminals(Ständer, 電圧), 4Ω, [])",
            Reading.Of("resistor Rδ_1 from Ständer to 電圧 : 4 Ω"));

    [Fact]
    public void An_accent_that_is_a_character_of_its_own_belongs_to_its_letter() =>
        Assert.Equal("Reference(cafe\u0301)", Reading.Of("reference is cafe\u0301"));

    [Fact]
    public void Quotes_hold_anything_but_quotes_and_line_breaks() =>
        Assert.Equal("Observe(NodeVoltage(\"DC+ # 2, a:b\", -), 'x # y', Window(-, -))",
            Reading.Of("observe voltage of \"DC+ # 2, a:b\" as \"x # y\" # note"));

    [Fact]
    public void A_lone_carriage_return_does_not_hide_what_follows_a_comment() =>
        Assert.Equal(
            """
            a.cause:1:4: error: the character U+000D means nothing in a circuit
              # x�resistor R1 from a to b : 4 Ω
                 ^
              → end lines with a line feed, alone or after a carriage return

            """,
            Reading.Messages("# x\rresistor R1 from a to b : 4 Ω"));

    [Fact]
    public void A_file_of_comments_has_no_statement() => Assert.Equal("", Reading.Of("# a\n\n   # b\r\n"));

    [Fact]
    public void A_name_of_more_than_two_hundred_characters_is_refused() =>
        Assert.StartsWith("a.cause:1:10: error: the name has more than 200 characters\n",
            Reading.Messages($"resistor {new string('x', 201)} from a to b : 4 Ω"));
}
