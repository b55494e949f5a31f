using System.CommandLine;
using CircuitTransient.Studies.Comparing;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary><c>compare A B</c>: the words of a comparison of two results documents.</summary>
internal sealed class CompareCommand : Command
{
    private readonly Argument<string> before = ResultsArgument("BEFORE", "The results as they were.");

    private readonly Argument<string> after = ResultsArgument("AFTER", "The results as they are.");

    private readonly Option<string> within = new("--within")
    {
        Description = "Overlook differences up to this fraction of a quantity's own size, such as \"1 %\".",
        HelpName = "PERCENT",
    };

    private readonly Option<bool> json = new("--json") { Description = "Print the comparison's document." };

    private readonly Option<bool> quiet = new("--quiet") { Description = "Print no summary." };

    /// <summary>The command, writing to these streams.</summary>
    public CompareCommand(Streams streams, CancellationToken cancellation)
        : base("compare", "Compare two results documents: what changed in inputs, figures and verdicts. " +
            "Ends with 1 where a verdict turned for the worse, or is missing because the two are of " +
            "different circuits; a " +
            "requirement taken out of the same circuit is said and ends with 0.")
    {
        Add(before);
        Add(after);
        foreach (var option in (Option[])[within, json, quiet])
        {
            Add(option);
        }

        SetAction(parsed => Fraction(parsed, streams) is { } fraction
            ? new CompareRun(fraction, parsed.GetValue(json), parsed.GetValue(quiet), streams, cancellation)
                .Run(parsed.GetRequiredValue(before), parsed.GetRequiredValue(after))
            : ExitStatus.Mistake);
    }

    private static Argument<string> ResultsArgument(string name, string description) => new(name)
    {
        Description = description,
        HelpName = name,
    };

    private double? Fraction(ParseResult parsed, Streams streams)
    {
        if (parsed.GetValue(within) is not { } words)
        {
            return DocumentComparison.Rounding;
        }

        var read = PercentParser.Parse(new SourceText(within.Name, words));
        streams.Report(read.Diagnostics);
        return read.Value?.Value;
    }
}
