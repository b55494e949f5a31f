using System.Globalization;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>Small pictures within tables: a mark on a common scale, a signed bar.</content>
public static partial class HtmlReport
{
    // The scale of every utilization mark: 0 to 125 % over 125 points, the limit at 100.
    private static Markup Mark(double? used)
    {
        if (used is not { } fraction)
        {
            return Markup.Of($"<span class=\"aside\">no ratio</span>");
        }

        var words = double.IsFinite(fraction) ? Percent(fraction) : "without limit";
        var place = Coordinate(4 + (100 * Math.Min(fraction, 1.25)));
        var mark = fraction > 1.25
            ? Markup.Of($"<path class=\"mark\" d=\"M125 3 L132 8 L125 13 Z\"/>")
            : Markup.Of($"<circle class=\"mark\" cx=\"{place}\" cy=\"8\" r=\"4\"/>");
        return Markup.Of($"""
            <span class="used"><svg class="scale" viewBox="0 0 134 16" width="134" height="16"
            aria-hidden="true"><path class="rule" d="M4 8 H129 M4 5 V11"/><path class="limit" d="M104 1
            V15"/><path class="reach" d="M4 8 H{place}"/>{mark}</svg> <span
            class="percent">{words}</span></span>
            """);
    }

    // A bar from a middle line, to the right where it adds to the extreme.
    private static Markup Bar(double? value, double largest)
    {
        if (value is not { } share || !double.IsFinite(share) || largest <= 0)
        {
            return default;
        }

        var width = 60 * Math.Abs(share) / largest;
        var start = share < 0 ? 62 - width : 62;
        return Markup.Of($"""
            <svg class="bar" viewBox="0 0 124 12" width="124" height="12" aria-hidden="true"><path
            class="rule" d="M62 0 V12"/><rect class="mark" x="{Coordinate(start)}" y="2"
            width="{Coordinate(width)}" height="8"/></svg>
            """);
    }

    private static string Coordinate(double value) => value.ToString("0.##", CultureInfo.InvariantCulture);
}
