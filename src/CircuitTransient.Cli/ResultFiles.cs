using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Html;
using CircuitTransient.Reports.Pdf;

namespace CircuitTransient.Cli;

/// <summary>The files of one result.</summary>
public static class ResultFiles
{
    /// <summary>Every file that is written, in the order the summary names them.</summary>
    public static ImmutableArray<OutputFile> Of(TransientResult result, string command, bool isPdf)
    {
        // The picture takes as long as all else together, and a second core is mostly there.
        var picture = Task.Run(() => WaveformPlot.Png(result));
        return
        [
            OutputFile.OfText("results.json", JsonReport.Write(result)),
            OutputFile.OfText("waveforms.csv", CsvReport.Write(result)),
            OutputFile.OfText("waveforms.svg", WaveformPlot.Svg(result)),
            new OutputFile("waveforms.png", picture.GetAwaiter().GetResult()),
            OutputFile.OfText("report.html", HtmlReport.Write(result, command)),
            .. isPdf ? [new OutputFile("report.pdf", PdfReport.Write(result, command))] : (OutputFile[])[],
        ];
    }
}
