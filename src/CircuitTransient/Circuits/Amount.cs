using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>A value with as few digits as say it exactly: <c>1.1 kV</c>, <c>500 V/µs</c>, <c>2
/// %</c>.</summary>
internal static class Amount
{
    // what a user writes is shorter; a computed value is shown to six digits
    private const int MostDigits = 9;
    // relative; a decimal number scaled by its prefix is off by a rounding or two
    private const double Exact = 1e-13;

    /// <summary>Writes a value in SI; a fraction where the unit is per cent.</summary>
    public static string Of(double value, string unit)
    {
        var shown = unit == "%" ? value * 100 : value;
        for (var digits = 1; digits <= MostDigits; digits++)
        {
            var rounded = double.Parse(shown.ToString($"E{digits - 1}"));
            if (Math.Abs(rounded - shown) <= Exact * Math.Abs(shown))
            {
                return EngineeringNumber.Format(shown, unit, digits);
            }
        }

        return EngineeringNumber.Format(shown, unit, 6);
    }
}
