using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies;

/// <summary>A series of preferred numbers of IEC 60063; its number is that of values in a decade.</summary>
public enum PreferredSeries
{
    /// <summary>Three values a decade.</summary>
    E3 = 3,

    /// <summary>Six values a decade, the usual ones of capacitors.</summary>
    E6 = 6,

    /// <summary>Twelve values a decade.</summary>
    E12 = 12,

    /// <summary>Twenty-four values a decade, the usual ones of resistors.</summary>
    E24 = 24,

    /// <summary>Forty-eight values a decade, to three digits.</summary>
    E48 = 48,

    /// <summary>Ninety-six values a decade, to three digits.</summary>
    E96 = 96,

    /// <summary>A hundred and ninety-two values a decade, to three digits.</summary>
    E192 = 192,
}

/// <summary>The preferred values of resistors, capacitors and coils, IEC 60063.</summary>
public static class PreferredValues
{
    private const int LowestDecade = -300; // a factor of 10⁸ within the range of a double, at both ends
    private const int HighestDecade = 300;

    // E3 to E24 do not follow the rounding of 10^(i/24): 27 30 33 36 39 43 47 82 stand where it would give
    // 26 29 32 35 38 42 46 83. (Values as makers quote them.)
    private static readonly ImmutableArray<int> TwoDigits =
    [
        10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91,
    ];

    // 100·10^(i/192) rounded, but for 919.48, for which 920 stands (from memory).
    private static readonly ImmutableArray<int> ThreeDigits =
    [
        .. Enumerable.Range(0, 192)
            .Select(i => i == 185 ? 920 : (int)Math.Round(Math.Pow(10, 2 + (i / 192.0)))),
    ];

    /// <summary>The names of the series, as a user writes them.</summary>
    public static IEnumerable<string> Names =>
        Enum.GetValues<PreferredSeries>().Select(series => $"{series}");

    /// <summary>Reads the name of a series, <c>E12</c> or <c>e12</c>.</summary>
    public static bool TryRead(string text, out PreferredSeries series)
    {
        var found = Enum.GetValues<PreferredSeries>()
            .Where(s => $"{s}".Equals(text.Trim(), StringComparison.OrdinalIgnoreCase)).ToArray();
        series = found.FirstOrDefault();
        return found.Length == 1;
    }

    /// <summary>The values of one decade, ascending: two digits up to E24, then three.</summary>
    public static ImmutableArray<int> Decade(PreferredSeries series)
    {
        var all = series <= PreferredSeries.E24 ? TwoDigits : ThreeDigits;
        var step = all.Length / (int)series;
        return [.. Enumerable.Range(0, (int)series).Select(i => all[i * step])];
    }

    /// <summary>The values from one limit to another, both included, ascending, each the nearest double to
    /// its decimal digits.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A limit is not positive or out of all use.</exception>
    public static IEnumerable<double> Between(PreferredSeries series, double lowest, double highest)
    {
        RefuseOutOfRange(lowest);
        RefuseOutOfRange(highest);
        return From(series, DecadeOf(lowest)).SkipWhile(v => v < lowest).TakeWhile(v => v <= highest);
    }

    /// <summary>The greatest value that is not above a limit.</summary>
    /// <exception cref="ArgumentOutOfRangeException">It is not positive or out of all use.</exception>
    public static double AtMost(PreferredSeries series, double limit)
    {
        RefuseOutOfRange(limit);
        return From(series, DecadeOf(limit) - 1).TakeWhile(v => v <= limit).Last();
    }

    /// <summary>The least value that is not below a limit.</summary>
    /// <exception cref="ArgumentOutOfRangeException">It is not positive or out of all use.</exception>
    public static double AtLeast(PreferredSeries series, double limit)
    {
        RefuseOutOfRange(limit);
        return From(series, DecadeOf(limit)).First(v => v >= limit);
    }

    /// <summary>The value nearest in ratio: of two neighbours the one that deviates by the smaller
    /// factor.</summary>
    /// <exception cref="ArgumentOutOfRangeException">It is not positive or out of all use.</exception>
    public static double Nearest(PreferredSeries series, double value)
    {
        var below = AtMost(series, value);
        var above = AtLeast(series, value);
        return value / below <= above / value ? below : above;
    }

    private static IEnumerable<double> From(PreferredSeries series, int decade)
    {
        var digits = Decade(series);
        var shift = series <= PreferredSeries.E24 ? 1 : 2;
        for (; decade <= HighestDecade + 1; decade++)
        {
            foreach (var value in digits)
            {
                yield return DecimalText.TryRead($"{value}", decade - shift, 1, out var read)
                    ? read
                    : throw new System.Diagnostics.UnreachableException($"{value} in decade {decade}");
            }
        }
    }

    /// <summary>A decade that begins at the value or before it, at most one too early.</summary>
    private static int DecadeOf(double value) => (int)Math.Floor(Math.Log10(value) - 1e-9);

    private static void RefuseOutOfRange(double value)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, Math.Pow(10, LowestDecade));
        ArgumentOutOfRangeException.ThrowIfGreaterThan(value, Math.Pow(10, HighestDecade));
    }
}
