using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>A logarithmic axis: positive values laid out between two places.</summary>
internal sealed record LogScale(double From, double To, double Start, double End)
{
    private const int MostMarks = 12;

    /// <summary>The place of a value.</summary>
    public double Place(double value) =>
        Start + (Math.Log(value / From) / Math.Log(To / From) * (End - Start));

    /// <summary>Marks at 1, 2 and 5 of each decade, or at 1 only where there are many decades; within less
    /// than a decade, at round steps.</summary>
    public ImmutableArray<(double Value, string Label)> Marks(string unit)
    {
        var decades = Math.Log10(To / From);
        double[] digits = decades > 4 ? [1] : decades > 1 ? [1, 2, 5] : [1, 1.5, 2, 2.5, 3, 4, 5, 6, 7, 8, 9];
        var first = (int)Math.Floor(Math.Log10(From));
        var last = (int)Math.Ceiling(Math.Log10(To));
        return
        [
            .. Enumerable.Range(first, last - first + 1)
                .SelectMany(decade => digits.Select(digit => digit * Math.Pow(10, decade)))
                .Where(value => value >= From * (1 - 1e-9) && value <= To * (1 + 1e-9))
                .Take(3 * MostMarks)
                .Select(value => (value, Label(value, unit))),
        ];
    }

    private static string Label(double value, string unit)
    {
        var digits = Math.Log10(value) - Math.Floor(Math.Log10(value) + 1e-9);
        var isHalf = Math.Abs(Math.Pow(10, digits) % 1 - 0.5) < 1e-6;
        return EngineeringNumber.Format(value, unit, isHalf ? 2 : 1);
    }
}
