using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Text;

/// <summary>What a slip of the finger meant.</summary>
public class NearestNameTests
{
    private static readonly string[] Names = ["resistor", "capacitor", "Rpre", "Rbl", "bus"];

    [Theory]
    [InlineData("resitor", "resistor")]
    [InlineData("reisstor", "resistor")]
    [InlineData("RESISTOR", "resistor")]
    [InlineData("rpre", "Rpre")]
    [InlineData("bsu", "bus")]
    public void A_letter_left_out_swapped_or_in_the_wrong_case_is_mended(string word, string meant) =>
        Assert.Equal(meant, NearestName.Find(word, Names));

    [Theory]
    [InlineData("diode")]
    [InlineData("x")]
    [InlineData("")]
    public void What_is_far_from_all_means_none(string word) => Assert.Null(NearestName.Find(word, Names));

    [Fact]
    public void A_word_is_not_mended_into_itself() => Assert.Null(NearestName.Find("bus", ["bus"]));

    [Fact]
    public void A_word_of_a_million_letters_costs_nothing() =>
        Assert.Null(NearestName.Find(new string('x', 1_000_000), [new string('x', 999_999)]));

    [Fact]
    public void One_letter_left_out_of_a_long_word_is_always_found() =>
        Gen.Select(Gen.String[Gen.Char.AlphaNumeric, 6, 20], Gen.Int[0, 5]).OnEach(
            (word, place) => NearestName.Find(word.Remove(place, 1), [word]) == word,
            iter: 500, seed: "0000KJ2mYgS1");
}
