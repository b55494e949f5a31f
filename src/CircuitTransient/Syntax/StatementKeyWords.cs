namespace CircuitTransient.Syntax;

/// <summary>The words a statement starts with.</summary>
internal static class StatementKeyWords
{
    /// <summary>All of them.</summary>
    public static readonly string[] All =
    [
        "circuit", "note", "reference", "value", "resistor", "capacitor", "inductor", "coupling",
        "transformer", "source", "dependent", "switch", "observe", "require", "start", "until", "repeat",
        "assembly", "place", "end",
    ];

    /// <summary>Whether the line whose tokens begin at an index of an unfinished statement starts one of its
    /// own: a key word, and then what follows a key word and cannot follow a name or value.</summary>
    public static bool Start(string content, List<Token> tokens, int index)
    {
        var word = tokens[index];
        if (word.Kind != TokenKind.Word || !IsIn(content, word))
        {
            return false;
        }

        if (index + 1 == tokens.Count)
        {
            var isNameList = Text(content, tokens[0]) is "assembly" or "place";
            return !isNameList && Text(content, word) is "end";
        }

        return tokens[index + 1].Kind is TokenKind.Word or TokenKind.Quoted or TokenKind.Number;
    }

    private static bool IsIn(string content, Token word)
    {
        foreach (var known in All)
        {
            if (Text(content, word).SequenceEqual(known))
            {
                return true;
            }
        }

        return false;
    }

    private static ReadOnlySpan<char> Text(string content, Token token) =>
        content.AsSpan(token.Start, token.Length);
}
