using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>The family of waveforms: muted lines, each named where it ends, the worst one strong.</summary>
internal static class ScanFamilyPanel
{
    private const double Height = 280;
    private const double AfterPeak = 4; // times as long as from the switching to the latest peak
    private const double Short = 0.25; // of the study: what is shorter is shown enlarged

    /// <summary>The shapes below an upper edge, and their height.</summary>
    public static (IEnumerable<Shape> Shapes, double Height) Draw(
        ScanResult result, ScanFamily family, PlotFonts fonts, double top)
    {
        var (from, to) = Window(family);
        var lines = family.Members.Select(m => (
            Member: m,
            Samples: PlotTrace.Within([.. m.Times.Select(t => t - m.Origin)], m.Values, from, to))).ToArray();
        var limits = Limits(result.Circuit, family);
        var drawn = lines.SelectMany(l => l.Samples.Select(s => s.Y)).ToArray();
        var (least, greatest) = ScanFrame.Range(drawn);
        var span = greatest - least;
        var near = limits.Where(l => l.Value > least - span && l.Value < greatest + span);
        (least, greatest) = ScanFrame.Range([.. drawn, .. near.Select(l => l.Value)]);
        var time = new PlotScale(from, to, ScanFrame.Left, ScanFrame.Right);
        var ticks = time.Ticks("s", 9);
        var frame = new ScanFrame(
            fonts, top + 26, Height, [.. ticks.Marks.Select(m => (time.Place(m.Value), m.Label))],
            family.Event is null ? $"time ({ticks.Unit})" : $"{ticks.Unit} after {family.Event}",
            new PlotScale(least, greatest, top + 26 + Height, top + 26), family.Unit);
        Shape[] drawnLines =
            [
                .. limits.SelectMany(l => frame.Limit(l.Value)),
                .. lines.OrderBy(l => l.Member.Role).SelectMany((l, i) =>
                    PlotTrace.Lines(l.Samples, time, frame.Level)
                        .Select(line => new PolylineShape(line, StrokeOf(l.Member.Role, i, lines.Length)))),
            ];
        var room = frame.Room();
        room.Avoid(drawnLines);
        Shape[] shapes =
            [
                .. frame.Shapes($"{family.Name}, with {ScanWords.Range(result)}"),
                .. drawnLines,
                .. limits.Select(l => room.Place(frame.LimitWords(l.Value, l.Words))),
                .. Names(result, frame, lines),
            ];
        return (shapes.OrderBy(s => s is TextShape), Height + 26 + 40);
    }

    // From the earliest switching to some time past the latest peak, where that is a small part of the study;
    // where the family's peaks lie far apart, about that of the worst alone, or as written where the worst
    // stands at a switching. Of a scanned event all count from it.
    private static (double From, double To) Window(ScanFamily family)
    {
        var first = family.Members.Max(m => -m.Origin);
        var last = family.Members.Min(m => m.Times[^1] - m.Origin);
        var isMap = family.Members[0].At.Length > 1; // of corners far apart, whose peaks may be anywhere
        return (isMap ? null : CloseUp(family.Members, last - first))
            ?? CloseUp(Of(FamilyRole.Worst), last - first)
            ?? CloseUp(Of(FamilyRole.AsWritten), last - first)
            ?? CloseUp(family.Members, last - first)
            ?? (family.Event is null
                ? (first, last)
                : (Math.Max(first, -0.1 * last), Math.Max(last, Reach(family.Members))));

        ImmutableArray<FamilyMember> Of(FamilyRole role) => [.. family.Members.Where(m => m.Role == role)];
    }

    private static double Reach(ImmutableArray<FamilyMember> members)
    {
        var peak = members.Max(m => m.Peak - m.Origin);
        return peak + (0.1 * (peak - members.Min(m => m.Start - m.Origin)));
    }

    private static (double From, double To)? CloseUp(ImmutableArray<FamilyMember> members, double whole)
    {
        if (members.IsEmpty)
        {
            return null;
        }

        var start = members.Min(m => m.Start - m.Origin);
        var peak = members.Max(m => m.Peak - m.Origin);
        var length = peak - start;
        return length <= 0 || length > Short * whole
            ? null
            : (start - (0.06 * length),
                Math.Min(members.Max(m => m.End - m.Origin), peak + (AfterPeak * length)));
    }

    private static ImmutableArray<(double Value, string Words)> Limits(Circuit circuit, ScanFamily family)
    {
        if (family.Requirement < 0
            || circuit.Requirements[family.Requirement].Bound is not Circuits.Limits limits)
        {
            return [];
        }

        var found = ImmutableArray.CreateBuilder<(double, string)>();
        if (limits.Upper is { } upper)
        {
            found.Add((upper, $"at most {EngineeringNumber.Format(upper, family.Unit)}"));
        }

        if (limits.Lower is { } lower)
        {
            found.Add((lower, $"at least {EngineeringNumber.Format(lower, family.Unit)}"));
        }

        return found.ToImmutable();
    }

    // One hue, the lighter the nearer to the start of the range.
    private static Stroke StrokeOf(FamilyRole role, int index, int count) => role switch
    {
        FamilyRole.Worst => PlotStyle.Total,
        FamilyRole.AsWritten => new Stroke(PlotStyle.Accent, 1.8, [7, 4]),
        _ => new Stroke(ScanShade.Of(0.25 + (0.6 * index / Math.Max(1, count - 1))), 1.2),
    };

    private static IEnumerable<Shape> Names(
        ScanResult result, ScanFrame frame, (FamilyMember Member, ImmutableArray<PlotPoint> Samples)[] lines)
    {
        var ends = lines
            .Select(l => (l.Member, Y: LastPlace(frame, l.Samples)))
            .Where(e => double.IsFinite(e.Y))
            .OrderBy(e => Math.Round(e.Y)).ThenByDescending(e => e.Member.Role).ToArray();
        var places = PlotPanel.Apart([.. ends.Select(e => e.Y)], 14, frame.Top + 4, frame.Bottom - 4);
        for (var i = 0; i < ends.Length; i++)
        {
            var (member, y) = ends[i];
            var words = string.Join(", ", result.Axes.Select((axis, k) => axis.Say(member.At[k], fewer: 1)));
            var name = member.Role switch
            {
                FamilyRole.Worst => $"{words}, the worst",
                FamilyRole.AsWritten => $"{words}, as written",
                _ => words,
            };
            var isStrong = member.Role == FamilyRole.Worst;
            yield return new LineShape(
                ScanFrame.Right + 1, y, ScanFrame.Right + 16, places[i], new Stroke(PlotStyle.Axis, 1));
            yield return new TextShape(
                ScanFrame.Right + 20, places[i] + 4,
                frame.Fonts.Fitted(name, 11, PlotPanel.Width - ScanFrame.Right - 24, isStrong), 11,
                InkOf(member.Role), IsStrong: isStrong);
        }
    }

    private static string InkOf(FamilyRole role) => role switch
    {
        FamilyRole.Worst => PlotStyle.Ink,
        FamilyRole.AsWritten => PlotStyle.Accent,
        _ => PlotStyle.Grey,
    };

    private static double LastPlace(ScanFrame frame, ImmutableArray<PlotPoint> samples)
    {
        var last = samples.LastOrDefault(s => double.IsFinite(s.Y), new PlotPoint(0, double.NaN)).Y;
        return double.IsFinite(last)
            ? Math.Clamp(frame.Level.Place(last), frame.Top, frame.Bottom)
            : double.NaN;
    }
}
