using System.Collections.Immutable;
using System.Security.Cryptography;
using System.Text;

namespace CircuitTransient.Text;

/// <summary>A text as read from its file, with the places of its lines.</summary>
public sealed class SourceText
{
    private readonly ImmutableArray<int> lineStarts;

    /// <summary>Wraps a text.</summary>
    /// <param name="name">The name shown in messages, as the user gave it.</param>
    /// <param name="content">The characters.</param>
    public SourceText(string name, string content)
    {
        Name = name;
        Content = content;
        var starts = ImmutableArray.CreateBuilder<int>();
        starts.Add(0);
        for (var i = 0; i < content.Length; i++)
        {
            if (content[i] == '\n')
            {
                starts.Add(i + 1);
            }
        }

        lineStarts = starts.ToImmutable();
    }

    /// <summary>The name shown in messages.</summary>
    public string Name { get; }

    /// <summary>The characters.</summary>
    public string Content { get; }

    /// <summary>SHA-256 of the text in UTF-8, in lower-case hexadecimal digits.</summary>
    public string Sha256 => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(Content)));

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

    /// <summary>Column number, counted from 1, of an offset.</summary>
    public int ColumnOf(int offset) => offset - lineStarts[LineOf(offset) - 1] + 1;

    /// <summary>The characters of a line (counted from 1) without its line break.</summary>
    public string Line(int number)
    {
        var start = lineStarts[number - 1];
        var end = number < lineStarts.Length ? lineStarts[number] : Content.Length;
        return Content[start..end].TrimEnd('\r', '\n');
    }
}
