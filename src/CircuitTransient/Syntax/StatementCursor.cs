using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>A place in the tokens of a statement, and the mistakes found on the way.</summary>
internal sealed class StatementCursor(SourceText source, List<Token> tokens, List<Diagnostic> diagnostics)
{
    private readonly int errorsBefore = diagnostics.Count;
    private int position;

    /// <summary>How the thing being read is written: the advice where nothing better is known.</summary>
    public string? Form { get; set; }

    /// <summary>Whether a wave is being read, in which a bare plus or minus adds the next piece.</summary>
    public bool IsInWave { get; set; }

    /// <summary>How deep brackets and signs are nested where the cursor stands.</summary>
    public int Depth { get; set; }

    /// <summary>How much was found wrong with this statement.</summary>
    public int ErrorCount => diagnostics.Count - errorsBefore;

    /// <summary>Whether anything was found wrong with this statement.</summary>
    public bool HasErrors => ErrorCount > 0;

    /// <summary>From the statement's first character to its last.</summary>
    public TextSpan WholeSpan => TextSpan.Between(tokens[0].Span, tokens[^1].Span);

    public Token Current => Ahead(0);

    public bool IsAtEnd => Current.Kind == TokenKind.End;

    /// <summary>The end of the token before the cursor.</summary>
    public int LastEnd => position > 0 ? tokens[position - 1].End : tokens[0].Start;

    /// <summary>A place to come back to with <see cref="Return"/>.</summary>
    public (int Position, int Errors) Here => (position, diagnostics.Count);

    public void Return((int Position, int Errors) place)
    {
        position = place.Position;
        diagnostics.RemoveRange(place.Errors, diagnostics.Count - place.Errors);
    }

    public Token Ahead(int count) => position + count < tokens.Count
        ? tokens[position + count]
        : new Token(TokenKind.End, '\0', tokens[^1].End, 0);

    public ReadOnlySpan<char> TextOf(Token token) => source.Content.AsSpan(token.Start, token.Length);

    public string TextOf(TextSpan span) => source[span];

    public TextSpan SpanFrom(int start) => new(start, LastEnd - start);

    public bool IsWord(string word, int ahead = 0) =>
        Ahead(ahead) is { Kind: TokenKind.Word } token && TextOf(token).SequenceEqual(word);

    public bool IsSign(char sign, int ahead = 0) => Ahead(ahead).Sign == sign;

    /// <summary>Whether the token that many ahead follows the one before it without a blank.</summary>
    public bool IsJoined(int ahead) => Ahead(ahead).Start == Ahead(ahead - 1).End && Ahead(ahead).Length > 0;

    public Token Advance()
    {
        var token = Current;
        position = Math.Min(position + 1, tokens.Count);
        return token;
    }

    public void Advance(int count) => position = Math.Min(position + count, tokens.Count);

    public bool Take(char sign)
    {
        var isThere = IsSign(sign);
        Advance(isThere ? 1 : 0);
        return isThere;
    }

    /// <summary>Takes all of the words, or none where one is missing.</summary>
    public bool Take(params ReadOnlySpan<string> words)
    {
        for (var i = 0; i < words.Length; i++)
        {
            if (!IsWord(words[i], i))
            {
                return false;
            }
        }

        Advance(words.Length);
        return true;
    }

    public bool Expect(char sign) => Take(sign) || Unexpected($"`{sign}`");

    public bool Expect(params ReadOnlySpan<string> words)
    {
        foreach (var word in words)
        {
            if (!Take(word))
            {
                return Unexpected($"`{word}`", word);
            }
        }

        return true;
    }

    public void Error(TextSpan span, string message, string? advice = null) =>
        diagnostics.Add(Diagnostic.Error(source, span, message, advice));

    /// <summary>Says that the current token stands where something else should; always false.</summary>
    /// <param name="words">What one could have written here, from which a slip of
    /// the finger is guessed.</param>
    public bool Unexpected(string expected, params ReadOnlySpan<string> words)
    {
        var token = Current;
        switch (token.Kind)
        {
            case TokenKind.End:
                Error(token.Span, $"the statement ends where {expected} should stand", Form);
                break;
            case TokenKind.OpenQuote:
                Error(token.Span, "the quote that opens here is not closed on its line",
                    "put a `\"` where the text ends");
                break;
            case TokenKind.Stray:
                StrayCharacter.Report(this, token);
                break;
            default:
                var text = Shown(token);
                var nearest = token.Kind == TokenKind.Word ? NearestName.Find(text, words.ToArray()) : null;
                Error(token.Span, $"`{text}` stands where {expected} should",
                    nearest is null ? Form : $"did you mean `{nearest}`?");
                break;
        }

        return false;
    }

    /// <summary>Goes to the next such sign outside parentheses, those left open behind included; false where
    /// there is none.</summary>
    public bool SkipTo(char sign)
    {
        Depth = 0;
        var open = 0;
        for (var i = 0; i < tokens.Count; i++)
        {
            if (i >= position && open <= 0 && tokens[i].Sign == sign)
            {
                position = i;
                return true;
            }

            open += tokens[i].Sign == '(' ? 1 : tokens[i].Sign == ')' ? -1 : 0;
        }

        position = tokens.Count;
        return false;
    }

    /// <summary>The text of a token, cut where it would fill the screen.</summary>
    public string Shown(Token token) => Shown(token.Span);

    /// <summary>A run of the text, cut where it would fill the screen.</summary>
    public string Shown(TextSpan span)
    {
        const int most = 40;
        return span.Length <= most ? source[span] : source[new TextSpan(span.Start, most)] + "…";
    }

    /// <summary>The first word of the statement, or the key word it most likely meant, and, where it can be
    /// told, the name it gives.</summary>
    public (string KeyWord, NameSyntax? Name) Introduction()
    {
        var first = tokens[0].Kind == TokenKind.Word ? Shown(tokens[0]) : "";
        var keyWord = StatementKeyWords.All.Contains(first)
            ? first
            : NearestName.Find(first, StatementKeyWords.All) ?? first;
        var isSecond = keyWord == "dependent" && tokens.Count > 1 && TextOf(tokens[1]) is "source";
        var place = keyWord == "place" ? FindWord("as") + 1 : isSecond ? 2 : 1;
        var isNamed = keyWord is not ("circuit" or "note" or "reference" or "observe" or "require" or "start"
            or "until" or "repeat" or "end");
        if (!isNamed || place == 0 || place >= tokens.Count)
        {
            return (keyWord, null);
        }

        var here = Here;
        position = place;
        var name = NameParser.Read(this, "the name", "from", "at", "of", "primary", "with");
        Return(here);
        return (keyWord, name);
    }

    /// <summary>Every name and whole number of the statement behind its first word, as plain text.</summary>
    public IEnumerable<string> Names() => tokens.Skip(1)
        .Where(t => t.Kind is TokenKind.Word or TokenKind.Number or TokenKind.Quoted)
        .Select(t => t.Kind == TokenKind.Quoted
            ? source[new TextSpan(t.Start + 1, t.Length - 2)]
            : source[t.Span]);

    private int FindWord(string word) =>
        tokens.FindIndex(t => t.Kind == TokenKind.Word && TextOf(t).SequenceEqual(word));
}
