using System.Globalization;
using System.Text;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Cuts a text into statements, and a statement into tokens.</summary>
internal sealed class StatementLexer(SourceText source)
{
    /// <summary>The most tokens of one statement, which bounds memory: straight lines through some three
    /// hundred thousand points.</summary>
    public const int MostTokens = 2_000_000;

    private readonly string content = source.Content;
    private int position;

    /// <summary>Whether the statement last read had more than <see cref="MostTokens"/> and was cut.</summary>
    public bool IsCut { get; private set; }

    /// <summary>Reads the next statement into an empty list; false at the end of the text.</summary>
    public bool Next(List<Token> tokens)
    {
        IsCut = false;
        while (position < content.Length && tokens.Count == 0)
        {
            ScanLine(tokens);
        }

        while (tokens.Count > 0 && !IsCut && GoesOn(tokens[^1]) && ScanNextLine(tokens))
        {
        }

        return tokens.Count > 0;
    }

    private static bool GoesOn(Token last) => last.Sign is ',' or ':' or '+' or '-';

    /// <summary>Adds the next line, past comments, unless it is blank or starts a
    /// statement of its own.</summary>
    private bool ScanNextLine(List<Token> tokens)
    {
        while (position < content.Length)
        {
            var (before, count) = (position, tokens.Count);
            var isComment = ScanLine(tokens);
            if (tokens.Count == count && isComment)
            {
                continue;
            }

            if (tokens.Count > count && !StatementKeyWords.Start(content, tokens, count))
            {
                return true;
            }

            tokens.RemoveRange(count, tokens.Count - count);
            position = before;
            return false;
        }

        return false;
    }

    /// <summary>Scans to the end of the line; tells whether a comment ended it.</summary>
    private bool ScanLine(List<Token> tokens)
    {
        var isComment = false;
        while (position < content.Length && content[position] != '\n')
        {
            if (content[position] == '#')
            {
                isComment = true;
                position = EndOfLine();
            }
            else if (IsBlank())
            {
                position++;
            }
            else
            {
                Add(tokens, Scan());
            }
        }

        position = Math.Min(position + 1, content.Length);
        return isComment;
    }

    private void Add(List<Token> tokens, Token token)
    {
        if (tokens.Count < MostTokens)
        {
            tokens.Add(token);
            position = token.End;
        }
        else
        {
            IsCut = true;
            var length = content.AsSpan(position).IndexOf('\n');
            position = length < 0 ? content.Length : position + length;
        }
    }

    private bool IsBlank() => content[position] switch
    {
        ' ' or '\t' or '\uFEFF' => true,
        '\r' => position + 1 == content.Length || content[position + 1] == '\n',
        var c => c > '\u007F' && char.GetUnicodeCategory(c) == UnicodeCategory.SpaceSeparator,
    };

    /// <summary>A carriage return that stands alone ends a comment too: it is a
    /// mistake that must be seen.</summary>
    private int EndOfLine()
    {
        var end = content.AsSpan(position).IndexOfAny('\r', '\n');
        return end < 0 ? content.Length : position + end;
    }

    private Token Scan()
    {
        var c = content[position];
        if (char.IsAsciiDigit(c) || (c == '.' && IsDigit(position + 1)))
        {
            return new Token(TokenKind.Number, '\0', position, NumberEnd() - position);
        }

        if (c == '"')
        {
            var end = content.AsSpan(position + 1).IndexOfAny('"', '\r', '\n');
            return end >= 0 && content[position + 1 + end] == '"'
                ? new Token(TokenKind.Quoted, '\0', position, end + 2)
                : new Token(TokenKind.OpenQuote, '\0', position, end < 0
                ? content.Length - position
                : end + 1);
        }

        if (SignOf(c) is var sign and not '\0')
        {
            return new Token(TokenKind.Sign, sign, position, 1);
        }

        if (LettersEnd() is var word && word > position)
        {
            return new Token(TokenKind.Word, '\0', position, word - position);
        }

        return Superscript.End(content, position) is var superscript && superscript > position
            ? new Token(TokenKind.Superscript, '\0', position, superscript - position)
            : new Token(TokenKind.Stray, '\0', position, RuneLength(position));
    }

    private static char SignOf(char c) => c switch
    {
        ',' or ':' or '(' or ')' or '[' or ']' or '/' or '*' or '^' or '=' or '+' or '-' or '%' or '°'
            or '±' => c,
        '\u2212' => '-',
        '·' or '×' or '\u22C5' => '·',
        _ => '\0',
    };

    private int NumberEnd()
    {
        var end = DigitsEnd(position);
        if (end < content.Length && content[end] == '.' && IsDigit(end + 1))
        {
            end = DigitsEnd(end + 1);
        }

        if (end >= content.Length || content[end] is not ('e' or 'E'))
        {
            return end;
        }

        var isSigned = end + 1 < content.Length && content[end + 1] is '+' or '-' or '\u2212';
        var exponent = isSigned ? end + 2 : end + 1;
        return IsDigit(exponent) ? DigitsEnd(exponent) : end;
    }

    private int DigitsEnd(int start)
    {
        var length = content.AsSpan(start).IndexOfAnyExceptInRange('0', '9');
        return length < 0 ? content.Length : start + length;
    }

    private bool IsDigit(int place) => place < content.Length && char.IsAsciiDigit(content[place]);

    private int LettersEnd()
    {
        var end = position;
        while (end < content.Length)
        {
            var c = content[end];
            if (char.IsAsciiLetter(c) || (end > position && (char.IsAsciiDigit(c) || c == '_')))
            {
                end++;
            }
            else if (c > '\u007F' && Rune.TryGetRuneAt(content, end, out var rune)
                && (Rune.IsLetter(rune) || (end > position && IsMark(rune))))
            {
                end += rune.Utf16SequenceLength;
            }
            else
            {
                break;
            }
        }

        return end;
    }

    /// <summary>Accents may come as characters of their own, and belong to their letter.</summary>
    private static bool IsMark(Rune rune) => Rune.GetUnicodeCategory(rune)
        is UnicodeCategory.NonSpacingMark or UnicodeCategory.SpacingCombiningMark;

    private int RuneLength(int place) =>
        Rune.TryGetRuneAt(content, place, out var rune) ? rune.Utf16SequenceLength : 1;
}
