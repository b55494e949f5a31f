using System.Collections.Immutable;
using System.CommandLine;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Sizes;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary><c>size FILE</c>: the words of a sizing.</summary>
internal sealed class SizeCommand : Command
{
    private readonly Argument<string[]> file = Words.Files();

    private readonly Option<string[]> part = new("--part")
    {
        Description = "The part whose value is sought, such as Rsn or \"Rsn from 1 Ω to 10 kΩ\"; one or two.",
        HelpName = "PART",
        Arity = ArgumentArity.OneOrMore,
    };

    private readonly Option<string[]> value = new("--value")
    {
        Description = "A named value that is sought in place of a part, likewise.",
        HelpName = "VALUE",
        Arity = ArgumentArity.OneOrMore,
    };

    private readonly Option<string> series = new("--series")
    {
        Description = $"Preferred values of IEC 60063 only: {string.Join(' ', PreferredValues.Names)}.",
        HelpName = "SERIES",
    };

    private readonly Option<string> least = new("--least")
    {
        Description =
            "Of the values that hold, those that make this least: a sought part, or \"energy in Rsn\".",
        HelpName = "QUANTITY",
    };

    private readonly Option<string> greatest = new("--greatest")
    {
        Description = "The same, made greatest. Without either: the most room to the nearest bound.",
        HelpName = "QUANTITY",
    };

    private readonly Option<bool> withSpread = new("--with-spread")
    {
        Description = "Everything must hold at every corner of the tolerances too.",
    };

    private readonly Option<string> writeSized = new("--write-sized")
    {
        Description = "Write the circuit with the proposed values as a new file.",
        HelpName = "FILE",
    };

    private readonly StudyWords words = new();

    /// <summary>The command, writing to these streams.</summary>
    public SizeCommand(Streams streams, CancellationToken cancellation)
        : base("size", "Find the values of one or two parts for which everything holds.")
    {
        Add(file);
        foreach (var option in (Option[])[part, value, series, least, greatest, withSpread, writeSized])
        {
            Add(option);
        }

        words.AddTo(this);
        SetAction(parsed => Read(parsed, streams) is { } request
            ? new SizeRun(request, parsed.GetValue(writeSized), words.Read(parsed), streams, cancellation)
                .Run(parsed.GetRequiredValue(file)[0])
            : ExitStatus.Mistake);
    }

    private SizeRequest? Read(ParseResult parsed, Streams streams)
    {
        if (parsed.GetRequiredValue(file).Length > 1)
        {
            streams.Complain("`size` studies one circuit at a time");
            return null;
        }

        var parts = Parts(parsed, streams);
        var isRead = TryReadSeries(parsed, streams, out var preferred);
        var (low, high) = (parsed.GetValue(least), parsed.GetValue(greatest));
        if (low is not null && high is not null)
        {
            streams.Complain("say either --least or --greatest, not both");
            return null;
        }

        SizeAim aim = (low, high) switch
        {
            (null, null) => new MostRoom(),
            (not null, _) => new Extremal(new SourceText(least.Name, low), IsGreatest: false),
            _ => new Extremal(new SourceText(greatest.Name, high), IsGreatest: true),
        };
        return isRead && !parts.IsEmpty
            ? new SizeRequest(parts, preferred, aim, parsed.GetValue(withSpread))
            : null;
    }

    private ImmutableArray<SizedPartSyntax> Parts(ParseResult parsed, Streams streams)
    {
        var (parts, values) = (parsed.GetValue(part) ?? [], parsed.GetValue(value) ?? []);
        var count = parts.Length + values.Length;
        if (count is 0 or > 2)
        {
            streams.Complain(count == 0
                ? "say which part's value is sought: `--part Rsn`"
                : $"size finds the values of one or two parts, not of {count} at once");
            return [];
        }

        Outcome<SizedPartSyntax>[] read =
        [
            .. parts.Select(text => SizedPartParser.Parse(new SourceText(part.Name, text))),
            .. values.Select(text => SizedPartParser.Parse(new SourceText(value.Name, text))),
        ];
        streams.Report([.. read.SelectMany(outcome => outcome.Diagnostics)]);
        if (read is [{ Value: { } first }, { Value: { } second }] && first.Name == second.Name)
        {
            streams.Complain($"`{first.Name}` is named twice");
            return [];
        }

        return read.All(outcome => outcome.Succeeded)
            ? [.. read.Select((outcome, i) => outcome.Value! with { IsNamedValue = i >= parts.Length })]
            : [];
    }

    private bool TryReadSeries(ParseResult parsed, Streams streams, out PreferredSeries? preferred)
    {
        preferred = null;
        if (parsed.GetValue(series) is not { } name)
        {
            return true;
        }

        if (PreferredValues.TryRead(name, out var read))
        {
            preferred = read;
            return true;
        }

        streams.Complain($"`{name}` is no series of IEC 60063: {string.Join(", ", PreferredValues.Names)}");
        return false;
    }
}
