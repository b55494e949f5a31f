using System.Text;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>The bytes of a record as UTF-8 or a superset of ASCII, line by line.</summary>
internal sealed class RecordBytes
{
    private readonly ReadOnlyMemory<byte> bytes;
    private readonly bool isUtf8;

    private RecordBytes(string name, ReadOnlyMemory<byte> bytes, string? remark)
    {
        Name = name;
        this.bytes = bytes;
        Remark = remark;
        isUtf8 = System.Text.Unicode.Utf8.IsValid(bytes.Span[..Math.Min(bytes.Length, 1 << 16)])
            || System.Text.Unicode.Utf8.IsValid(bytes.Span);
    }

    public string Name { get; }

    /// <summary>How the bytes had to be read, where that is worth a word.</summary>
    public string? Remark { get; }

    public ReadOnlySpan<byte> Span => bytes.Span;

    /// <summary>Takes the bytes of a file; null, and said, where they are no text.</summary>
    public static Outcome<RecordBytes> Of(string name, ReadOnlyMemory<byte> bytes)
    {
        var span = bytes.Span;
        if (span.StartsWith(Encoding.UTF8.Preamble))
        {
            return Checked(new RecordBytes(name, bytes[3..], null));
        }

        var wide = span.StartsWith((ReadOnlySpan<byte>)[0xFF, 0xFE]) ? Encoding.Unicode
            : span.StartsWith((ReadOnlySpan<byte>)[0xFE, 0xFF]) ? Encoding.BigEndianUnicode
            : HasZeros(span, 1) ? Encoding.Unicode
            : HasZeros(span, 0) ? Encoding.BigEndianUnicode
            : null;
        if (wide is null)
        {
            return Checked(new RecordBytes(name, bytes, null));
        }

        var text = wide.GetString(span).TrimStart('\uFEFF');
        return Checked(new RecordBytes(name, Encoding.UTF8.GetBytes(text), "the file is written in UTF-16"));
    }

    /// <summary>A run of bytes as text; what is no UTF-8 is taken as one character a byte.</summary>
    public string Text(ReadOnlySpan<byte> run) => (isUtf8 ? Encoding.UTF8 : Encoding.Latin1).GetString(run);

    /// <summary>The line that begins at an offset, without its end, and where the next one begins.</summary>
    public ReadOnlySpan<byte> LineAt(int start, out int next)
    {
        var rest = Span[start..];
        var length = rest.IndexOfAny((byte)'\n', (byte)'\r');
        if (length < 0)
        {
            next = Span.Length;
            return rest;
        }

        var isPair = rest[length] == '\r' && length + 1 < rest.Length && rest[length + 1] == '\n';
        next = start + length + (isPair ? 2 : 1);
        return rest[..length];
    }

    /// <summary>An error at a run of a line, counted from 1.</summary>
    public Diagnostic Fault(
        int line, ReadOnlySpan<byte> content, string message, string? advice, string? cell = null)
    {
        const int most = 200;
        var text = Text(content[..Math.Min(content.Length, most)]);
        var source = new SourceText(Name, new string('\n', line - 1) + text);
        var place = cell is { Length: > 0 } ? Math.Max(0, text.IndexOf(cell, StringComparison.Ordinal)) : 0;
        var length = cell is { Length: > 0 } ? Math.Min(cell.Length, text.Length - place) : text.Length;
        return Diagnostic.Error(source, new TextSpan(line - 1 + place, length), message, advice);
    }

    private static Outcome<RecordBytes> Checked(RecordBytes read)
    {
        var zero = read.Span.IndexOf((byte)0);
        if (zero >= 0)
        {
            var fault = read.Fault(1, [], $"byte {zero + 1} is zero: this is not a text",
                "export the record as a table of text");
            return new(null, [fault]);
        }

        return new(read, []);
    }

    /// <summary>Whether every second byte of the beginning is zero: UTF-16 without its mark.</summary>
    private static bool HasZeros(ReadOnlySpan<byte> span, int from)
    {
        const int looked = 64;
        if (span.Length < looked)
        {
            return false;
        }

        for (var i = 0; i < looked; i++)
        {
            if ((span[i] == 0) != (i % 2 == from))
            {
                return false;
            }
        }

        return true;
    }
}
