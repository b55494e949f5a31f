namespace CircuitTransient.Text;

/// <summary>Marking codes of IEC 60062, in which a letter stands for the decimal mark:
/// <c>4k7</c>, <c>R047</c>.</summary>
public static class MarkingCode
{
    // Letters as quoted in secondary sources for IEC 60062:2016; m and F of capacitors from memory; n, µ, m
    // for inductors, u for µ and k for K are custom and not the code.
    private const string Letters = "RLKkMGmuµμnpF";

    /// <summary>Reads a code whatever it marks; the value is in the SI unit the part says. Of letters that
    /// lead only R is read, since `L47`, `M2`, `n1` are names everybody gives.</summary>
    public static bool TryRead(string text, out double value)
    {
        value = 0;
        return LetterOf(text) is var place && (place > 0 || text is ['R', ..]) && TryReadAny(text, out value);
    }

    private static bool TryReadAny(string text, out double value)
    {
        value = 0;
        var place = LetterOf(text);
        if (place < 0 || text.Length is < 2 or > 16 || !Letters.Contains(text[place])
            || text.AsSpan(place + 1).ContainsAnyExceptInRange('0', '9'))
        {
            return false;
        }

        var digits = string.Concat(place == 0
            ? "0"
            : text.AsSpan(0, place), ".", text.AsSpan(place + 1), "0");
        return DecimalText.TryRead(digits, Exponent(text[place]), 1, out value);
    }

    /// <summary>Reads a code on a part of the dimension given, whichever letter leads: a resistor's letters
    /// are not a capacitor's.</summary>
    public static bool TryRead(string text, Dimension dimension, out double value) =>
        TryReadAny(text, out value) && text[LetterOf(text)] is var letter
        && (dimension == Dimension.Resistance ? "RLKkMG".Contains(letter)
            : dimension == Dimension.Capacitance ? "pnuµμmF".Contains(letter)
            : dimension == Dimension.Inductance && "nuµμm".Contains(letter));

    private static int LetterOf(string text) => text.AsSpan().IndexOfAnyExceptInRange('0', '9');

    private static int Exponent(char letter) => letter switch
    {
        'R' or 'F' => 0,
        'L' => -3,
        'K' => 3,
        _ => Prefix.TryRead(letter, out var exponent) ? exponent : 0,
    };
}
