using System.Globalization;
using System.Text;

namespace CircuitTransient.Text;

/// <summary>A line of a source as shown under a message, and the marks that
/// underline the fault in it.</summary>
/// <param name="Line">The line, or a window of a long one; what cannot be printed is replaced.</param>
/// <param name="Underline">Blanks and marks that stand under it; a tab stays a tab.</param>
internal sealed record Excerpt(string Line, string Underline)
{
    private const int Widest = 160; // a longer line is cut to a window; common practice, no source
    private const int Before = 60;
    private const int After = 100;

    /// <summary>The line a span begins in; null where that line is blank.</summary>
    public static Excerpt? Around(SourceText source, TextSpan span)
    {
        var line = source.SpanOfLine(source.LineOf(span.Start));
        var content = source.Content.AsSpan(line.Start, line.Length);
        if (content.IsWhiteSpace())
        {
            return null;
        }

        var start = Math.Min(span.Start - line.Start, content.Length);
        var end = Math.Min(Math.Max(span.End - line.Start, start), content.Length);
        var (from, to) = (0, content.Length);
        if (content.Length > Widest)
        {
            from = Inside(content, Math.Max(0, start - Before));
            to = Inside(content, Math.Min(content.Length, start + After));
        }
        else
        {
            from = content.Length - content.TrimStart().Length;
        }

        from = Math.Min(from, start);
        var shown = new StringBuilder(from > 0 && content.Length > Widest ? "…" : "");
        var marks = new StringBuilder(shown.Length == 0 ? "" : " ");
        AppendPrintable(shown, content[from..to]);
        AppendBlanks(marks, content[from..start]);
        marks.Append('^', Math.Max(1, Width(content[start..Math.Min(end, to)])));
        shown.Append(to < content.Length ? "…" : "");
        return new Excerpt(shown.ToString().TrimEnd(), marks.ToString());
    }

    /// <summary>Appends a text with everything replaced that would move the cursor or hide.</summary>
    public static void AppendPrintable(StringBuilder target, ReadOnlySpan<char> text)
    {
        foreach (var rune in text.EnumerateRunes())
        {
            target.Append(IsPrintable(rune) ? rune.ToString() : "\uFFFD");
        }
    }

    private static bool IsPrintable(Rune rune) => rune.Value == '\t' || Rune.GetUnicodeCategory(rune)
        is not (UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.Surrogate
            or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator);

    private static void AppendBlanks(StringBuilder target, ReadOnlySpan<char> text)
    {
        foreach (var rune in text.EnumerateRunes())
        {
            if (rune.Value == '\t')
            {
                target.Append('\t');
            }
            else
            {
                target.Append(' ', Width(rune));
            }
        }
    }

    private static int Width(ReadOnlySpan<char> text)
    {
        var width = 0;
        foreach (var rune in text.EnumerateRunes())
        {
            width += Width(rune);
        }

        return width;
    }

    /// <summary>Columns a character takes on a terminal: East Asian wide blocks two (Unicode UAX 11, from
    /// memory, whole blocks), a combining mark none.</summary>
    private static int Width(Rune rune) => rune.Value switch
    {
        _ when Rune.GetUnicodeCategory(rune) is UnicodeCategory.NonSpacingMark
            or UnicodeCategory.EnclosingMark => 0,
        (>= 0x1100 and <= 0x115F) or (>= 0x2E80 and <= 0xA4CF) or (>= 0xAC00 and <= 0xD7A3)
            or (>= 0xF900 and <= 0xFAFF) or (>= 0xFE30 and <= 0xFE6F) or (>= 0xFF00 and <= 0xFF60)
            or (>= 0xFFE0 and <= 0xFFE6) or (>= 0x1F300 and <= 0x1FAFF) or (>= 0x20000 and <= 0x3FFFD) => 2,
        _ => 1,
    };

    /// <summary>An offset that does not cut a surrogate pair.</summary>
    private static int Inside(ReadOnlySpan<char> text, int offset) =>
        offset > 0 && offset < text.Length && char.IsLowSurrogate(text[offset]) ? offset - 1 : offset;
}
