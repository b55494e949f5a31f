using System.CommandLine;
using CircuitTransient.Measurements;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary><c>solve FILE…</c>: the words of the main job.</summary>
internal sealed class SolveCommand : Command
{
    private readonly Argument<string[]> files = Words.Files();

    private readonly Option<string> at = new("--at")
    {
        Description = "Instants to give exact values at, such as \"1 ms, 2.5 ms\".",
        HelpName = "TIMES",
    };

    private readonly Option<string> after = new("--after")
    {
        Description = "Break peaks down anew since an event: \"Kmain closes\", an instant, or last.",
        HelpName = "EVENT",
    };

    private readonly Option<Breakdown> by = new("--by")
    {
        Description = "What peaks are broken down by: origin (the default), edge, switching or mode.",
        HelpName = "KIND",
        CustomParser = ByWords.Read,
    };

    private readonly Option<int> samples = new("--samples")
    {
        Description = "How many samples of each waveform to aim at.",
        HelpName = "N",
        DefaultValueFactory = _ => SolveOptions.UsualSampleCount,
        CustomParser = Words.WholeNumber(2, 1_000_000),
    };

    private readonly Option<bool> pdf = new("--pdf") { Description = "Write the report as PDF too." };

    private readonly Option<bool> strict = new("--strict")
    {
        Description = "Count warnings and passed linear ranges as broken requirements.",
    };

    private readonly StudyWords words = new();

    /// <summary>The command, writing to these streams.</summary>
    public SolveCommand(Streams streams, CancellationToken cancellation)
        : base("solve", "Solve circuits, print a summary and write the results.")
    {
        by.CompletionSources.Add([.. ByWords.All]);
        Add(files);
        foreach (var option in (Option[])[at, by, after, samples, pdf, strict])
        {
            Add(option);
        }

        words.AddTo(this);
        SetAction(parsed => Read(parsed, streams) is { } options
            ? new SolveRun(options, streams, cancellation).Run(parsed.GetRequiredValue(files))
            : ExitStatus.Mistake);
    }

    private SolveOptions? Read(ParseResult parsed, Streams streams)
    {
        var text = parsed.GetValue(at);
        var instants = text is null
            ? new(InstantList.Empty, [])
            : InstantListParser.Parse(new SourceText(at.Name, text));
        streams.Report(instants.Diagnostics);
        var said = parsed.GetValue(after);
        var since = said is null ? null : AfterWords.Read(said, streams);
        var asked = words.Read(parsed);
        return instants.Succeeded && (said is null || since is not null)
            ? new SolveOptions(
                instants.Value,
                parsed.GetRequiredValue(samples),
                asked.Folder,
                asked.IsJson,
                asked.IsQuiet,
                parsed.GetValue(strict),
                parsed.GetValue(pdf))
            { After = since, By = parsed.GetValue(by) }
            : null;
    }
}
