using System.Buffers;
using System.Text;

namespace CircuitTransient.Text;

/// <summary>Bytes of a file → its text. Only UTF-8 is read, a byte-order mark kept as a character.</summary>
public static class TextDecoder
{
    /// <summary>The largest file read, in bytes.</summary>
    public const int LargestFile = 16 << 20;

    /// <summary>Decodes the bytes of a file.</summary>
    /// <param name="name">The file's name as the user gave it.</param>
    /// <param name="bytes">All of its bytes, or more than <see cref="LargestFile"/> of them.</param>
    public static Outcome<SourceText> Decode(string name, ReadOnlySpan<byte> bytes)
    {
        if (bytes.Length > LargestFile)
        {
            return Refuse(
                name, "", "the file is over 16 MiB", "a circuit is text; repeat … end writes a large one short");
        }

        var end = LengthOfUtf8(bytes);
        var text = Encoding.UTF8.GetString(bytes[..end]);
        if (bytes.Contains((byte)0))
        {
            return Refuse(name, "", "the file is not text", "a circuit is a text file in UTF-8");
        }

        return end == bytes.Length
            ? new(new SourceText(name, text), [])
            : Refuse(name, text, $"the byte {bytes[end]:X2} is not UTF-8", "save the file in UTF-8");
    }

    private static int LengthOfUtf8(ReadOnlySpan<byte> bytes)
    {
        var end = 0;
        while (end < bytes.Length
            && Rune.DecodeFromUtf8(bytes[end..], out _, out var length) == OperationStatus.Done)
        {
            end += length;
        }

        return end;
    }

    private static Outcome<SourceText> Refuse(string name, string readable, string message, string advice)
    {
        var source = new SourceText(name, readable);
        return new(null, [Diagnostic.Error(source, new TextSpan(readable.Length, 0), message, advice)]);
    }
}
