using System.Collections.Immutable;
using System.Runtime.InteropServices;
using System.Security.Cryptography;
using System.Text;

namespace CircuitTransient.Text;

/// <summary>A text as read from its file, with the places of its lines.</summary>
public sealed partial class SourceText
{
    private readonly ImmutableArray<int> lineStarts;

    /// <summary>Wraps a text.</summary>
    /// <param name="name">The name shown in messages, as the user gave it.</param>
    /// <param name="content">The characters.</param>
    public SourceText(string name, string content)
        : this(name, content, Encoding.UTF8.GetBytes(content))
    {
    }

    private SourceText(string name, string content, ReadOnlySpan<byte> bytes)
    {
        Name = name;
        Content = content;
        Sha256 = Convert.ToHexStringLower(SHA256.HashData(bytes));
        lineStarts = StartsOfLines(content);
    }

    /// <summary>The name shown in messages.</summary>
    public string Name { get; }

    /// <summary>The characters.</summary>
    public string Content { get; }

    /// <summary>SHA-256 of the bytes of the file, in lower-case hexadecimal digits.</summary>
    public string Sha256 { get; }

    /// <summary>The number of lines; an empty text has one.</summary>
    public int LineCount => lineStarts.Length;

    /// <summary>The characters of a span.</summary>
    public string this[TextSpan span] => Content.Substring(span.Start, span.Length);

    /// <summary>Line number, counted from 1, of an offset.</summary>
    public int LineOf(int offset)
    {
        var index = lineStarts.BinarySearch(offset);
        return index >= 0 ? index + 1 : ~index;
    }

    /// <summary>Column number, counted from 1 in characters, of an offset.</summary>
    public int ColumnOf(int offset)
    {
        var before = Content.AsSpan()[lineStarts[LineOf(offset) - 1]..offset];
        var column = 1;
        foreach (var unit in before)
        {
            // The second half of a surrogate pair belongs to the character of the first.
            column += char.IsLowSurrogate(unit) ? 0 : 1;
        }

        return column;
    }

    /// <summary>The characters of a line (counted from 1) without its line break.</summary>
    public string Line(int number)
    {
        var span = SpanOfLine(number);
        return Content.Substring(span.Start, span.Length);
    }

    /// <summary>Where a line (counted from 1) stands, without its line break.</summary>
    public TextSpan SpanOfLine(int number)
    {
        var start = lineStarts[number - 1];
        var end = number < lineStarts.Length ? lineStarts[number] : Content.Length;
        return new TextSpan(start, Content.AsSpan()[start..end].TrimEnd("\r\n").Length);
    }

    private static ImmutableArray<int> StartsOfLines(string content)
    {
        // Counted first, so that sixteen million line breaks cost one array and no growing.
        var starts = new int[content.AsSpan().Count('\n') + 1];
        var line = 0;
        for (var i = content.IndexOf('\n'); i >= 0; i = content.IndexOf('\n', i + 1))
        {
            starts[++line] = i + 1;
        }

        return ImmutableCollectionsMarshal.AsImmutableArray(starts);
    }
}
