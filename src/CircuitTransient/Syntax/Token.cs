using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>The kinds of tokens.</summary>
internal enum TokenKind : byte
{
    /// <summary>The end of the statement.</summary>
    End,

    /// <summary>A key word, name or unit.</summary>
    Word,

    /// <summary>Digits with an optional point and exponent.</summary>
    Number,

    /// <summary>A text in quotes, which are part of the token.</summary>
    Quoted,

    /// <summary>Superscript digits with an optional superscript sign.</summary>
    Superscript,

    /// <summary>One of <c>, : ( ) [ ] / * ^ = + - % ° ± ·</c>.</summary>
    Sign,

    /// <summary>A quote that its line does not close.</summary>
    OpenQuote,

    /// <summary>A character that means nothing.</summary>
    Stray,
}

/// <summary>The smallest piece of a statement that means something.</summary>
/// <param name="Sign">Which sign, look-alikes made one; zero for other kinds.</param>
internal readonly record struct Token(TokenKind Kind, char Sign, int Start, int Length)
{
    public int End => Start + Length;

    public TextSpan Span => new(Start, Length);
}
