using System.Text;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Text;

/// <summary>Bytes of a file and the places in its text.</summary>
public class SourceTextTests
{
    [Fact]
    public void Text_in_utf8_is_read_as_it_stands()
    {
        const string Content = "resistor R1 from a to ground : 4.7 kΩ\r\n";

        Assert.Equal(Content, SourceText.Read("a.cause", Encoding.UTF8.GetBytes(Content)).Value?.Content);
    }

    [Fact]
    public void A_byte_order_mark_is_dropped() =>
        Assert.Equal("note", SourceText.Read("a.cause", [0xEF, 0xBB, 0xBF, .. "note"u8]).Value?.Content);

    [Fact]
    public void An_empty_file_is_text() =>
        Assert.Equal("", SourceText.Read("a.cause", []).Value?.Content);

    // The digest of "abc" is the example of FIPS 180 (from memory); a byte-order mark counts among the bytes.
    [Fact]
    public void The_digest_is_that_of_the_bytes()
    {
        const string Abc = "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad";

        Assert.Equal(Abc, SourceText.Read("a.cause", "abc"u8).Value?.Sha256);
        Assert.Equal(Abc, new SourceText("a.cause", "abc").Sha256);
        Assert.NotEqual(Abc, SourceText.Read("a.cause", [0xEF, 0xBB, 0xBF, .. "abc"u8]).Value?.Sha256);
    }

    [Fact]
    public void Sixteen_mebibytes_are_read_and_one_byte_more_is_not()
    {
        var blanks = new byte[SourceText.LargestFile + 1];
        Array.Fill(blanks, (byte)' ');

        Assert.True(SourceText.Read("a.cause", blanks.AsSpan(1)).Succeeded);
        Assert.Equal(
            """
            a.cause:1:1: error: the file has more than 16 MiB
              → write what repeats with `repeat`, and long records as `straight lines in file "NAME.csv"`

            """,
            Refusal(blanks));
    }

    [Fact]
    public void A_byte_that_is_not_utf8_is_shown_at_its_place() =>
        Assert.Equal(
            """
            a.cause:2:11: error: byte 16 (0xB5) is not UTF-8
              until Ω �s
                      ^
              → save the file as UTF-8

            """,
            Refusal([.. "one\n  until Ω "u8, 0xB5, .. "s\nthree"u8]));

    [Fact]
    public void A_sequence_cut_off_at_the_end_is_not_utf8() =>
        Assert.StartsWith("a.cause:1:2: error: byte 2 (0xCE) is not UTF-8", Refusal([(byte)'4', 0xCE]));

    [Fact]
    public void A_file_with_a_zero_byte_is_not_text() =>
        Assert.Equal(
            """
            a.cause:1:3: error: byte 3 is zero: this is not a text
              ab��
                ^
              → a circuit file is plain UTF-8 text

            """,
            Refusal([(byte)'a', (byte)'b', 0, 0xFF]));

    [Fact]
    public void A_picture_is_no_text_in_another_encoding() =>
        Assert.Equal(
            """
            a.cause:1:1: error: byte 1 is 0x89: this is not a text
              �PNG
              ^
              → a circuit file is plain UTF-8 text

            """,
            Refusal([0x89, .. "PNG\r\n"u8, 0x1A, (byte)'\n', 0, 0, 0, 13]));

    [Fact]
    public void A_file_in_utf16_is_named_as_such() =>
        Assert.Equal(
            """
            a.cause:1:1: error: the file is written in UTF-16; a circuit is UTF-8 text
              → save it as UTF-8

            """,
            Refusal([0xFF, 0xFE, (byte)'a', 0]));

    [Fact]
    public void Lines_end_with_or_without_a_carriage_return()
    {
        var text = new SourceText("a.cause", "ab\r\ncd\n\nef");

        Assert.Equal(["ab", "cd", "", "ef"], Enumerable.Range(1, text.LineCount).Select(text.Line));
        Assert.Equal((2, 2), (text.LineOf(5), text.ColumnOf(5)));
    }

    [Fact]
    public void Columns_count_characters_and_not_halves_of_them()
    {
        var text = new SourceText("a.cause", "𝑅Ωx");

        Assert.Equal([1, 2, 3], new[] { 0, 2, 3 }.Select(text.ColumnOf));
    }

    private static string Refusal(ReadOnlySpan<byte> bytes)
    {
        var outcome = SourceText.Read("a.cause", bytes);

        Assert.False(outcome.Succeeded);
        return DiagnosticText.Render(outcome.Diagnostics);
    }
}
