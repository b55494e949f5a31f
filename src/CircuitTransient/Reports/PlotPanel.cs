using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>One panel of the picture: an observation over a stretch of time, with its causes, limits and
/// events.</summary>
internal sealed partial class PlotPanel
{
    /// <summary>Width of every panel in points.</summary>
    public const double Width = 1160;

    private const double Left = 76;
    private const double Right = Width - 210;
    private const int MostCauses = 6;
    private const double SmallestCause = 0.005; // of the panel's range: less would lie on the zero line

    private readonly TransientResult result;
    private readonly ObservationResult observation;
    private readonly PlotWindow window;
    private readonly PlotFonts fonts;
    private readonly ImmutableArray<Shape>.Builder shapes = ImmutableArray.CreateBuilder<Shape>();
    private readonly ImmutableArray<PlotPoint> total;
    private readonly ImmutableArray<Trace> causes;
    private readonly ImmutableArray<PlotLimit> limits;
    private readonly PlotScale time;
    private readonly PlotScale level;

    private PlotPanel(
        TransientResult result,
        ObservationResult observation,
        PlotWindow window,
        PlotFonts fonts,
        double top)
    {
        (this.result, this.observation, this.window, this.fonts) = (result, observation, window, fonts);
        total = Curve(observation.Total);
        causes = LargestCauses();
        limits = PlotLimit
            .On(result, observation)
            .RemoveAll(limit => limit.To <= window.From || limit.From >= window.To);
        time = new PlotScale(window.From, window.To, Left, Right);
        var (least, greatest) = Range();
        PlotTop = top + 26 + EventRows(top + 34);
        level = new PlotScale(least, greatest, PlotTop + Height, PlotTop);
    }

    private double Height => window == PlotWindow.Whole(result, observation) ? 240 : 200;

    private double PlotTop { get; }

    private double PlotBottom => PlotTop + Height;

    /// <summary>The shapes of a panel whose upper edge is given, and its height.</summary>
    public static (ImmutableArray<Shape> Shapes, double Height) Draw(
        TransientResult result,
        ObservationResult observation,
        PlotWindow window,
        PlotFonts fonts,
        double top)
    {
        var panel = new PlotPanel(result, observation, window, fonts, top);
        panel.AddTitle(top + 14);
        panel.AddGrid();
        panel.AddLimits();
        panel.AddLines();
        panel.AddPeaks();
        panel.AddLimitWords();
        return (panel.shapes.ToImmutable(), panel.PlotBottom + 40 - top);
    }

    private void AddTitle(double y)
    {
        var isWhole = window == PlotWindow.Whole(result, observation);
        var title = isWhole ? observation.Name : $"{observation.Name}: {window.Words()}";
        var hidden = causes.IsEmpty ? 0 : observation.Contributions.Length - causes.Length;
        var note = hidden switch
        {
            0 => "",
            1 => "1 smaller cause not drawn",
            _ => $"{hidden} smaller causes not drawn",
        };
        if (note.Length > 0)
        {
            shapes.Add(new TextShape(Right, y, note, Small, PlotStyle.Grey, TextAnchor.End));
        }

        title = fonts.Fitted(title, 14, Right - Left - fonts.Width(note, Small) - 20, isStrong: true);
        shapes.Add(new TextShape(Left, y, title, 14, PlotStyle.Ink, IsStrong: true));
    }

    private ImmutableArray<Trace> LargestCauses()
    {
        if (observation.Contributions.Length < 2)
        {
            return [];
        }

        var (least, greatest) = Extremes(total);
        var span = Math.Max(greatest - least, Math.Max(Math.Abs(least), Math.Abs(greatest)));
        return
        [
            .. observation
                .Contributions.Select(
                    (contribution, i) =>
                        new Trace(
                            contribution.Cause,
                            StyleOf(contribution.Cause, i),
                            Curve(observation.ByCause[i])))
                .Where(trace => trace.Magnitude > SmallestCause * span)
                .OrderByDescending(trace => trace.Magnitude)
                .Take(MostCauses),
        ];
    }

    private ImmutableArray<PlotPoint> Curve(ImmutableArray<double> samples)
    {
        var (times, values) = SampleCurve.Refined(result.SampleTimes, samples, window.From, window.To);
        return PlotTrace.Within(times, values, window.From, window.To);
    }

