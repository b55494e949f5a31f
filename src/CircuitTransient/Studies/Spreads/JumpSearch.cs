namespace CircuitTransient.Studies.Spreads;

/// <summary>Finds where a figure, or the instant of a peak, jumps while all values go from nominal to a worst
/// point along a straight line: another crest takes over, or a quantity is caught once more.</summary>
internal sealed class JumpSearch(PointBatch batch, double[] nominal)
{
    private const int Stretches = 32;
    private const int Halvings = 30;
    private const double Share = 1e-2; // of the whole change along the line: less is not worth a word
    private const double Rounding = 1e-7; // of the figure or the instant
    private const double Alike = 1e-9; // places on the way are known to 2^-35
    private const double Aside = 1.0 / 256; // how far from the jump of an instant slopes are taken
    private const double Kink = 1e-3; // of the steeper slope: less is none

    /// <summary>The jumps of one figure on the way to a point; at most one of its value and one of its
    /// instant, the largest.</summary>
    public IEnumerable<FigureJump> Find(int figure, double[] point)
    {
        var line = Enumerable.Range(0, Stretches + 1).Select(i => (double)i / Stretches).ToArray();
        var found = batch.At([.. line.SelectMany(s => Between(point, s))]);
        var values = line.Select((_, i) => found.Value(i, figure)).ToArray();
        var times = line.Select((_, i) => found.Time(i, figure)).ToArray();
        var ofValue = Largest(values) is { } v && IsLarge(values, v)
            ? Halve(figure, point, line, v, isTime: false)
            : null;
        var ofTime = Largest(times) is { } t && IsLarge(times, t)
            ? Halve(figure, point, line, t, isTime: true)
            : null;
        if (ofValue is not null && Stays(ofValue.ValueBefore, ofValue.ValueAfter, values))
        {
            yield return ofValue;
        }

        // Where the figure itself jumps, its instant goes along.
        if (ofTime is not null && Stays(ofTime.TimeBefore, ofTime.TimeAfter, times)
            && !(Math.Abs((ofValue?.Place - ofTime.Place) ?? 1) < Alike)
            && IsKink(figure, point, ofTime.Place))
        {
            yield return ofTime with { IsOfValue = false };
        }
    }

    /// <summary>Whether the figure has a kink at a place: on a level stretch of a waveform, where the instant
    /// of its peak is any, it has none.</summary>
    private bool IsKink(int figure, double[] point, double place)
    {
        var step = Math.Min(Aside, Math.Min(place, 1 - place) / 3);
        if (step < Aside / 100)
        {
            return false;
        }

        double[] places = [-2.5, -1.5, -0.5, 0.5, 1.5, 2.5];
        var found = batch.At([.. places.SelectMany(p => Between(point, place + (p * step)))]);
        var v = places.Select((_, i) => found.Value(i, figure)).ToArray();

        // Of the parabolas through the three points on either side.
        var before = (2 * v[2]) - (3 * v[1]) + v[0];
        var after = (3 * v[4]) - (2 * v[3]) - v[5];
        return Math.Abs(after - before) > Kink * Math.Max(Math.Abs(before), Math.Abs(after))
            && Math.Abs(after - before) > Rounding * step * Math.Abs(v[2]);
    }

    private double[] Between(double[] point, double place) =>
        [.. point.Select((end, i) => nominal[i] + (place * (end - nominal[i])))];

    private static int? Largest(double[] series) =>
        Enumerable.Range(0, series.Length - 1)
            .Where(i => double.IsFinite(series[i]) && double.IsFinite(series[i + 1]))
            .Select(i => (int?)i)
            .MaxBy(i => Math.Abs(series[i!.Value + 1] - series[i.Value]));

    // A smooth change spreads over all stretches; what may be a jump stands out of it.
    private static bool IsLarge(double[] series, int stretch) =>
        Math.Abs(series[stretch + 1] - series[stretch]) > Share * Range(series)
        && Range(series) > Rounding * series.Where(double.IsFinite).Max(Math.Abs);

    private static bool Stays(double before, double after, double[] series) =>
        Math.Abs(after - before) > Share * Range(series);

    private static double Range(double[] series)
    {
        var finite = series.Where(double.IsFinite).ToArray();
        return finite.Max() - finite.Min();
    }

    /// <summary>Halves the stretch, always going on with the half of the larger change.</summary>
    private FigureJump Halve(int figure, double[] point, double[] line, int stretch, bool isTime)
    {
        var (low, high) = (line[stretch], line[stretch + 1]);
        for (var i = 0; i < Halvings; i++)
        {
            var middle = (low + high) / 2;
            var found = batch.At(
                [.. Between(point, low), .. Between(point, middle), .. Between(point, high)]);
            double At(int p) => isTime ? found.Time(p, figure) : found.Value(p, figure);
            (low, high) = Math.Abs(At(1) - At(0)) >= Math.Abs(At(2) - At(1)) ? (low, middle) : (middle, high);
        }

        var ends = batch.At([.. Between(point, low), .. Between(point, high)]);
        return new FigureJump(
            high, ends.Value(0, figure), ends.Value(1, figure), ends.Time(0, figure), ends.Time(1, figure),
            IsOfValue: true);
    }
}
