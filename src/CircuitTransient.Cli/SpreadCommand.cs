using System.CommandLine;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Cli;

/// <summary><c>spread FILE</c>: what the tolerances in the file come to.</summary>
internal sealed class SpreadCommand : Command
{
    private readonly Argument<string[]> files = Words.Files();

    private readonly Option<int> draws = new("--draws")
    {
        Description = "How many random draws to make after the hard extremes; 0 for none.",
        HelpName = "N",
        DefaultValueFactory = _ => SpreadOptions.UsualDraws,
        CustomParser = Words.WholeNumber(0, SpreadOptions.MostDraws),
    };

    private readonly Option<int> seed = new("--seed")
    {
        Description = "Seed of the draws; the same seed gives the same results.",
        HelpName = "S",
        DefaultValueFactory = _ => 1,
        CustomParser = Words.WholeNumber(0, int.MaxValue),
    };

    private readonly Option<string> worst = new("--write-worst")
    {
        Description = "Write the circuit of the worst case, with its values in place of the tolerances.",
        HelpName = "FILE",
    };

    private readonly Option<bool> resume = new("--resume")
    {
        Description = "Go on with the draws that an interruption left unfinished.",
    };

    private readonly StudyWords words = new();

    /// <summary>The command, writing to these streams.</summary>
    public SpreadCommand(Streams streams, CancellationToken cancellation)
        : base("spread", "Find what the tolerances come to: extremes, draws, and what drives them.")
    {
        Add(files);
        foreach (var option in (Option[])[draws, seed, worst, resume])
        {
            Add(option);
        }

        words.AddTo(this);
        SetAction(parsed =>
        {
            if (parsed.GetRequiredValue(files) is not [var file])
            {
                streams.Complain("`spread` studies one circuit at a time");
                return ExitStatus.Mistake;
            }

            var options = new SpreadOptions(
                parsed.GetRequiredValue(draws), (ulong)parsed.GetRequiredValue(seed),
                Environment.ProcessorCount);
            return new SpreadRun(
                options, words.Read(parsed), parsed.GetValue(worst), parsed.GetValue(resume), streams,
                cancellation).Run(file);
        });
    }
}
