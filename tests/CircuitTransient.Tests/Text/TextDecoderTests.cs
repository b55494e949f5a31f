using System.Text;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Text;

public class TextDecoderTests
{
    [Fact]
    public void Text_in_utf8_is_read_as_it_stands()
    {
        const string Text = "\uFEFFresistor R1 from a to ground : 4.7 kΩ\r\n";

        Assert.Equal(Text, TextDecoder.Decode("a.cause", Encoding.UTF8.GetBytes(Text)).Value?.Content);
    }

    [Fact]
    public void An_empty_file_is_text() =>
        Assert.Equal("", TextDecoder.Decode("a.cause", []).Value?.Content);

    [Fact]
    public void A_byte_that_is_not_utf8_is_named_at_its_place()
    {
        var mistake = Refusal([.. "one\ntwo "u8, 0xB5, (byte)'F']);

        Assert.Equal("the byte B5 is not UTF-8", mistake.Message);
        Assert.Equal(2, mistake.Source.LineOf(mistake.Span.Start));
        Assert.Equal(5, mistake.Source.ColumnOf(mistake.Span.Start));
    }

    [Fact]
    public void A_sequence_cut_off_at_the_end_is_not_utf8() =>
        Assert.Equal("the byte CE is not UTF-8", Refusal([(byte)'4', 0xCE]).Message);

    [Fact]
    public void A_file_with_zero_bytes_is_not_text() =>
        Assert.Equal("the file is not text", Refusal([(byte)'a', 0, 0xFF]).Message);

    [Fact]
    public void Sixteen_mebibytes_are_read_and_one_byte_more_is_not()
    {
        var blanks = new byte[TextDecoder.LargestFile + 1];
        Array.Fill(blanks, (byte)' ');

        Assert.True(TextDecoder.Decode("a.cause", blanks.AsSpan(1)).Succeeded);
        Assert.Equal("the file is over 16 MiB", Refusal(blanks).Message);
    }

    private static Diagnostic Refusal(ReadOnlySpan<byte> bytes)
    {
        var outcome = TextDecoder.Decode("a.cause", bytes);

        Assert.False(outcome.Succeeded);
        return Assert.Single(outcome.Diagnostics);
    }
}
