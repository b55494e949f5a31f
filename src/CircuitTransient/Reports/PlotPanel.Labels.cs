using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <content>What is written into a panel: line ends, peaks, limits and events.</content>
internal sealed partial class PlotPanel
{
    private const double Small = 11.5;
    private const double RowHeight = 14;
    private const int MostEventRows = 3;

    private readonly List<(double X, string Text, double Y)> eventLabels = [];

    // Each line is named where it ends; names that would overlap move apart, tied to their lines by a thin
    // leader.
    private void AddLineEnds()
    {
        var ends = causes
            .Select(trace =>
                (Name: EndName(trace), trace.Stroke, Y: LastPlace(trace.Samples), IsStrong: false))
            .Append(
                (Name: causes.IsEmpty ? "" : "total", PlotStyle.Total, Y: LastPlace(total), IsStrong: true))
            .Where(end => end.Name.Length > 0)
            .OrderBy(end => Math.Round(end.Y))
            .ThenByDescending(end => end.IsStrong)
            .ToArray();
        var places = Apart([.. ends.Select(end => end.Y)], 15, PlotTop + 6, PlotBottom - 8);
        for (var i = 0; i < ends.Length; i++)
        {
            var (name, stroke, y, isStrong) = ends[i];
            shapes.Add(new LineShape(Right + 1, y, Right + 19, places[i], stroke with { Width = 2 }));
            shapes.Add(
                new TextShape(
                    Right + 22,
                    places[i] + 4,
                    fonts.Fitted(name, Small, Width - Right - 26, isStrong),
                    Small,
                    PlotStyle.Ink, // the colours of the lines are no colours for small letters
                    IsStrong: isStrong));
        }
    }

    /// <summary>Places at least a gap apart and within bounds, each as near to its wish as the others
    /// allow; the wishes come in order.</summary>
    internal static double[] Apart(double[] wishes, double gap, double first, double last)
    {
        var places = (double[])wishes.Clone();
        for (var i = 0; i < places.Length; i++)
        {
            places[i] = Math.Max(places[i], i == 0 ? first : places[i - 1] + gap);
        }

        for (var i = places.Length - 1; i >= 0; i--)
        {
            places[i] = Math.Min(places[i], i == places.Length - 1 ? last : places[i + 1] - gap);
        }

        return places;
    }

    private string EndName(Trace trace)
    {
        var last = level.Place(trace.Samples.LastOrDefault(sample => double.IsFinite(sample.Y)).Y);
        return last < PlotTop || last > PlotBottom ? $"{trace.Name} (off the panel)" : trace.Name;
    }

    private double LastPlace(ImmutableArray<PlotPoint> samples)
    {
        var last = samples.LastOrDefault(sample => double.IsFinite(sample.Y)).Y;
        return Math.Clamp(level.Place(last), PlotTop, PlotBottom);
    }

    private void AddPeaks()
    {
        AddPeak(observation.Max, isMax: true);
        if (observation.Min.Value != observation.Max.Value)
        {
            AddPeak(observation.Min, isMax: false);
        }
    }

    private void AddPeak(Extreme extreme, bool isMax)
    {
        // A mark at nothing, or at what rounding left of nothing, tells nothing.
        if (extreme.Value is not { } value || ReportWords.IsRounding(value, observation)
            || !window.Holds(extreme.Time))
        {
            return;
        }

        var (x, y) = (time.Place(extreme.Time), level.Place(value));
        var since = window.OriginName is null
            ? null
            : InstantWords.SinceEvent(result, extreme.Time, extreme.Side);
        var when = since is null ? $" at {EngineeringNumber.Format(extreme.Time, "s")}" : $", {since}";
        var text = $"{EngineeringNumber.Format(value, observation.Unit)}{when}";
        var half = fonts.Width(text, Small, isStrong: true) / 2;
        var anchor =
            x - half < Left + 4 ? TextAnchor.Start
            : x + half > Right - 4 ? TextAnchor.End
            : TextAnchor.Middle;
        var shift = anchor switch
        {
            TextAnchor.Start => 4,
            TextAnchor.End => -4,
            _ => 0,
        };
        shapes.Add(new DiscShape(x, y, 4, PlotStyle.Ink));
        var place = PeakLabelPlace(y, isMax);
        var label = new TextShape(
            x + shift, place, text, Small, PlotStyle.Ink, anchor, IsStrong: true, HasHalo: true);

        // A limit's line close by would strike it through: then it goes past that line.
        const double near = 20;
        var room = new LabelRoom(fonts, Left, PlotTop, Right, PlotBottom);
        room.Avoid(shapes.Where(s =>
            s is TextShape || (s is LineShape line && ReferenceEquals(line.Stroke, LimitStroke))));
        shapes.Add(room.Place(
            [
                label,
                .. LimitPlaces().Where(at => Math.Abs(at - place) < near)
                    .Select(at => label with { Y = isMax ? at - 5 : at + 14 }),
            ]));
    }

