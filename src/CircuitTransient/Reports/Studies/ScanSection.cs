using CircuitTransient.Reports.Html;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>A scan's section of the report page.</summary>
public static class ScanSection
{
    /// <summary>The section.</summary>
    public static StudySection Of(ScanResult result) => new(
        result.Axes.IsEmpty ? "Scatter" : "Scan",
        Markup.Of($"""
            <p class="lead">{ScanSummary.Verdict(result)}</p>
            {Markup.Join(ScanSummary.Remarks(result).Select(r => Markup.Of($"<p>{r}</p>")))}
            {Judged(result)}
            {Picture(result)}
            <p class="aside">{ScanSummary.Searched(result)} All points stand in scan.csv and scan.json.</p>
            """))
    {
        Headline = ScanSummary.Verdict(result),
    };

    // Lines follow the reader's colours; the shades of a map are made for white paper and keep it.
    private static Markup Picture(ScanResult result)
    {
        using var fonts = new PlotFonts();
        var drawing = ScanPlot.Draw(result, fonts);
        var svg = result.Axes.Length > 1
            ? Markup.Picture(SvgRenderer.Write(drawing))
            : HtmlReport.Themed(drawing);
        var kind = result.Axes.Length > 1 ? "map" : "picture";
        return Markup.Of($"""<div class="wide"><figure class="{kind}">{svg}</figure></div>""");
    }

    private static Markup Judged(ScanResult result)
    {
        var judged = result.Findings.Where(f => f.IsJudged && f.Worst is not null)
            .OrderBy(f => f.Room).ToArray();
        if (judged.Length == 0)
        {
            return default;
        }

        var rows = judged.Select(f => Markup.Of($"""
            <tr><th scope="row">{Markup.Name(ScanWords.Statement(result.Circuit, f.Figure))}</th>
            <td>{ScanSummary.Held(result, f)}</td><td>{ScanSummary.Worst(result, f)}</td></tr>

            """));
        return Markup.Of($"""
            <div class="wide"><table>
            <thead><tr><th scope="col">required or rated</th><th scope="col">over the scan</th>
            <th scope="col">at its worst</th></tr></thead>
            <tbody>{Markup.Join(rows)}</tbody></table></div>
            """);
    }
}
