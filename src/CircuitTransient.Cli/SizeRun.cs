using System.Collections.Immutable;
using CircuitTransient.Reports.Html;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>size</c>.</summary>
/// <param name="request">What is asked.</param>
/// <param name="writeSized">Where the circuit with the proposed values goes; null where it is not
/// wanted.</param>
/// <param name="options">What every study is asked for.</param>
/// <param name="streams">Where to write.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class SizeRun(
    SizeRequest request, string? writeSized, StudyOptions options, Streams streams,
    CancellationToken cancellation)
{
    /// <summary>Sizes the parts of a circuit.</summary>
    /// <returns>Success where values were found and confirmed; broken where there are none.</returns>
    public int Run(string file)
    {
        if (writeSized is { } path && NewFile.Refusal(path, streams) is { } refusal)
        {
            return refusal;
        }

        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        var problem = SizeProblem.Of(source, request, reading.ReadBeside);
        streams.Report(problem.Diagnostics);
        if (!problem.Succeeded)
        {
            return Math.Max(ExitStatus.Mistake, reading.Status);
        }

        using var progress = new Progress(file, streams);
        var outcome = SizeStudy.Run(problem.Value, request, reading.ReadBeside, cancellation);
        cancellation.ThrowIfCancellationRequested();
        progress.Dispose();
        if (outcome.Value is not { } result)
        {
            streams.Report(outcome.Diagnostics);
            return ExitStatus.OfUnsolved(outcome.Diagnostics);
        }

        var status = !result.ChecksHold ? ExitStatus.SelfCheckFailed
            : result.IsFound ? ExitStatus.Success
            : ExitStatus.RequirementBroken;
        status = new StudyDelivery(options, streams, cancellation).HandOver(
            file, () => Files(result, file), SizeJson.Write(result),
            written => SizeSummary.Write(result, written, streams.IsColoured), status);
        return writeSized is null || !result.IsFound ? status : Math.Max(status, WriteSized(result));
    }

    private ImmutableArray<OutputFile> Files(SizeResult result, string file)
    {
        var picture = Task.Run(() => SizePlot.Png(result));
        return
        [
            OutputFile.OfText("size.json", SizeJson.Write(result)),
            OutputFile.OfText("size.csv", SizeCsv.Write(result)),
            OutputFile.OfText("size.svg", SizePlot.Svg(result)),
            new OutputFile("size.png", picture.GetAwaiter().GetResult()),
            OutputFile.OfText(
                "report.html", HtmlReport.Write(result.Proposed, CommandFor(file), SizeSection.Of(result))),
        ];
    }

    private string CommandFor(string file)
    {
        string[] words =
        [
            "size", Path.GetFileName(file),
            .. request.Parts.SelectMany(part => new[] { part.Source.Name, part.Source.Content }),
            .. request.Series is { } series ? new[] { "--series", $"{series}" } : [],
            .. request.Aim is Extremal aim ? new[] { aim.Of.Name, aim.Of.Content } : [],
            .. request.WithSpread ? new[] { "--with-spread" } : [],
        ];
        return CommandText.Of(words);
    }

    private int WriteSized(SizeResult result)
    {
        if (result.ProposedText is { } text)
        {
            return NewFile.TryWrite(writeSized!, text, streams) ? ExitStatus.Success : ExitStatus.FileTrouble;
        }

        streams.Report(result.Problem.TextWith(result.Chosen!.Values).Diagnostics);
        return ExitStatus.Mistake;
    }
}
