using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Html;

/// <summary>The poles of an interval on the s-plane: the angle is the pole's own, the distance from the
/// middle the logarithm of its magnitude, so that slow and fast ones both show.</summary>
internal static class PolePlane
{
    /// <summary>Width of a picture in points.</summary>
    public const double Width = 330;

    private const double Height = 300;
    private const double Middle = 150;
    private const double Inner = 16;
    private const double Outer = 124;

    /// <summary>The picture of one interval; all intervals of a result share their circles.</summary>
    public static Drawing Draw(TransientResult result, IntervalResult interval, PlotFonts fonts)
    {
        var magnitudes = result.Intervals.SelectMany(i => i.Poles).Select(Magnitude)
            .Where(m => m > 0).ToArray();
        var first = magnitudes.Length == 0 ? 0 : (int)Math.Floor(Math.Log10(magnitudes.Min()) - 0.15);
        var last = magnitudes.Length == 0 ? 1 : (int)Math.Ceiling(Math.Log10(magnitudes.Max()) + 0.15);
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        AddCircles(shapes, first, last);
        foreach (var pole in interval.Poles)
        {
            AddPole(shapes, pole, Radius(Magnitude(pole), first, last), fonts);
        }

        return new Drawing(Width, Height, Words(interval), shapes.ToImmutable());
    }

    private static void AddCircles(ImmutableArray<Shape>.Builder shapes, int first, int last)
    {
        var step = Math.Max(1, (int)Math.Ceiling((last - first) / 5.0));
        var (start, end, axis) = (Middle - Outer - 8, Middle + Outer + 8, new Stroke(PlotStyle.Axis, 1));
        shapes.Add(new LineShape(start, Middle, end, Middle, axis));
        shapes.Add(new LineShape(Middle, start, Middle, end, axis));
        for (var decade = last; decade > first; decade -= step)
        {
            var radius = Radius(Math.Pow(10, decade), first, last);
            shapes.Add(new PolylineShape(Circle(radius), new(PlotStyle.Grid, 1)));
            var label = EngineeringNumber.Format(Math.Pow(10, decade), "", 1);
            var corner = Middle + (radius * Math.Sqrt(0.5));
            shapes.Add(new TextShape(corner + 2, corner + 10, label, 10, PlotStyle.Grey, HasHalo: true));
        }

        shapes.Add(new TextShape(Middle + Outer + 10, Middle - 6, "re (1/s)", 10, PlotStyle.Grey));
        shapes.Add(new TextShape(Middle + 6, Middle - Outer - 10, "im (rad/s)", 10, PlotStyle.Grey));
    }

    private static ImmutableArray<PlotPoint> Circle(double radius) =>
    [
        .. Enumerable.Range(0, 73).Select(i => i * Math.PI / 36)
            .Select(a => new PlotPoint(Middle + (radius * Math.Cos(a)), Middle + (radius * Math.Sin(a)))),
    ];

    private static void AddPole(
        ImmutableArray<Shape>.Builder shapes, Pole pole, double radius, PlotFonts fonts)
    {
        var angle = Math.Atan2(pole.Im, pole.Re);
        var (x, rise) = (Middle + (radius * Math.Cos(angle)), radius * Math.Sin(angle));
        if (Magnitude(pole) == 0)
        {
            (x, rise) = (Middle, 0);
        }

        foreach (var y in pole.Im == 0 ? (double[])[Middle] : [Middle - rise, Middle + rise])
        {
            shapes.Add(new LineShape(x - 4, y - 4, x + 4, y + 4, new(PlotStyle.Ink, 1.8)));
            shapes.Add(new LineShape(x - 4, y + 4, x + 4, y - 4, new(PlotStyle.Ink, 1.8)));
            if (pole.Multiplicity > 1)
            {
                var text = $"{pole.Multiplicity}×";
                shapes.Add(new TextShape(x - 5 - fonts.Width(text, 10), y - 5, text, 10, PlotStyle.Ink));
            }
        }
    }

    private static double Magnitude(Pole pole) => Math.Sqrt((pole.Re * pole.Re) + (pole.Im * pole.Im));

    private static double Radius(double magnitude, int first, int last) =>
        magnitude == 0 ? 0 : Inner + ((Math.Log10(magnitude) - first) / (last - first) * (Outer - Inner));

    private static string Words(IntervalResult interval)
    {
        var real = interval.Poles.Where(p => p.Im == 0).Sum(p => p.Multiplicity);
        var pairs = interval.Poles.Where(p => p.Im != 0).Sum(p => p.Multiplicity);
        var growing = interval.Poles.Count(p => p.Re > 0);
        return $"s-plane: {real} real poles, {pairs} conjugate pairs, {growing} growing; "
            + "figures in the table below";
    }
}
