using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>solve</c>: each file solved, written and spoken of.</summary>
public sealed class SolveRun(SolveOptions options, Streams streams, CancellationToken cancellation)
{
    /// <summary>Solves the files in order.</summary>
    /// <returns>The worst of their exit statuses.</returns>
    public int Run(IReadOnlyList<string> files)
    {
        if (TwoOfOneStem(files) is { } stem)
        {
            streams.Complain($"two of the files are named `{stem}`: their results would overwrite each other");
            return ExitStatus.Mistake;
        }

        var answers = new List<Answer>();
        foreach (var file in files)
        {
            var answer = Solve(file);
            answers.Add(answer);
            if (files.Count > 1 && !options.IsJson && !options.IsQuiet)
            {
                streams.Output.WriteLine($"{file}: {answer.Verdict}");
                streams.Output.Flush();
            }
        }

        WriteResults(files.Count, [.. answers.Select(answer => answer.Result).OfType<TransientResult>()], answers[0]);
        return answers.Max(answer => answer.Status);
    }

    private static string? TwoOfOneStem(IReadOnlyList<string> files) =>
        files.GroupBy(OutputFolder.StemOf, StringComparer.Ordinal).FirstOrDefault(group => group.Count() > 1)?.Key;

    private void WriteResults(int fileCount, ImmutableArray<TransientResult> results, Answer first)
    {
        if (options.IsJson && fileCount > 1)
        {
            streams.Output.Write(JsonReport.Write(results));
        }
        else if (fileCount == 1 && results is [var result])
        {
            if (options.IsJson)
            {
                streams.Output.Write(JsonReport.Write(result));
            }
            else if (!options.IsQuiet)
            {
                streams.Output.Write(TerminalSummary.Write(result, first.Written));
            }
        }
    }

    private Answer Solve(string file)
    {
        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return new Answer(reading.Status, "not solved, the file could not be read");
        }

        using var progress = new Progress(file, streams);
        var outcome = TransientAnalysis.Run(source, options.Analysis, reading.ReadBeside, cancellation);
        cancellation.ThrowIfCancellationRequested();
        progress.Dispose();
        streams.Report(outcome.Diagnostics);
        return outcome switch
        {
            Solved solved => Finish(file, solved.Result),
            NoUniqueSolution => new Answer(ExitStatus.NoUniqueSolution, "not solved, no unique solution"),
            _ => new Answer(Math.Max(ExitStatus.Mistake, reading.Status), "not solved, the circuit has mistakes"),
        };
    }

    private Answer Finish(string file, TransientResult result)
    {
        var status = ExitStatus.Of(result, options.IsStrict);
        var verdict = TerminalSummary.Verdict(result);
        if (options.Folder is null)
        {
            return new Answer(status, verdict, result);
        }

        var folder = OutputFolder.For(options.Folder, file);
        var files = ResultFiles.Of(result);
        try
        {
            OutputFolder.Write(folder, files, cancellation);
            return new Answer(status, verdict, result) { Written = [.. files.Select(f => $"{folder}/{f.Name}")] };
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            var reason = OutputFolder.FileInTheWay(folder) is { } obstacle
                ? $"{obstacle} is a file, not a folder"
                : FileTrouble.Reason(trouble);
            streams.Complain($"the results cannot be written to {folder}: {reason}");
            return new Answer(ExitStatus.FileTrouble, verdict, result);
        }
    }

    private sealed record Answer(int Status, string Verdict, TransientResult? Result = null)
    {
        public ImmutableArray<string> Written { get; init; } = [];
    }
}
