using System.CommandLine;
using CircuitTransient.Reports.Formula;

namespace CircuitTransient.Cli;

/// <summary><c>formula FILE --of QUANTITY</c>: the words of closed forms.</summary>
internal sealed class FormulaCommand : Command
{
    private readonly Argument<string[]> files = Words.Files();

    private readonly Option<string[]> of = new("--of")
    {
        Description = "The quantity, such as \"voltage of bus\", or an observation's label; may be repeated. "
            + "Without it, every observation of the file.",
        HelpName = "QUANTITY",
        DefaultValueFactory = _ => [],
    };

    private readonly Option<bool> json = new("--json") { Description = "Print a document with all digits." };

    private readonly Option<bool> latex = new("--latex") { Description = "Print LaTeX (needs amsmath)." };

    private readonly Option<int> digits = new("--digits")
    {
        Description = "Significant digits of text and LaTeX.",
        HelpName = "N",
        DefaultValueFactory = _ => FormulaText.UsualDigits,
        CustomParser = Words.WholeNumber(2, 15),
    };

    /// <summary>The command, writing to these streams.</summary>
    public FormulaCommand(Streams streams, CancellationToken cancellation)
        : base("formula", "Write quantities out in closed form, by interval and cause.")
    {
        Add(files);
        foreach (var option in (Option[])[of, json, latex, digits])
        {
            Add(option);
        }

        Validators.Add(result =>
        {
            if (result.GetValue(json) && result.GetValue(latex))
            {
                result.AddError("`--json` and `--latex` both ask for the output; give one of them");
            }
        });
        SetAction(parsed => new FormulaRun(
            [.. parsed.GetRequiredValue(of)], parsed.GetValue(json), parsed.GetValue(latex),
            parsed.GetRequiredValue(digits), streams, cancellation).Run(parsed.GetRequiredValue(files)));
    }
}
