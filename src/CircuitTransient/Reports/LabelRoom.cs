namespace CircuitTransient.Reports;

/// <summary>Finds room for labels among lines and other labels: of several places for a label the first that
/// covers nothing, else the one that covers least.</summary>
/// <param name="fonts">Tells how wide a label is.</param>
/// <param name="left">Edges of what labels must stay within.</param>
internal sealed class LabelRoom(PlotFonts fonts, double left, double top, double right, double bottom)
{
    private const double Aside = 3; // points kept free beside a label
    private const double Beneath = 1.5; // and above and below it
    private const double Ascent = 0.76; // of the letters' height
    private const double Descent = 0.22;
    private const double LabelCost = 10; // of a label covered, against a line of the same length
    private const double OutsideCost = 1e4;

    private readonly List<(PlotPoint A, PlotPoint B)> lines = [];
    private readonly List<Box> taken = [];

    /// <summary>Keeps labels off shapes: lines, discs, and labels placed otherwise.</summary>
    public void Avoid(IEnumerable<Shape> shapes)
    {
        foreach (var shape in shapes)
        {
            switch (shape)
            {
                case LineShape line:
                    lines.Add((new PlotPoint(line.X1, line.Y1), new PlotPoint(line.X2, line.Y2)));
                    break;
                case PolylineShape line:
                    lines.AddRange(line.Points.Zip(line.Points.Skip(1)));
                    break;
                case DiscShape disc:
                    taken.Add(new Box(
                        disc.X - disc.Radius, disc.Y - disc.Radius, disc.X + disc.Radius,
                        disc.Y + disc.Radius));
                    break;
                case TextShape text:
                    taken.Add(BoxOf(text));
                    break;
            }
        }
    }

    /// <summary>The best of several places for a label, which is taken from then on: the first of those that
    /// cover least.</summary>
    /// <param name="places">In the order of liking; at least one.</param>
    public TextShape Place(params IEnumerable<TextShape> places)
    {
        var best = places.MinBy(Cost)!;
        taken.Add(BoxOf(best));
        return best;
    }

    /// <summary>Whether a label would cover no other, nor leave the edges.</summary>
    public bool IsFree(TextShape label) => Cost(BoxOf(label), []) == 0;

    private double Cost(TextShape label) => Cost(BoxOf(label), lines);

    private double Cost(Box box, List<(PlotPoint A, PlotPoint B)> lines)
    {
        var isOutside = box.Left < left || box.Top < top || box.Right > right || box.Bottom > bottom;
        return (isOutside ? OutsideCost : 0)
            + taken.Sum(other => LabelCost * box.Shared(other))
            + lines.Sum(line => box.Covered(line.A, line.B));
    }

    private Box BoxOf(TextShape text)
    {
        var width = fonts.Width(text.Text, text.Size, text.IsStrong);
        var start = text.X - (text.Anchor switch
        {
            TextAnchor.Middle => width / 2,
            TextAnchor.End => width,
            _ => 0,
        });
        return new Box(
            start - Aside, text.Y - (Ascent * text.Size) - Beneath, start + width + Aside,
            text.Y + (Descent * text.Size) + Beneath);
    }

    private readonly record struct Box(double Left, double Top, double Right, double Bottom)
    {
        /// <summary>The width that is shared with another; 0 where they do not meet.</summary>
        public double Shared(in Box other) => Top < other.Bottom && other.Top < Bottom
            ? Math.Max(0, Math.Min(Right, other.Right) - Math.Max(Left, other.Left))
            : 0;

        /// <summary>The length of a line's part within, plus one where there is any.</summary>
        public double Covered(PlotPoint a, PlotPoint b)
        {
            var (dx, dy) = (b.X - a.X, b.Y - a.Y);
            var (from, to) = (0.0, 1.0);
            Cut(dx, Left - a.X, Right - a.X, ref from, ref to);
            Cut(dy, Top - a.Y, Bottom - a.Y, ref from, ref to);
            return from < to ? 1 + ((to - from) * double.Hypot(dx, dy)) : 0;
        }

        // The part of 0 … 1 in which t · d lies between two bounds.
        private static void Cut(double d, double low, double high, ref double from, ref double to)
        {
            if (d == 0)
            {
                to = low < 0 && high > 0 ? to : from;
                return;
            }

            var (first, last) = d > 0 ? (low / d, high / d) : (high / d, low / d);
            (from, to) = (Math.Max(from, first), Math.Min(to, last));
        }
    }
}
