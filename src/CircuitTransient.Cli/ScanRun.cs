using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Html;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>scan</c>.</summary>
public sealed class ScanRun(ScanOptions options, Streams streams, CancellationToken cancellation)
{
    /// <summary>Scans the circuit of a file.</summary>
    /// <returns>One of <see cref="ExitStatus"/>.</returns>
    public int Run(string file)
    {
        var partial = StudyPartial.In(options.Study.Folder, file, "scan", "points");
        if (partial.Refusal(options.Resumes, streams) is { } refusal)
        {
            return refusal;
        }

        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        var circuit = TransientAnalysis.Check(source, reading.ReadBeside);
        streams.Report(circuit.Diagnostics);
        if (circuit.Value is not { } known)
        {
            return Math.Max(ExitStatus.Mistake, reading.Status);
        }

        var planned = ScanPlan.Of(known, options.Scanned, options.Scatter, reading.ReadBeside);
        streams.Report(planned.Diagnostics);
        return planned.Value is { } plan ? Run(file, plan, reading, partial) : ExitStatus.Mistake;
    }

    private int Run(string file, ScanPlan plan, CircuitFile reading, StudyPartial partial)
    {
        var memory = new ScanMemory();
        var identity = PartialIdentity.Of(reading, CommandText.Joined(options.Asked));
        if (options.Resumes)
        {
            if (partial.Refusal(identity, streams) is { } refusal)
            {
                return refusal;
            }

            partial.Load(identity, memory.Load);
        }

        var (all, done) = (Scanner.PointCount(plan), 0);
        using var progress = new StudyProgress(streams);
        try
        {
            var result = Scanner.Run(plan, memory, Count, cancellation);
            progress.Dispose();
            var status = HandOver(file, result, reading);
            if (status != ExitStatus.FileTrouble)
            {
                partial.Remove();
            }

            return status;
        }
        catch (OperationCanceledException) when (partial.IsWanted && memory.PointCount > 0)
        {
            progress.Dispose();
            partial.Leave(
                identity, memory.Save,
                done < all ? $"{done:N0} of {all:N0} points" : "the points, in the search between them",
                ["scan", file, .. options.Asked, .. options.Study.FolderAsked], streams);
            throw;
        }

        void Count(int solved)
        {
            var count = Interlocked.Add(ref done, solved);
            if (count < all)
            {
                progress.Report("points", count, all);
            }
            else
            {
                progress.Report("searching between the points", 0, 0);
            }
        }
    }

    private int HandOver(string file, ScanResult result, CircuitFile reading)
    {
        var points = result.Points.Concat(result.Scatter?.Points ?? []).ToArray();
        if (points.All(p => p.Found is null))
        {
            streams.Complain($"{file}: no point of the scan has a solution: {points[0].Trouble}");
            return ExitStatus.NoUniqueSolution;
        }

        var document = ScanJson.Write(result);
        return new StudyDelivery(options.Study, streams, cancellation).HandOver(
            file, () => Files(file, result, document, reading), document,
            written => ScanSummary.Write(result, written, streams.IsColoured),
            result.UnsolvedCount > 0 ? ExitStatus.NoUniqueSolution
                : result.AllHold ? ExitStatus.Success
                : ExitStatus.RequirementBroken);
    }

    private ImmutableArray<OutputFile> Files(
        string file, ScanResult result, string document, CircuitFile reading)
    {
        // The picture takes as long as all else together, and a second core is mostly there.
        var picture = Task.Run(() => ScanPlot.Png(result));
        var files = ImmutableArray.CreateBuilder<OutputFile>();
        files.Add(OutputFile.OfText("scan.json", document));
        files.Add(OutputFile.OfText("scan.csv", ScanCsv.Write(result)));
        files.Add(OutputFile.OfText("scan.svg", ScanPlot.Svg(result)));
        if (Page(file, result, reading) is { } page)
        {
            files.Add(page);
        }

        files.Add(new OutputFile("scan.png", picture.GetAwaiter().GetResult()));
        return files.ToImmutable();
    }

    /// <summary>The report of the circuit as written with what the scan found; nothing where the circuit as
    /// written has no solution.</summary>
    private OutputFile? Page(string file, ScanResult result, CircuitFile reading)
    {
        var written = TransientAnalysis.Run(
            result.Circuit.Source, new AnalysisOptions([], SolveOptions.UsualSampleCount), reading.ReadBeside,
            cancellation);
        return written is Solved { Result: var nominal }
            ? OutputFile.OfText(
                "report.html", HtmlReport.Write(nominal, options.CommandFor(file), ScanSection.Of(result)))
            : null;
    }
}
