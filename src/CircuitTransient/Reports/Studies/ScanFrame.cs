using System.Collections.Immutable;

namespace CircuitTransient.Reports.Studies;

/// <summary>The frame of a panel: title, grid, labels of both axes.</summary>
/// <param name="Across">What runs from left to right, its marks with their places, and its name.</param>
/// <param name="Level">What runs upwards.</param>
/// <param name="Unit">Its unit.</param>
internal sealed record ScanFrame(
    PlotFonts Fonts, double Top, double Height, ImmutableArray<(double Place, string Label)> Across,
    string AcrossName, PlotScale Level, string Unit)
{
    /// <summary>Left edge of every panel.</summary>
    public const double Left = 76;

    /// <summary>Right edge of every panel.</summary>
    public const double Right = PlotPanel.Width - 210;

    /// <summary>Height of the letters in panels.</summary>
    public const double Small = 11.5;

    private static readonly double[] Between = [0.75, 0.25, 0.5]; // for the words of a limit

    /// <summary>Lower edge.</summary>
    public double Bottom => Top + Height;

    /// <summary>The shapes, below everything else in the panel.</summary>
    public IEnumerable<Shape> Shapes(string title)
    {
        yield return new TextShape(
            Left, Top - 12, Fonts.Fitted(title, 14, PlotPanel.Width - Left - 20, isStrong: true), 14,
            PlotStyle.Ink, IsStrong: true);
        yield return new RectangleShape(Left, Top, Right - Left, Height, PlotStyle.Ground);
        var levels = Level.Ticks(Unit, 5);
        foreach (var (value, label) in levels.Marks)
        {
            var y = Level.Place(value);
            yield return new LineShape(
                Left, y, Right, y, new Stroke(value == 0 ? PlotStyle.Axis : PlotStyle.Grid, 1));
            yield return new TextShape(Left - 8, y + 4, label, Small, PlotStyle.Grey, TextAnchor.End);
        }

        yield return new TextShape(
            Left - 8, Top - 12, levels.Unit, Small, PlotStyle.Ink, TextAnchor.End, IsStrong: true);
        foreach (var (x, label) in Across)
        {
            yield return new LineShape(x, Top, x, Bottom, new Stroke(PlotStyle.Grid, 1));
            yield return new TextShape(x, Bottom + 16, label, Small, PlotStyle.Grey, TextAnchor.Middle);
        }

        yield return new TextShape(
            Right + 22, Bottom + 16,
            Fonts.Fitted(AcrossName, Small, PlotPanel.Width - Right - 26, isStrong: true), Small,
            PlotStyle.Ink, IsStrong: true);
    }

    /// <summary>The marks of a scanned value, and its name with the unit they are in.</summary>
    public static (ImmutableArray<(double Place, string Label)> Marks, string Name) AcrossOf(ScanScale scale)
    {
        var ticks = scale.Ticks(9);
        var unit = ticks.Unit.Length > 0 ? $" ({ticks.Unit})" : "";
        return ([.. ticks.Marks.Select(m => (scale.Place(m.Value), m.Label))],
            ScanWords.Subject(scale.Axis) + unit);
    }

    /// <summary>Room round what is drawn; zero is kept in sight where it is near.</summary>
    public static (double Least, double Greatest) Range(IEnumerable<double> values)
    {
        var finite = values.Where(double.IsFinite).ToArray();
        var (least, greatest) = finite.Length == 0 ? (0, 1) : (finite.Min(), finite.Max());
        var far = Math.Max(Math.Abs(least), Math.Abs(greatest));
        if (least * greatest > 0 && Math.Min(Math.Abs(least), Math.Abs(greatest)) < 0.5 * far)
        {
            (least, greatest) = (Math.Min(0, least), Math.Max(0, greatest));
        }

        var room = greatest > least ? greatest - least : far > 0 ? far : 1;
        return (least - (0.12 * room), greatest + (0.14 * room));
    }

    /// <summary>The line of a limit; none where that is outside.</summary>
    public IEnumerable<Shape> Limit(double value) => IsInside(value)
        ? [new LineShape(
            Left, Level.Place(value), Right, Level.Place(value), new Stroke(PlotStyle.Limit, 1.2, [8, 4]))]
        : [];

    /// <summary>Where the words of a limit may stand: above its line or below, at its ends or
    /// between.</summary>
    public IEnumerable<TextShape> LimitWords(double value, string words)
    {
        var y = Level.Place(value);
        double[] heights = IsInside(value) ? [y - 5, y + 14] : y < Top ? [Top + 14] : [Bottom - 6];
        var said = IsInside(value) ? words : $"{words}: {(y < Top ? "above" : "below")} this panel";
        (double X, TextAnchor Anchor)[] places =
        [
            (Right - 6, TextAnchor.End), (Left + 6, TextAnchor.Start),
            .. Between.Select(part => (Left + (part * (Right - Left)), TextAnchor.Middle)),
        ];
        return heights.SelectMany(_ => places, (height, place) => new TextShape(
            place.X, height, said, Small, PlotStyle.Limit, place.Anchor, HasHalo: true));
    }

    /// <summary>Room for labels within the frame.</summary>
    public LabelRoom Room() => new(Fonts, Left, Top, Right, Bottom);

    private bool IsInside(double value) => Level.Place(value) >= Top && Level.Place(value) <= Bottom;
}
