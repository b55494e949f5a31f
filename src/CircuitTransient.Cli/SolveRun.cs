using System.Collections.Immutable;
using System.Diagnostics;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>solve</c>: each file solved, written and spoken of.</summary>
public sealed class SolveRun(SolveOptions options, Streams streams, CancellationToken cancellation)
{
    private AnalysisOptions Analysis =>
        new([.. options.At.Instants.Select(instant => instant.Value)], options.SampleCount,
            options.After?.Event)
        { By = options.By, IsForPage = options.Folder is not null };

    /// <summary>Solves the files in order.</summary>
    /// <returns>The worst of their exit statuses.</returns>
    public int Run(IReadOnlyList<string> files)
    {
        if (TwoOfOneStem(files) is { } twins)
        {
            var places = twins.Select(Path.GetFullPath).Distinct(StringComparer.Ordinal);
            streams.Complain(places.Count() < twins.Count()
                ? $"`{twins.First()}` is given twice"
                : $"two files are named `{twins.Key}`: their results would overwrite each other");
            return ExitStatus.Mistake;
        }

        var keeps = files.Count == 1 || options.IsJson; // a result holds its whole solution
        var answers = new List<Answer>();
        foreach (var file in files)
        {
            var answer = Solve(file);
            answers.Add(keeps ? answer : answer with { Result = null });
            if (files.Count > 1 && !options.IsJson && !options.IsQuiet)
            {
                streams.Output.WriteLine($"{file}: {answer.Verdict}");
                streams.Output.Flush();
            }
        }

        var results = answers.Select(answer => answer.Result).OfType<TransientResult>();
        WriteResults(files.Count, [.. results], answers[0]);
        return answers.Max(answer => answer.Status);
    }

    private static IGrouping<string, string>? TwoOfOneStem(IReadOnlyList<string> files) =>
        files.GroupBy(OutputFolder.StemOf, StringComparer.Ordinal)
            .FirstOrDefault(group => group.Count() > 1);

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
                streams.Output.Write(TerminalSummary.Write(
                    result, first.Written, streams.IsColoured, streams.OutputWidth));
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
        var outcome = TransientAnalysis.Run(source, Analysis, reading.ReadBeside, cancellation);
        cancellation.ThrowIfCancellationRequested();
        progress.Dispose();
        switch (outcome)
        {
            case Solved { Result: var result }:
                if (options.After?.Missing(result) is { } missing)
                {
                    streams.Complain($"{file}: {missing}");
                    return new(ExitStatus.Mistake, "has no such event");
                }

                return IsWithin(result.Until)
                    ? Finish(file, result)
                    : new(ExitStatus.Mistake, "ends before an instant asked for");
            case NoUniqueSolution trouble:
                streams.Report(trouble.Diagnostics);
                return new(ExitStatus.NoUniqueSolution, "not solved, no unique solution");
            case Mistakes mistakes:
                streams.Report(mistakes.Diagnostics);
                return new(Math.Max(ExitStatus.Mistake, reading.Status), "not solved, it has mistakes");
            default:
                throw new UnreachableException($"no status for {outcome}");
        }
    }

    /// <summary>Whether every instant asked for lies in the study; says which do not.</summary>
    private bool IsWithin(double until)
    {
        var end = EngineeringNumber.Format(until, "s");
        var late = options.At.Instants.Where(instant => instant.Value > until).Select(instant =>
            Diagnostic.Error(
                options.At.Source, instant.Span, $"the study ends before it, at {end}",
                $"ask for one up to {end}, or end the study later: "
                    + $"`until {options.At.Source[instant.Span]}`"));
        var mistakes = late.ToImmutableArray();
        streams.Report(mistakes);
        return mistakes.IsEmpty;
    }

    private Answer Finish(string file, TransientResult result)
    {
        streams.Warn(file, result.Warnings);
        var status = ExitStatus.Of(result, options.IsStrict);
        var verdict = TerminalSummary.Verdict(result);
        if (options.Folder is null)
        {
            return new Answer(status, verdict, result);
        }

        var folder = OutputFolder.For(options.Folder, file);
        var files = ResultFiles.Of(result, options.CommandFor(file), options.IsPdf);
        return OutputFolder.TryWrite(folder, files, streams, cancellation)
            ? new(status, verdict, result) { Written = [.. files.Select(f => $"{folder}/{f.Name}")] }
            : new(ExitStatus.FileTrouble, verdict, result);
    }

    private sealed record Answer(int Status, string Verdict, TransientResult? Result = null)
    {
        public ImmutableArray<string> Written { get; init; } = [];
    }
}
