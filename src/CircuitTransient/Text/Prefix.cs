namespace CircuitTransient.Text;

/// <summary>The decimal prefixes of units, read and written nowhere else.</summary>
public static class Prefix
{
    /// <summary>The prefixes as words, for advice.</summary>
    public const string All = "f p n µ m k M G T";

    /// <summary>The power of ten of a prefix; case matters.</summary>
    public static bool TryRead(char symbol, out int exponent)
    {
        exponent = symbol switch
        {
            'f' => -15,
            'p' => -12,
            'n' => -9,
            'u' or '\u00B5' or '\u03BC' => -6,
            'm' => -3,
            'k' => 3,
            'M' => 6,
            'G' => 9,
            'T' => 12,
            _ => 0,
        };
        return exponent != 0;
    }

    /// <summary>The prefix of a power of ten; null where there is none. No prefix stands for 10⁰.</summary>
    public static string? Write(int exponent) => exponent switch
    {
        -15 => "f",
        -12 => "p",
        -9 => "n",
        -6 => "µ",
        -3 => "m",
        0 => "",
        3 => "k",
        6 => "M",
        9 => "G",
        12 => "T",
        _ => null,
    };
}
