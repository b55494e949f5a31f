using System.Collections.Immutable;
using System.CommandLine;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary><c>scan FILE</c>: a family of solutions over one or two values.</summary>
internal sealed class ScanCommand : Command
{
    private const int MostScanned = 2;

    private readonly Argument<string[]> files = Words.Files();
    private readonly StudyWords study = new();

    private readonly Option<string[]> values = Scanned(
        "--value", "A named value over a range: \"Rdamp from 1 Ω to 10 Ω in 50 steps\".");

    private readonly Option<string[]> parts = Scanned(
        "--part", "A part's value: \"Rsn from 10 Ω to 1 kΩ in 20 steps a decade\", \"… in E12\".");

    private readonly Option<string[]> phases = Scanned(
        "--phase", "The phase of a source: \"Grid from 0° to 360° in 5° steps\".");

    private readonly Option<string[]> events = Scanned(
        "--event", "The instant of an event: \"Kmain closes from 0 s to 20 ms in 200 steps\".");

    private readonly Option<string> scatter = new("--scatter")
    {
        Description = "How far an event's instant may lie off: \"Kmain closes by 0.5 ms\".",
        HelpName = "SCATTER",
    };

    private readonly Option<bool> resume = new("--resume")
    {
        Description = "Go on with the scan that an interruption left unfinished.",
    };

    /// <summary>The command, writing to these streams.</summary>
    public ScanCommand(Streams streams, CancellationToken cancellation)
        : base("scan", "Solve a family over one or two values; find the worst and where it breaks.")
    {
        Add(files);
        foreach (var option in (Option[])[values, parts, phases, events, scatter, resume])
        {
            Add(option);
        }

        study.AddTo(this);
        SetAction(parsed =>
        {
            if (parsed.GetRequiredValue(files) is not [var file])
            {
                streams.Complain("`scan` studies one circuit at a time");
                return ExitStatus.Mistake;
            }

            return Read(parsed, streams) is { } options
                ? new ScanRun(options, streams, cancellation).Run(file)
                : ExitStatus.Mistake;
        });
    }

    private static Option<string[]> Scanned(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "RANGE",
        AllowMultipleArgumentsPerToken = false,
    };

    private ScanOptions? Read(ParseResult parsed, Streams streams)
    {
        // In the order they were said: the first runs across a map, the second upwards.
        var scanned = parsed.Tokens.Zip(parsed.Tokens.Skip(1))
            .Select(pair => (Kind: KindOf(pair.First.Value), Words: new SourceText(
                pair.First.Value, pair.Second.Value)))
            .Where(said => said.Kind is not null)
            .Select(said => ScannedParser.Parse(said.Words, said.Kind!.Value))
            .ToImmutableArray();
        var words = parsed.GetValue(scatter);
        var scattered = words is null ? null : ScatterParser.Parse(new SourceText(scatter.Name, words));
        streams.Report([.. scanned.SelectMany(s => s.Diagnostics), .. scattered?.Diagnostics ?? []]);
        if (scanned.Any(s => !s.Succeeded) || scattered is { Succeeded: false })
        {
            return null;
        }

        if (scanned.IsEmpty && scattered is null)
        {
            streams.Complain("say what to scan: `--part \"Rsn from 10 Ω to 1 kΩ in 50 steps\"`, or --value, "
                + "--phase, --event, --scatter");
            return null;
        }

        if (scanned.Length > MostScanned)
        {
            streams.Complain($"{scanned.Length} values are to be scanned at once; a scan takes one or two");
            return null;
        }

        return new ScanOptions(
            [.. scanned.Select(s => s.Value!)], scattered?.Value, parsed.GetValue(resume),
            study.Read(parsed));
    }

    private ScannedKind? KindOf(string option) =>
        option == values.Name ? ScannedKind.Value
        : option == parts.Name ? ScannedKind.Part
        : option == phases.Name ? ScannedKind.Phase
        : option == events.Name ? ScannedKind.Event
        : null;
}
