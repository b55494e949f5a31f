using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>An axis: values from <paramref name="From"/> to <paramref name="To"/> laid out between two
/// places.</summary>
internal sealed record PlotScale(double From, double To, double Start, double End)
{
    /// <summary>The place of a value.</summary>
    public double Place(double value) => Start + ((value - From) / (To - From) * (End - Start));

    /// <summary>Round values, about as many as aimed at, with their labels, and the unit they are
    /// in.</summary>
    public PlotTicks Ticks(string unit, int aim)
    {
        var step = Step((To - From) / aim);
        var largest = Math.Max(Math.Abs(From), Math.Abs(To));
        var exponent = unit is "%" or "°" ? 0 : 3 * (int)Math.Floor(Math.Log10(largest) / 3);
        if (unit is "V/s" or "A/s" && exponent >= 3)
        {
            // Steepness is read a millisecond or a microsecond.
            var within = exponent >= 6 ? 6 : 3;
            var (marks, inner) = (
                this with
                {
                    From = From / Math.Pow(10, within),
                    To = To / Math.Pow(10, within),
                }
            ).Ticks(unit[..1], aim);
            return new PlotTicks(
                [.. marks.Select(mark => (mark.Value * Math.Pow(10, within), mark.Label))],
                inner + (within == 6 ? "/µs" : "/ms"));
        }

        var prefix = unit is "A²s" or "%" ? null : Prefix.Write(exponent);
        var scaled =
            prefix is not null ? prefix + unit
            : exponent == 0 ? unit
            : $"{Power(exponent)} {unit}";
        var power = Math.Pow(10, exponent);
        var decimals = Math.Max(0, -(int)Math.Floor((Math.Log10(step / power)) + 1e-9));
        var ticks = ImmutableArray.CreateBuilder<(double, string)>();
        for (var i = (long)Math.Ceiling((From / step) - 1e-9); i * step <= To + (1e-9 * step); i++)
        {
            ticks.Add((i * step, Label(i * step / power, decimals)));
        }

        return new PlotTicks(ticks.ToImmutable(), scaled);
    }

    // The next of 1, 2, 5, 10 … not below a width.
    private static double Step(double width)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(width)));
        return (width / power) switch
        {
            <= 1 + 1e-9 => power,
            <= 2 => 2 * power,
            <= 5 => 5 * power,
            _ => 10 * power,
        };
    }

    private static string Power(int exponent) =>
        "10" + string.Concat($"{exponent}".Select(digit => digit == '-' ? '⁻' : "⁰¹²³⁴⁵⁶⁷⁸⁹"[digit - '0']));

    private static string Label(double value, int decimals) =>
        decimals > 6 || Math.Abs(value) >= 1e6
            ? value.ToString("0.###e0", CultureInfo.InvariantCulture)
            : (Math.Round(value, decimals) + 0.0).ToString("F" + decimals, CultureInfo.InvariantCulture);
}

/// <summary>The marks of an axis.</summary>
internal sealed record PlotTicks(ImmutableArray<(double Value, string Label)> Marks, string Unit);