    // Past the lines of the causes where they run close by, so that the label hides none of them.
    private double PeakLabelPlace(double peak, bool isMax)
    {
        const double near = 40;
        var lines = observation
            .Contributions.Where(contribution => causes.Any(trace => trace.Name == contribution.Cause))
            .Select(contribution => level.Place((isMax ? contribution.AtMax : contribution.AtMin) ?? 0))
            .Where(y => Math.Abs(y - peak) < near)
            .Append(peak);
        return isMax ? Math.Max(lines.Min() - 9, PlotTop + 12) : Math.Min(lines.Max() + 18, PlotBottom - 4);
    }

    private static readonly Stroke LimitStroke = new(PlotStyle.Limit, 1.2, [8, 4]);

    private IEnumerable<double> LimitPlaces() =>
        limits.Select(limit => level.Place(limit.Value)).Where(y => y >= PlotTop && y <= PlotBottom);

    private void AddLimits()
    {
        foreach (var limit in limits)
        {
            var y = level.Place(limit.Value);
            if (y >= PlotTop && y <= PlotBottom)
            {
                shapes.Add(new LineShape(LimitStart(limit), y, LimitEnd(limit), y, LimitStroke));
            }
        }
    }

    private double LimitStart(PlotLimit limit) => time.Place(Math.Max(limit.From, window.From));

    private double LimitEnd(PlotLimit limit) => time.Place(Math.Min(limit.To, window.To));

    // Where they cover no peak's label: at the right end of their line, else along it.
    private void AddLimitWords()
    {
        var room = new LabelRoom(fonts, Left, PlotTop, Right, PlotBottom);
        room.Avoid(shapes.Where(s => s is TextShape or DiscShape));
        foreach (var limit in limits)
        {
            var y = level.Place(limit.Value);
            var isAbove = limit.Words.StartsWith("at most", StringComparison.Ordinal);
            var label = y < PlotTop ? Words($"{limit.Words}: above this panel", Right - 6, PlotTop + 14)
                : y > PlotBottom ? Words($"{limit.Words}: below this panel", Right - 6, PlotBottom - 6)
                : Words(limit.Words, LimitEnd(limit) - 6, isAbove ? y - 5 : y + 14);
            var start = (y < PlotTop || y > PlotBottom ? Left : LimitStart(limit)) + 6;
            shapes.Add(room.Place(
                label,
                label with { X = start, Anchor = TextAnchor.Start },
                label with { X = (start + label.X) / 2, Anchor = TextAnchor.Middle }));
        }

        static TextShape Words(string text, double x, double y) =>
            new(x, y, text, Small, PlotStyle.Limit, TextAnchor.End, HasHalo: true);
    }

    // The height that the labels of events need above the plot; their places are found on the way.
    private double EventRows(double firstRow)
    {
        var rowEnds = new List<double>();
        var switchings = result
            .Events.Where(e => e.Time >= window.From && e.Time <= window.To)
            .GroupBy(e => e.Time);
        foreach (var together in switchings)
        {
            var text = string.Join(", ", together.Select(InstantWords.Name));
            text = fonts.Fitted(text, Small, (Right - Left) / 2);
            var x = time.Place(together.Key);
            var width = fonts.Width(text, Small);
            var start = Math.Clamp(x - (width / 2), Left, Right - width);
            var row = rowEnds.FindIndex(end => end + 8 <= start);
            if (row < 0 && rowEnds.Count < MostEventRows)
            {
                row = rowEnds.Count;
                rowEnds.Add(0);
            }

            if (row >= 0)
            {
                rowEnds[row] = start + width;
                eventLabels.Add((x, text, firstRow + (row * RowHeight)));
            }
            else
            {
                eventLabels.Add((x, "", firstRow + ((MostEventRows - 1) * RowHeight)));
            }
        }

        return rowEnds.Count * RowHeight;
    }

    private void AddEvents()
    {
        foreach (var (x, text, y) in eventLabels)
        {
            shapes.Add(new LineShape(x, y + 3, x, PlotBottom, new Stroke(PlotStyle.Axis, 1, [2, 3])));
            if (text.Length > 0)
            {
                var width = fonts.Width(text, Small);
                var start = Math.Clamp(x - (width / 2), Left, Right - width);
                shapes.Add(new TextShape(start, y, text, Small, PlotStyle.Grey));
            }
        }
    }
}
