using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Html;

namespace CircuitTransient.Cli;

/// <summary>The files of one result.</summary>
public static class ResultFiles
{
    /// <summary>Every file that is written, in the order the summary names them.</summary>
    public static ImmutableArray<OutputFile> Of(TransientResult result, string command) =>
    [
        OutputFile.OfText("results.json", JsonReport.Write(result)),
        OutputFile.OfText("waveforms.csv", CsvReport.Write(result)),
        OutputFile.OfText("waveforms.svg", WaveformPlot.Svg(result)),
        new OutputFile("waveforms.png", WaveformPlot.Png(result)),
        OutputFile.OfText("report.html", HtmlReport.Write(result, command)),
    ];
}
