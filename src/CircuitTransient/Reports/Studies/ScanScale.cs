using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>A scanned value laid out between two places, evenly or by its logarithm.</summary>
internal sealed record ScanScale(ScanAxis Axis, double Start, double End)
{
    private static readonly double[] AngleSteps = [1, 2, 5, 10, 15, 30, 45, 60, 90];

    /// <summary>Whether equal factors are equally wide.</summary>
    public bool IsLogarithmic => Axis.Spacing == ScanSpacing.Logarithmic
        || (Axis.Spacing == ScanSpacing.Preferred && Axis.To >= 10 * Axis.From);

    /// <summary>The even scale of what <see cref="Map"/> gives.</summary>
    public PlotScale Even => new(Map(Axis.From), Map(Axis.To), Start, End);

    /// <summary>A value as it is laid out.</summary>
    public double Map(double value) => IsLogarithmic ? Math.Log10(value) : value;

    /// <summary>The place of a value.</summary>
    public double Place(double value) => Even.Place(Map(value));

    /// <summary>Round values with their labels.</summary>
    public PlotTicks Ticks(int aim)
    {
        if (IsLogarithmic)
        {
            return Decades();
        }

        if (!Axis.IsAngle)
        {
            return new PlotScale(Axis.From, Axis.To, Start, End).Ticks(Axis.Varied.Unit, aim);
        }

        var (from, to) = (Axis.From * 180 / Math.PI, Axis.To * 180 / Math.PI);
        var step = AngleSteps.FirstOrDefault(s => s >= (to - from) / aim, 180);
        var ticks = ImmutableArray.CreateBuilder<(double, string)>();
        for (var k = Math.Ceiling((from / step) - 1e-9); k * step <= to + (1e-9 * step); k++)
        {
            var degrees = (k * step) + 0.0; // no -0
            ticks.Add((degrees * Math.PI / 180, degrees.ToString("0.##", CultureInfo.InvariantCulture)));
        }

        return new PlotTicks(ticks.ToImmutable(), "°");
    }

    // 1, 2 and 5 of each decade; of many decades their beginnings.
    private PlotTicks Decades()
    {
        var count = Math.Log10(Axis.To / Axis.From);
        int[] digits = count > 6 ? [1] : count > 3 ? [1, 3] : count > 1.2 ? [1, 2, 5] : [1, 2, 3, 4, 5, 6, 8];
        var ticks = ImmutableArray.CreateBuilder<(double, string)>();
        for (var decade = (int)Math.Floor(Math.Log10(Axis.From)); decade <= Math.Log10(Axis.To); decade++)
        {
            foreach (var value in digits.Select(d => d * Math.Pow(10, decade))
                .Where(v => v >= Axis.From * (1 - 1e-9) && v <= Axis.To * (1 + 1e-9)))
            {
                ticks.Add((value, EngineeringNumber.Format(value, Axis.Varied.Unit, 1)));
            }
        }

        return new PlotTicks(ticks.ToImmutable(), "");
    }
}
