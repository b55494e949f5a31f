using System.Collections.Immutable;
using System.Globalization;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Values with no more digits than a part is bought or set by, where they hold too.</summary>
internal static class ShortValues
{
    private const int Digits = 6;

    /// <summary>Each value to six digits, up or down, whichever is nearest and holds; the values as they are
    /// where none does.</summary>
    /// <param name="exact">The values found.</param>
    /// <param name="parts">What they are values of.</param>
    /// <param name="judge">Solves for values, at every corner that is looked at.</param>
    public static SizePoint Of(
        SizePoint exact, ImmutableArray<SizedValue> parts, Func<ImmutableArray<double>, SizePoint> judge)
    {
        IEnumerable<ImmutableArray<double>> all = [[]];
        foreach (var (part, value) in parts.Zip(exact.Values))
        {
            all = [.. all.SelectMany(start => Around(value)
                .Where(v => v >= part.Lowest && v <= part.Highest).Select(v => start.Add(v)))];
        }

        return all.OrderBy(values => values.Zip(exact.Values, (v, e) => Math.Abs(Math.Log(v / e))).Sum())
            .Select(judge).FirstOrDefault(point => point.Holds) ?? exact;
    }

    private static IEnumerable<double> Around(double value)
    {
        var power = (int)Math.Floor(Math.Log10(value)) - Digits + 1;
        var steps = value / Math.Pow(10, power);
        return ((double[])[Math.Floor(steps), Math.Ceiling(steps)]).Distinct().Select(count =>
            double.Parse($"{count:F0}E{power}", CultureInfo.InvariantCulture));
    }
}
