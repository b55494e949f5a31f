using System.Collections.Immutable;
using CircuitTransient.Reports.Html;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Cli;

/// <summary>The files of a study of tolerances.</summary>
public static class SpreadFiles
{
    /// <summary>Every file that is written, in the order the summary names them.</summary>
    public static ImmutableArray<OutputFile> Of(SpreadResult spread, string command) =>
    [
        OutputFile.OfText("spread.json", SpreadJson.Write(spread)),
        OutputFile.OfText("spread.csv", SpreadCsv.Write(spread)),
        OutputFile.OfText("spread.svg", SpreadPlot.Svg(spread)),
        new OutputFile("spread.png", SpreadPlot.Png(spread)),
        OutputFile.OfText(
            "report.html", HtmlReport.Write(spread.Nominal, command, [SpreadSection.Of(spread)])),
    ];
}
