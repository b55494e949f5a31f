using System.Buffers;
using System.Text;
using System.Text.Unicode;

namespace CircuitTransient.Text;

public sealed partial class SourceText
{
    /// <summary>The largest file read, in bytes (16 MiB).</summary>
    public const int LargestFile = 16 * 1024 * 1024;

    private const int BytesShownAfterFault = 60;
    private const int BytesThatTellText = 1000;

    // Everything but the control characters; a text has of those tabs, the ends of lines and pages.
    private static readonly SearchValues<byte> BytesOfTexts = SearchValues.Create(
        [.. Enumerable.Range(0, 256).Where(b => b is >= 0x20 or (>= 9 and <= 13)).Select(b => (byte)b)]);

    /// <summary>Reads the bytes of a file as UTF-8; a byte-order mark is dropped.</summary>
    public static Outcome<SourceText> Read(string name, ReadOnlySpan<byte> bytes)
    {
        if (bytes.Length > LargestFile)
        {
            return Refuse(TooLarge(name));
        }

        if (bytes.StartsWith((ReadOnlySpan<byte>)[0xFF, 0xFE])
            || bytes.StartsWith((ReadOnlySpan<byte>)[0xFE, 0xFF]))
        {
            return Refuse(AtStart(name, "the file is written in UTF-16; a circuit is UTF-8 text",
                "save it as UTF-8"));
        }

        var mark = Encoding.UTF8.Preamble;
        var start = bytes.StartsWith(mark) ? mark.Length : 0;
        var text = bytes[start..];
        var zero = text.IndexOf((byte)0);
        var characters = new char[text.Length];
        var status = Utf8.ToUtf16(text, characters, out var read, out var written,
            replaceInvalidSequences: false);
        if (zero >= 0 && (zero < read || status == OperationStatus.Done))
        {
            return Refuse(Fault(name, text, zero, $"byte {start + zero + 1} is zero: this is not a text",
                "a circuit file is plain UTF-8 text"));
        }

        return status == OperationStatus.Done
            ? new Outcome<SourceText>(new SourceText(name, new string(characters, 0, written), bytes), [])
            : Refuse(IsBinary(text)
                ? Fault(name, text, read, $"byte {start + read + 1} is 0x{text[read]:X2}: this is not a text",
                    "a circuit file is plain UTF-8 text")
                : Fault(name, text, read, $"byte {start + read + 1} (0x{text[read]:X2}) is not UTF-8",
                    "save the file as UTF-8"));
    }

    /// <summary>Whether control characters near the start tell a picture or a program from a text in
    /// another encoding.</summary>
    private static bool IsBinary(ReadOnlySpan<byte> text) =>
        text[..Math.Min(text.Length, BytesThatTellText)]
            .IndexOfAnyExcept(BytesOfTexts) >= 0;

    /// <summary>The error for a file over <see cref="LargestFile"/>, which need not be read to be
    /// refused.</summary>
    public static Diagnostic TooLarge(string name) => AtStart(
        name, "the file has more than 16 MiB",
        "write what repeats with `repeat`, and long records as `straight lines in file \"NAME.csv\"`");

    private static Diagnostic AtStart(string name, string message, string advice) =>
        Diagnostic.Error(new SourceText(name, ""), new TextSpan(0, 0), message, advice);

    /// <summary>An error at a byte, shown in as much of the text as can be read around it.</summary>
    private static Diagnostic Fault(
        string name, ReadOnlySpan<byte> text, int place, string message, string advice)
    {
        var before = Encoding.UTF8.GetString(text[..place]);
        var shown = Math.Min(BytesShownAfterFault, text.Length - place);
        var after = Encoding.UTF8.GetString(text.Slice(place, shown));
        return Diagnostic.Error(
            new SourceText(name, before + after), new TextSpan(before.Length, 1), message, advice);
    }

    private static Outcome<SourceText> Refuse(Diagnostic diagnostic) => new(null, [diagnostic]);
}
