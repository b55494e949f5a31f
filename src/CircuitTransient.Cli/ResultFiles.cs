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
        var json = OutputFile.OfText("results.json", JsonReport.Write(result));
        var csv = OutputFile.OfText("waveforms.csv", CsvReport.Write(result));
        var svg = OutputFile.OfText("waveforms.svg", WaveformPlot.Svg(result));
        var page = OutputFile.OfText("report.html", HtmlReport.Write(result, command));
        var png = new OutputFile("waveforms.png", picture.GetAwaiter().GetResult());
        ImmutableArray<OutputFile> files = BreakdownCsv.Write(result) is { } breakdown
            ? [json, csv, OutputFile.OfText("breakdown.csv", breakdown), svg, png, page]
            : [json, csv, svg, png, page];
        return isPdf
            ? [.. files, new OutputFile("report.pdf", PdfReport.Write(result, command))]
            : files;
    }
}
