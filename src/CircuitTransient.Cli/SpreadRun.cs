using System.Diagnostics;
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

        var partial = delivery.Folder is { } root
            ? Path.Combine(OutputFolder.For(root, file), SpreadPartial.Name)
            : null;
        if (resumes && (partial is null || !File.Exists(partial)))
        {
            streams.Complain(partial is null
                ? "`--resume` needs the folder of results, and `--no-files` wants none"
                : $"there is nothing to go on with: {partial} does not exist");
            return ExitStatus.Mistake;
        }

        if (!resumes && partial is not null && File.Exists(partial))
        {
            streams.Error.WriteLine(
                $"{partial} holds unfinished draws, which this run replaces; `--resume` would go on with "
                + "them");
        }

        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        using var progress = new StudyProgress(streams);
        progress.Report($"solving {file}", 0, 0);
        var outcome = TransientAnalysis.Run(
            source, AnalysisOptions.Default, reading.ReadBeside, cancellation);
        switch (outcome)
        {
            case Solved { Result: var nominal }:
                return Study(file, nominal, reading, partial, progress);
            case NoUniqueSolution trouble:
                streams.Report(trouble.Diagnostics);
                return ExitStatus.NoUniqueSolution;
            case Mistakes mistakes:
                streams.Report(mistakes.Diagnostics);
                return Math.Max(ExitStatus.Mistake, reading.Status);
            default:
                throw new UnreachableException($"no status for {outcome}");
        }
    }

    private int Study(
        string file, TransientResult nominal, CircuitFile reading, string? partial, StudyProgress progress)
    {
        var varied = VariedCircuit.Of(nominal.Circuit, [new EveryTolerance()], reading.ReadBeside);
        if (varied.Value is not { Values.IsEmpty: false } values)
        {
            streams.Complain($"{file}: no value has a tolerance, so there is nothing to spread; "
                + "write one after a value, such as `82 Ω ±10 %`");
            return ExitStatus.Mistake;
        }

        var study = new SpreadStudy(values, nominal, options, Show, cancellation);
        if (resumes && SpreadPartial.Load(
            File.ReadAllBytes(partial!), study, nominal.Circuit.Source.Sha256, options) is { } refusal)
        {
            progress.Dispose();
            streams.Complain($"{partial} cannot be taken up: {refusal}; without `--resume` the study "
                + "begins anew and replaces it");
            return ExitStatus.Mistake;
        }

        SpreadResult result;
        try
        {
            result = study.Finish(Show, SpreadPlot.Details(nominal));
        }
        catch (OperationCanceledException) when (partial is not null && study.DrawsDone > 0)
        {
            progress.Dispose();
            Leave(file, study, nominal.Circuit.Source.Sha256, partial);
            throw;
        }

        progress.Dispose();
        return HandOver(file, result, reading, partial);

        void Show(SpreadProgress p) => progress.Report(p.Stage, p.Done, p.All);
    }

    private void Leave(string file, SpreadStudy study, string sha256, string partial)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(partial)!);
        using var unfinished = new UnfinishedFile(partial, SpreadPartial.Write(study, sha256, options));
        unfinished.Finish();
        var folder = delivery.Folder == "output" ? "" : $" --out {delivery.Folder}";
        streams.Error.WriteLine(
            $"stopped after {study.DrawsDone:N0} of {options.Draws:N0} draws; go on with `circuit-transient "
            + $"spread {file} --draws {options.Draws} --seed {options.Seed}{folder} --resume`");
    }

    private int HandOver(string file, SpreadResult result, CircuitFile reading, string? partial)
    {
        foreach (var warning in result.Nominal.Warnings)
        {
            var place = warning.Line > 0 ? $"{file}:{warning.Line}" : file;
            streams.Error.WriteLine($"{place}: warning: {warning.Text}");
        }

        var status = !result.Nominal.ChecksHold || result.Worst?.Result.ChecksHold == false
            ? ExitStatus.SelfCheckFailed
            : result.AllHold ? ExitStatus.Success : ExitStatus.RequirementBroken;
        status = new StudyDelivery(delivery, streams, cancellation).HandOver(
            file, () => SpreadFiles.Of(result, CommandFor(file)), SpreadJson.Write(result),
            written => SpreadSummary.Write(result, written, streams.IsColoured), status);
        if (partial is not null && File.Exists(partial) && status != ExitStatus.FileTrouble)
        {
            File.Delete(partial);
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
        var name = Path.GetFileName(file);
        var isPlain = name.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_');
        var draws = options.Draws == SpreadOptions.UsualDraws ? "" : $" --draws {options.Draws}";
        var seed = options.Seed == 1 ? "" : $" --seed {options.Seed}";
        return $"circuit-transient spread {(isPlain ? name : $"\"{name}\"")}{draws}{seed}";
    }
}
