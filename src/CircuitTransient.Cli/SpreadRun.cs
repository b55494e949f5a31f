using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>spread</c>.</summary>
/// <param name="options">How many draws, their seed, how many threads.</param>
/// <param name="delivery">Where results go.</param>
/// <param name="worstFile">Where the worst case's circuit goes; null where it is not wanted.</param>
/// <param name="resumes">Whether unfinished draws are taken up.</param>
/// <param name="streams">Where to write.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class SpreadRun(
    SpreadOptions options, StudyOptions delivery, string? worstFile, bool resumes, Streams streams,
    CancellationToken cancellation)
{
    /// <summary>Studies one circuit.</summary>
    /// <returns>One of <see cref="ExitStatus"/>.</returns>
    public int Run(string file)
    {
        if (worstFile is not null && NewFile.Refusal(worstFile, streams) is { } refusal)
        {
            return refusal;
        }

        var partial = StudyPartial.In(delivery.Folder, file, "spread", "draws");
        if (partial.Refusal(resumes, streams) is { } unresumed)
        {
            return unresumed;
        }

        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        using var progress = new StudyProgress(streams);
        progress.Report($"solving {file}", 0, 0);
        var outcome = BeforeDraws(progress, () => TransientAnalysis.Run(
            source, AnalysisOptions.Default, reading.ReadBeside, cancellation));
        switch (outcome)
        {
            case Solved { Result: var nominal }:
                return Study(file, nominal, reading, partial, progress);
            default:
                return reading.Refuse(outcome, streams);
        }
    }

    private int Study(
        string file, TransientResult nominal, CircuitFile reading, StudyPartial partial,
        StudyProgress progress)
    {
        var varied = VariedCircuit.Of(nominal.Circuit, [new EveryTolerance()], reading.ReadBeside);
        if (varied.Value is not { Values.IsEmpty: false } values)
        {
            var hasAny = nominal.Circuit.Parameters.Any(p => p.Tolerance is { } t && t.Highest > t.Lowest);
            streams.Complain(hasAny
                ? $"{file}: every value that has a tolerance stays at its nominal value, so there is nothing "
                    + "to spread; `check` says where"
                : $"{file}: no value has a tolerance, so there is nothing to spread; "
                    + "write one after a value, such as `82 Ω ±10 %`");
            return ExitStatus.Mistake;
        }

        var identity = PartialIdentity.Of(reading, CommandText.Joined(Asked));
        if (resumes && partial.Refusal(identity, streams) is { } refusal)
        {
            progress.Dispose();
            return refusal;
        }

        var study = BeforeDraws(
            progress, () => new SpreadStudy(values, nominal, options, Show, cancellation));
        if (resumes)
        {
            partial.Load(identity, study.LoadDraws);
        }

        try
        {
            var result = study.Finish(Show, SpreadPlot.Details(nominal));
            progress.Dispose();
            return HandOver(file, result, reading, partial);
        }
        catch (OperationCanceledException) when (partial.IsWanted && study.DrawsDone > 0)
        {
            progress.Dispose();
            partial.Leave(
                identity, study.SaveDraws, $"{study.DrawsDone:N0} of {options.Draws:N0} draws",
                ["spread", file, .. Asked, .. delivery.FolderAsked], streams);
            throw;
        }

        void Show(SpreadProgress p) => progress.Report(p.Stage, p.Done, p.All);
    }

    /// <summary>Work before the draws; says of an interruption there that it leaves nothing.</summary>
    private T BeforeDraws<T>(StudyProgress progress, Func<T> work)
    {
        try
        {
            return work();
        }
        catch (OperationCanceledException)
        {
            progress.Dispose();
            streams.Error.WriteLine(
                "stopped before the first draw; nothing could be kept, for the search for the extremes "
                + "starts anew each time");
            throw;
        }
    }

    private ImmutableArray<string> Asked => ["--draws", $"{options.Draws}", "--seed", $"{options.Seed}"];

    private int HandOver(string file, SpreadResult result, CircuitFile reading, StudyPartial partial)
    {
        streams.Warn(file, result.Nominal.Warnings);
        var status = !result.Nominal.ChecksHold || result.Worst?.Result.ChecksHold == false
            ? ExitStatus.SelfCheckFailed
            : result.AllHold ? ExitStatus.Success : ExitStatus.RequirementBroken;
        status = new StudyDelivery(delivery, streams, cancellation).HandOver(
            file, () => SpreadFiles.Of(result, CommandFor(file)), SpreadJson.Write(result),
            written => SpreadSummary.Write(result, written, streams.IsColoured), status);
        if (status != ExitStatus.FileTrouble)
        {
            partial.Remove();
        }

        return worstFile is null ? status : Math.Max(status, WriteWorst(result, reading, worstFile));
    }

    private int WriteWorst(SpreadResult result, CircuitFile reading, string path)
    {
        if (result.Worst is null)
        {
            streams.Complain($"{path} is not written: no figure has a worst case");
            return ExitStatus.Mistake;
        }

        var text = WorstCircuit.Write(result, reading.ReadBeside);
        streams.Report(text.Diagnostics);
        return text.Value is not { } content ? ExitStatus.Mistake
            : NewFile.TryWrite(path, content, streams) ? ExitStatus.Success
            : ExitStatus.FileTrouble;
    }

    private string CommandFor(string file)
    {
        string[] draws = options.Draws == SpreadOptions.UsualDraws ? [] : ["--draws", $"{options.Draws}"];
        string[] seed = options.Seed == 1 ? [] : ["--seed", $"{options.Seed}"];
        return CommandText.Of(["spread", Path.GetFileName(file), .. draws, .. seed]);
    }
}