    // A cause keeps its line in every panel; the joint term has no place in the list and comes after it.
    private Stroke StyleOf(string cause, int position)
    {
        var place = result.Causes.Select(c => c.Name).ToImmutableArray().IndexOf(cause);
        return PlotStyle.Cause(place >= 0 ? place : Math.Max(position, result.Causes.Length));
    }

    private (double Least, double Greatest) Range()
    {
        var (least, greatest) = Extremes(total);
        var span = Math.Max(greatest - least, 0.2 * Math.Max(Math.Abs(least), Math.Abs(greatest)));
        foreach (var trace in causes)
        {
            // Large causes that cancel would press the total flat: they run off the panel instead.
            var (low, high) = Extremes(trace.Samples);
            least = Math.Min(least, Math.Max(low, least - (2 * span)));
            greatest = Math.Max(greatest, Math.Min(high, greatest + (2 * span)));
        }

        foreach (var limit in limits)
        {
            var reach = 0.8 * (greatest - least);
            if (limit.Value > least - reach && limit.Value < greatest + reach)
            {
                (least, greatest) = (Math.Min(least, limit.Value), Math.Max(greatest, limit.Value));
            }
        }

        var (near, far) = (
            Math.Min(Math.Abs(least), Math.Abs(greatest)),
            Math.Max(Math.Abs(least), Math.Abs(greatest)));
        if (least * greatest > 0 && near < 0.6 * far)
        {
            (least, greatest) = (Math.Min(0, least), Math.Max(0, greatest));
        }

        var room =
            greatest > least ? greatest - least
            : greatest != 0 ? Math.Abs(greatest)
            : 1;
        return (least - (0.16 * room), greatest + (0.16 * room));
    }

    private static (double Least, double Greatest) Extremes(ImmutableArray<PlotPoint> samples)
    {
        var finite = samples.Select(s => s.Y).Where(double.IsFinite).ToArray();
        return finite.Length == 0 ? (0, 0) : (finite.Min(), finite.Max());
    }

    private void AddGrid()
    {
        shapes.Add(new RectangleShape(Left, PlotTop, Right - Left, Height, "#fbfcfc"));
        var levels = level.Ticks(observation.Unit, 5);
        foreach (var (value, label) in levels.Marks)
        {
            var y = level.Place(value);
            var stroke = value == 0 ? new Stroke(PlotStyle.Axis, 1) : new Stroke(PlotStyle.Grid, 1);
            shapes.Add(new LineShape(Left, y, Right, y, stroke));
            shapes.Add(new TextShape(Left - 8, y + 4, label, 11.5, PlotStyle.Grey, TextAnchor.End));
        }

        shapes.Add(
            new TextShape(Left - 8, PlotTop - 6, levels.Unit, 11.5, PlotStyle.Ink, TextAnchor.End, true));
        var counted = time with { From = window.From - window.Origin, To = window.To - window.Origin };
        var times = counted.Ticks("s", 9);
        foreach (var (value, label) in times.Marks)
        {
            var x = counted.Place(value);
            shapes.Add(new LineShape(x, PlotTop, x, PlotBottom, new Stroke(PlotStyle.Grid, 1)));
            shapes.Add(new TextShape(x, PlotBottom + 16, label, 11.5, PlotStyle.Grey, TextAnchor.Middle));
        }

        var words = window.OriginName is null
            ? $"time ({times.Unit})"
            : $"{times.Unit} after {window.OriginName}";
        var axis = fonts.Fitted(words, 11.5, Width - Right - 26, isStrong: true);
        shapes.Add(new TextShape(Right + 22, PlotBottom + 16, axis, 11.5, PlotStyle.Ink, IsStrong: true));
        AddEvents();
    }

    private void AddLines()
    {
        foreach (var trace in causes)
        {
            AddTrace(trace.Samples, trace.Stroke);
        }

        AddTrace(total, PlotStyle.Total);
        AddLineEnds();
    }

    private void AddTrace(ImmutableArray<PlotPoint> samples, Stroke stroke)
    {
        foreach (var line in PlotTrace.Lines(samples, time, level))
        {
            shapes.Add(new PolylineShape(line, stroke));
        }
    }

    private sealed record Trace(string Name, Stroke Stroke, ImmutableArray<PlotPoint> Samples)
    {
        public double Magnitude { get; } =
            Samples.Select(s => Math.Abs(s.Y)).Where(double.IsFinite).DefaultIfEmpty().Max();
    }
}
