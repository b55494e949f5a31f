using System.Globalization;
using System.Text;

namespace CircuitTransient.Reports;

/// <summary>How many columns of a terminal a text takes.</summary>
public static class DisplayWidth
{
    // East Asian Wide and Fullwidth blocks and the pictographs (Unicode Standard Annex 11; ranges from
    // memory, whole blocks rather than single characters: at worst a line is shorter than it could be).
    private static readonly (int First, int Last)[] Wide =
    [
        (0x1100, 0x115F), (0x231A, 0x231B), (0x23E9, 0x23F3), (0x25FD, 0x25FE), (0x2614, 0x2615),
        (0x2648, 0x2653), (0x26A1, 0x26A1), (0x2705, 0x2705), (0x274C, 0x274E), (0x2753, 0x2757),
        (0x2795, 0x2797), (0x2B1B, 0x2B55), (0x2E80, 0x303E), (0x3041, 0xA4CF), (0xA960, 0xA97F),
        (0xAC00, 0xD7A3), (0xF900, 0xFAFF), (0xFE30, 0xFE6F), (0xFF00, 0xFF60), (0xFFE0, 0xFFE6),
        (0x1F000, 0x1FAFF), (0x20000, 0x3FFFD),
    ];

    /// <summary>The columns of a text.</summary>
    public static int Of(string text) => text.EnumerateRunes().Sum(Of);

    /// <summary>The columns of one character: none, one or two.</summary>
    public static int Of(Rune rune)
    {
        if (rune.Value < 0x300)
        {
            return 1;
        }

        if (Rune.GetUnicodeCategory(rune) is UnicodeCategory.NonSpacingMark or UnicodeCategory.EnclosingMark
            or UnicodeCategory.Format)
        {
            return 0;
        }

        return Wide.Any(range => range.First <= rune.Value && rune.Value <= range.Last) ? 2 : 1;
    }

    /// <summary>The text with every control character and direction override shown as U+FFFD, so that a name
    /// in a circuit file cannot command the terminal.</summary>
    public static string Printable(string text)
    {
        var printable = new StringBuilder(text.Length);
        foreach (var rune in text.EnumerateRunes())
        {
            printable.Append(Commands(rune) ? "\uFFFD" : rune.ToString());
        }

        return printable.ToString();
    }

    private static bool Commands(Rune rune) =>
        Rune.IsControl(rune) || rune.Value is (>= 0x202A and <= 0x202E) or (>= 0x2066 and <= 0x2069);
}
