using System.Collections.Immutable;

namespace CircuitTransient.Studies.Scans;

/// <summary>How large figures are over a scan, and what of them is rounding.</summary>
internal static class FigureSizes
{
    /// <summary>Of a figure's size: what is less is no change of the figure.</summary>
    public const double Rounding = 1e-10;

    private const double Nothing = 1e-13; // of a figure's size: what is less is what rounding left of zero

    /// <summary>The greatest magnitude of a figure over the points; of an extreme that of the other extreme
    /// too.</summary>
    public static double Of(
        ImmutableArray<StudyFigure> figures, ImmutableArray<ScanPoint> points, int figure)
    {
        var own = figures[figure];
        var isExtreme = own.Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum;
        var alike = Enumerable.Range(0, figures.Length).Where(f => f == figure
            || (isExtreme && figures[f].Index == own.Index
                && figures[f].Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum)).ToArray();
        return points.SelectMany(p => alike.Select(f => Math.Abs(p.Found?.Values[f] ?? 0)))
            .Where(double.IsFinite).DefaultIfEmpty().Max();
    }

    /// <summary>Whether a figure is the same at all points. Of what is judged a gap parts the range, so that
    /// nothing is said to hold there.</summary>
    public static bool IsFlat(IEnumerable<double> values, double size, bool isJudged)
    {
        var known = values.Where(y => isJudged || !double.IsNaN(y)).ToArray();
        return known.Length > 0 && known.All(double.IsFinite)
            && known.Max() - known.Min() <= Rounding * size;
    }

    /// <summary>Points in which the rounding left of a zero is zero.</summary>
    public static ImmutableArray<ScanPoint> Cleaned(
        ImmutableArray<StudyFigure> figures, ImmutableArray<ScanPoint> points)
    {
        var sizes = figures.Select((_, f) => Of(figures, points, f)).ToArray();
        return [.. points.Select(p => p.Found is not { } found ? p : p with
        {
            Found = found with
            {
                Values = [.. found.Values.Select((v, f) => v is { } value ? Clean(value, sizes[f]) : v)],
            },
        })];
    }

    /// <summary>Zero for what rounding left of it.</summary>
    public static double Clean(double value, double size) => Math.Abs(value) <= Nothing * size ? 0 : value;
}
