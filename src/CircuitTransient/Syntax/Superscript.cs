namespace CircuitTransient.Syntax;

/// <summary>Powers written in superscript digits: <c>10³</c>, <c>10⁻³</c>.</summary>
internal static class Superscript
{
    private const string Digits = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>Where a run of superscript digits with an optional sign ends; the
    /// start where there is none.</summary>
    public static int End(string content, int start)
    {
        var first = content[start] is '⁻' or '⁺' ? start + 1 : start;
        var end = first;
        while (end < content.Length && Digits.Contains(content[end]))
        {
            end++;
        }

        return end == first ? start : end;
    }

    /// <summary>The value of a run; a power past all use is held at a thousand.</summary>
    public static int Read(ReadOnlySpan<char> text)
    {
        var value = 0;
        foreach (var c in text.TrimStart("⁻⁺"))
        {
            value = Math.Min((value * 10) + Digits.IndexOf(c), 1000);
        }

        return text[0] == '⁻' ? -value : value;
    }
}
