using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Html;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Studies.Records;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>overlay</c>.</summary>
public sealed class OverlayRun(OverlayOptions options, Streams streams, CancellationToken cancellation)
{
    /// <summary>Lays the records over the circuit.</summary>
    public int Run(string file)
    {
        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        var checkedCircuit = TransientAnalysis.Check(source, reading.ReadBeside);
        streams.Report(checkedCircuit.Diagnostics);
        if (!checkedCircuit.Succeeded)
        {
            return Math.Max(ExitStatus.Mistake, reading.Status);
        }

        if (options.Fitted is { } path && NewFile.Refusal(path, streams) is { } refusal)
        {
            return refusal;
        }

        using var progress = new Progress(file, streams);
        var circuit = checkedCircuit.Value;
        var placed = ImmutableArray.CreateBuilder<PlacedRecord>();
        foreach (var order in options.Records)
        {
            var status = Place(circuit, order, reading, placed);
            if (status != ExitStatus.Success)
            {
                return status;
            }
        }

        var outcome = Targets(circuit) is { } named
            ? named.Then(targets => FitStudy.Run(
                circuit, placed.ToImmutable(), targets, reading.ReadBeside, cancellation))
            : OverlayStudy.Compare(circuit, placed.ToImmutable(), cancellation);
        cancellation.ThrowIfCancellationRequested();
        progress.Dispose();
        streams.Report(outcome.Diagnostics);
        if (!outcome.Succeeded)
        {
            return TransientAnalysis.Run(source, AnalysisOptions.Default, reading.ReadBeside, cancellation)
                is NoUniqueSolution ? ExitStatus.NoUniqueSolution : ExitStatus.Mistake;
        }

        var given = HandOver(file, outcome.Value, reading);
        return Math.Max(given, WriteFitted(outcome.Value, reading));
    }

    private Outcome<TargetList>? Targets(Circuit circuit) =>
        options.Fit is { } fit ? FitTargets.Read(circuit, new SourceText("--fit", fit)) : null;

    /// <summary>Writes the circuit with the fitted values, where that was asked for and every value is
    /// determined.</summary>
    private int WriteFitted(OverlayResult result, CircuitFile reading)
    {
        if (options.Fitted is not { } path || result.Fit is not { } fit)
        {
            return ExitStatus.Success;
        }

        if (!fit.IsResolved)
        {
            streams.Complain($"{path} is not written: the records do not determine every value");
            return ExitStatus.RequirementBroken;
        }

        if (!result.Agrees)
        {
            streams.Complain($"{path} is not written: with these values the model does not explain "
                + (result.Records.Length == 1 ? "the record" : "every record"));
            return ExitStatus.RequirementBroken;
        }

        var text = Targets(result.Circuit)!.Then(targets =>
            FittedText.Write(result.Circuit, targets, fit, reading.ReadBeside));
        streams.Report(text.Diagnostics);
        return !text.Succeeded ? ExitStatus.Mistake
            : NewFile.TryWrite(path, text.Value, streams) ? ExitStatus.Success
            : ExitStatus.FileTrouble;
    }

    private int Place(
        Circuit circuit, RecordOrder order, CircuitFile reading,
        ImmutableArray<PlacedRecord>.Builder placed)
    {
        if (ReadBytes(order.File) is not { } bytes)
        {
            return ExitStatus.FileTrouble;
        }

        var outcome = RecordReader.Read(order.File, bytes, order.Reading).Then(record =>
            RecordPlacement.Place(
                circuit, new RecordRequest(
                    record, order.Shows, order.With, order.ScopeInput, order.Generator, order.Given),
                reading.ReadBeside));
        streams.Report(outcome.Diagnostics);
        if (!outcome.Succeeded)
        {
            return ExitStatus.Mistake;
        }

        placed.Add(outcome.Value);
        return ExitStatus.Success;
    }

    private byte[]? ReadBytes(string path)
    {
        try
        {
            var bytes = BoundedFile.Read(path, RecordReader.LargestFile);
            if (bytes.Length <= RecordReader.LargestFile)
            {
                return bytes;
            }

            streams.Complain($"{path} cannot be read: it has more than 512 MiB");
            return null;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            var reason = Directory.Exists(path) ? "it is a folder" : FileTrouble.Reason(trouble);
            streams.Complain($"{path} cannot be read: {reason}");
            return null;
        }
    }

    private int HandOver(string file, OverlayResult result, CircuitFile reading)
    {
        var status = result.Agrees ? ExitStatus.Success : ExitStatus.RequirementBroken;
        return new StudyDelivery(options.Study, streams, cancellation).HandOver(
            file, () => Files(result, reading), OverlayJson.Write(result),
            written => OverlaySummary.Write(result, written, streams.IsColoured), status);
    }

    private ImmutableArray<OutputFile> Files(OverlayResult result, CircuitFile reading)
    {
        var picture = Task.Run(() => OverlayPlot.Png(result));
        var files = ImmutableArray.CreateBuilder<OutputFile>();
        files.Add(OutputFile.OfText("overlay.json", OverlayJson.Write(result)));
        files.Add(OutputFile.OfText("overlay.csv", OverlayCsv.Write(result)));
        files.Add(OutputFile.OfText("overlay.svg", OverlayPlot.Svg(result)));
        if (TransientAnalysis.Run(
            result.Circuit.Source, AnalysisOptions.Default, reading.ReadBeside, cancellation)
            is Solved { Result: var nominal })
        {
            files.Add(OutputFile.OfText(
                "report.html", HtmlReport.Write(nominal, options.Command, [OverlaySection.Of(result)])));
        }

        files.Add(new OutputFile("overlay.png", picture.GetAwaiter().GetResult()));
        return files.ToImmutable();
    }
}
