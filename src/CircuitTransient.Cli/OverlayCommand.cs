using System.Collections.Immutable;
using System.CommandLine;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Studies.Records;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary><c>overlay FILE RECORD…</c>: the words of laying records over the solution.</summary>
internal sealed class OverlayCommand : Command
{
    private readonly Argument<string> file = new("FILE") { Description = "The circuit file." };

    private readonly Argument<string[]> records = new("RECORD")
    {
        Description = "Oscilloscope records: tables of text with a time and values.",
        Arity = ArgumentArity.OneOrMore,
    };

    private readonly Option<string[]> shows =
        Each("--as", "QUANTITY", "What a record shows, such as \"voltage of x\".");

    private readonly Option<string[]> channel =
        Each("--channel", "NAME", "The column to read, by title or number.");

    private readonly Option<string[]> interval =
        Each("--interval", "TIME", "Sample interval, where there is no time column.");

    private readonly Option<string[]> mark = Each("--decimal", "MARK", "The decimal mark: point or comma.");

    private readonly Option<string[]> offset =
        Each("--offset", "TIME", "Record time less study time; else estimated.");

    private readonly Option<string[]> gain = Each("--gain", "NUMBER", "Record over model; else estimated.");

    private readonly Option<string[]> level =
        Each("--level", "VALUE", "Record where the model is zero; else estimated.");

    private readonly Option<string[]> with =
        Each("--with", "PART", "A part added for a record: \"capacitor C9 at x : 1 nF\".");

    private readonly Option<string[]> input =
        Each("--scope-input", "VALUES", "The instrument's input: \"10 MΩ parallel 12 pF\".");

    private readonly Option<string[]> generator =
        Each("--generator", "VALUE", "Resistance of a source: \"50 Ω\" or \"Edge: 50 Ω\".");

    private readonly Option<string> fit = new("--fit")
    {
        Description = "Values to fit to all records at once: \"Llp, Cn, Rd\".",
        HelpName = "VALUES",
    };

    private readonly Option<string> fitted = new("--write-fitted")
    {
        Description = "A new circuit file with the fitted values; nothing is overwritten.",
        HelpName = "FILE",
    };

    private readonly StudyWords study = new();

    /// <summary>The command, writing to these streams.</summary>
    public OverlayCommand(Streams streams, CancellationToken cancellation)
        : base("overlay", "Lay oscilloscope records over the solution, and fit part values to them.")
    {
        Add(file);
        Add(records);
        foreach (var option in (Option[])[
            shows, channel, interval, mark, offset, gain, level, with, input, generator, fit, fitted])
        {
            Add(option);
        }

        study.AddTo(this);
        SetAction(parsed => Read(parsed, streams) is { } options
            ? new OverlayRun(options, streams, cancellation).Run(parsed.GetRequiredValue(file))
            : ExitStatus.Mistake);
    }

    private static Option<string[]> Each(string name, string value, string description) => new(name)
    {
        Description = $"{description} Said for one record as \"RECORD: …\".",
        HelpName = value,
        Arity = ArgumentArity.OneOrMore,
        AllowMultipleArgumentsPerToken = false,
    };

    private OverlayOptions? Read(ParseResult parsed, Streams streams)
    {
        var names = parsed.GetRequiredValue(records);
        if (names.Distinct(StringComparer.Ordinal).Count() < names.Length)
        {
            streams.Complain("a record is given twice");
            return null;
        }

        if (parsed.GetValue(fitted) is not null && parsed.GetValue(fit) is null)
        {
            streams.Complain("--write-fitted: there are no fitted values without `--fit`");
            return null;
        }

        var orders = ImmutableArray.CreateBuilder<RecordOrder>();
        foreach (var name in names)
        {
            if (OrderOf(name, names, parsed, streams) is not { } order)
            {
                return null;
            }

            orders.Add(order);
        }

        var words = parsed.Tokens.Select(t =>
            Path.IsPathRooted(t.Value) ? Path.GetFileName(t.Value) : t.Value);
        return new OverlayOptions(
            orders.ToImmutable(), parsed.GetValue(fit), parsed.GetValue(fitted),
            CommandText.Of(words), study.Read(parsed));
    }

    private RecordOrder? OrderOf(string name, string[] names, ParseResult parsed, Streams streams)
    {
        string? Said(Option<string[]> option) =>
            new RecordWords(parsed.GetValue(option) ?? []).OneFor(name, names);

        if (Said(mark) is not (null or "comma" or "point"))
        {
            streams.Complain("--decimal: say `point` or `comma`");
            return null;
        }

        var numbers = new Numbers(streams);
        var reading = new RecordOptions(
            Said(channel), numbers.Read(interval.Name, Said(interval), "such as `1 ns`", Dimension.Time),
            Said(mark) switch { null => null, "comma" => ',', _ => '.' });
        var given = new AlignmentGiven(
            numbers.Read(offset.Name, Said(offset), "such as `3.3 ns`", Dimension.Time),
            numbers.Read(gain.Name, Said(gain), "such as `1.012` or `10`", Dimension.None),
            numbers.Read(level.Name, Said(level), "such as `60 mV`", Dimension.Voltage, Dimension.Current));
        if (reading.Interval <= 0)
        {
            streams.Complain("--interval: a sample interval is more than zero");
            return null;
        }

        if (given.Gain == 0)
        {
            streams.Complain("--gain: a gain of zero shows nothing");
            return null;
        }

        return numbers.AreRead
            ? new RecordOrder(
                name, reading, Said(shows),
                [.. new RecordWords(parsed.GetValue(with) ?? []).For(name, names)], Said(input),
                Said(generator), given)
            : null;
    }

    /// <summary>Reads numbers with units; says what is wrong with one.</summary>
    private sealed class Numbers(Streams streams)
    {
        public bool AreRead { get; private set; } = true;

        public double? Read(string option, string? text, string form, params Dimension[] dimensions)
        {
            if (text is null)
            {
                return null;
            }

            var read = GivenNumberParser.Parse(new SourceText(option, text), dimensions, form);
            streams.Report(read.Diagnostics);
            AreRead &= read.Succeeded;
            return read.Value?.Value;
        }
    }
}
