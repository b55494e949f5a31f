using System.Collections.Immutable;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>The switchings on a time line and as a table; the poles.</content>
public static partial class HtmlReport
{
    private const int MostPolePictures = 12;

    private static Markup Events(TransientResult result, PlotFonts fonts)
    {
        if (result.Events.IsEmpty)
        {
            return default;
        }

        var (volts, amperes) = Scales(result);
        var rows = result.Events.Select(e => Markup.Of($"""
            <tr><td class="number">{Number(e.Time, "s")}</td>
            <th scope="row">{Markup.Name(InstantWords.Name(e))}{Remark(e)}</th>
            {BeforeCell(e, e.VoltageBefore, "V", volts)}
            <td class="number">{Number(e.VoltageAfter, "V", volts)}</td>
            {BeforeCell(e, e.CurrentBefore, "A", amperes)}
            <td class="number">{Number(e.CurrentAfter, "A", amperes)}</td></tr>

            """));
        return Markup.Of($"""
            <section id="events" aria-labelledby="events-heading">
            <h2 id="events-heading">Events</h2>
            <div class="wide picture" tabindex="0" role="region" aria-label="Time line of the
            switchings">{Themed(EventLine.Draw(result, fonts))}</div>
            <div class="wide"><table>
            <caption>Switchings, with what each switch saw just before and just after</caption>
            <thead><tr><th scope="col" class="number">Time</th><th scope="col">Event</th>
            <th scope="col" class="number">Across, before</th>
            <th scope="col" class="number">Across, after</th>
            <th scope="col" class="number">Through, before</th>
            <th scope="col" class="number">Through, after</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            </section>
            """);
    }

    private static Markup BeforeCell(EventResult e, double? value, string unit, double scale) => value is null
        ? Markup.Of($"<td class=\"number unknown\">{Before(e, value, unit)}</td>")
        : Markup.Of($"<td class=\"number\">{Number(value, unit, scale)}</td>");

    private static Markup Remark(EventResult e) =>
        e.Remark is { } remark ? Markup.Of($"<br><span class=\"aside\">{remark}</span>") : default;

    private static Markup Poles(TransientResult result, PlotFonts fonts)
    {
        if (result.Intervals.All(i => i.Poles.IsEmpty))
        {
            return default;
        }

        var pictures = result.Intervals.Take(MostPolePictures).Select(i => PoleFigure(result, i, fonts));
        return Markup.Of($"""
            <section id="poles" aria-labelledby="poles-heading">
            <h2 id="poles-heading">Poles</h2>
            <p class="aside">Of each interval between switchings. In the pictures the distance from the
            middle is the logarithm of the magnitude, the angle is the pole's own; of a conjugate pair both
            are drawn.</p>
            <div class="planes">
            {Markup.Join(pictures)}</div>
            {Markup.Join(result.Intervals.Select(PoleTable))}</section>
            """);
    }

    private static Markup PoleFigure(TransientResult result, IntervalResult interval, PlotFonts fonts) =>
        Markup.Of($"""
            <figure>{Themed(PolePlane.Draw(result, interval, fonts))}
            <figcaption>{IntervalName(interval)}</figcaption></figure>

            """);

    private static Markup PoleTable(IntervalResult interval)
    {
        var table = Markup.Of($"""
            <div class="wide"><table>
            <caption>{IntervalName(interval)}</caption>
            <thead><tr><th scope="col">Pole</th><th scope="col" class="number">Time constant</th>
            <th scope="col" class="number">Natural frequency</th>
            <th scope="col" class="number">Damping ratio</th>
            <th scope="col" class="number">Multiplicity</th></tr></thead>
            <tbody>
            {Markup.Join(interval.Poles.Select(PoleRow))}</tbody>
            </table></div>

            """);
        var count = interval.Poles.Length;
        return count <= 12
            ? table
            : Markup.Of($"""
                <details><summary>{count} poles of {IntervalName(interval)}</summary>{table}</details>

                """);
    }

    private static Markup PoleRow(Pole pole)
    {
        var words = PoleWords(pole);
        var figures = words.Skip(1).Select(word => Markup.Of($"<td class=\"number\">{word}</td>"));
        return Markup.Of($"<tr><th scope=\"row\">{words[0]}</th>{Markup.Join(figures)}</tr>\n");
    }

    // A picture whose colours follow the reader's setting; each colour of the style has a variable.
    internal static Markup Themed(Drawing drawing)
    {
        var svg = SvgRenderer.Write(drawing);
        foreach (var (colour, variable) in Variables)
        {
            svg = svg.Replace($"\"{colour}\"", $"\"var(--{variable})\"", StringComparison.Ordinal);
        }

        return Markup.Picture(svg);
    }

    private static ImmutableArray<(string Colour, string Variable)> Variables { get; } =
    [
        (PlotStyle.Paper, "paper"),
        (PlotStyle.Ink, "ink"),
        (PlotStyle.Grey, "grey"),
        (PlotStyle.Grid, "grid"),
        (PlotStyle.Axis, "axis"),
        (PlotStyle.Limit, "limit"),
        (PlotStyle.Accent, "accent"),
        (PlotStyle.Band, "band"),
        (PlotStyle.WideBand, "band-wide"),
        (PlotStyle.Ground, "ground"),
        .. Enumerable.Range(0, 6).Select(i => (PlotStyle.Cause(i).Colour, $"cause-{i}")),
    ];
}
