using System.Text;

namespace CircuitTransient.Syntax;

/// <summary>What to say of a character that means nothing in a circuit.</summary>
internal static class StrayCharacter
{
    public static void Report(StatementCursor cursor, Token token)
    {
        var text = cursor.TextOf(token);
        var code = Rune.DecodeFromUtf16(text, out var rune, out _) == System.Buffers.OperationStatus.Done
            ? rune.Value
            : text[0];
        var shown = Rune.IsControl(new Rune(code is >= 0xD800 and < 0xE000
            ? 0xFFFD
            : code)) || IsInvisible(code)
            ? $"the character U+{code:X4}"
            : $"`{text}` (U+{code:X4})";
        cursor.Error(token.Span, $"{shown} means nothing in a circuit", Advice(code));
    }

    private static bool IsInvisible(int code) => code is 0xAD or 0x85 or (>= 0x200B and <= 0x200F)
        or (>= 0x2028 and <= 0x202E) or (>= 0x2060 and <= 0x206F) or (>= 0xD800 and < 0xE000);

    private static string Advice(int code) => code switch
    {
        '\r' => "end lines with a line feed, alone or after a carriage return",
        0x201C or 0x201D or 0x201E or 0x201F or 0xAB or 0xBB or '\'' or '`' or 0x2018 or 0x2019 =>
            "put names and texts in straight double quotes, `\"`",
        (>= 0x2010 and <= 0x2015) or 0xFE63 or 0xFF0D => "write the minus sign as `-`",
        ';' => "a statement ends with its line; comments start with `#`",
        '.' => "write digits on both sides of the decimal point: `0.5`, `5.0`",
        '_' => "a name starts with a letter, or stands in quotes",
        _ => "leave it out; in a name, put the whole name in quotes",
    };
}
