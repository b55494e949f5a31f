using System.Text.RegularExpressions;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>A quantity's closed form as read back from the printed text.</summary>
/// <param name="Stretches">In the order printed.</param>
internal sealed partial record WrittenFormula(IReadOnlyList<WrittenStretch> Stretches)
{
    /// <summary>Reads the part of a text that belongs to a quantity.</summary>
    public static WrittenFormula Read(string text, string quantity)
    {
        var stretches = new List<WrittenStretch>();
        var after = Unwrapped(text).SkipWhile(l => l != quantity).Skip(1);
        foreach (var line in after.TakeWhile(l => l is "" || l[0] == ' '))
        {
            if (Heading().Match(line) is { Success: true } heading)
            {
                var start = heading.Groups["start"].Value;
                stretches.Add(new(
                    Number(heading.Groups["from"].Value), Number(heading.Groups["until"].Value),
                    start.Length == 0 ? 0 : Number(start), [], []));
            }
            else if (line.StartsWith("      ", StringComparison.Ordinal))
            {
                stretches[^1].Sums[^1].Lines.Add(line.Trim());
            }
            else if (line.StartsWith("    ", StringComparison.Ordinal))
            {
                stretches[^1].Sums.Add(new(line.Trim(), []));
            }
        }

        return new(stretches);
    }

    /// <summary>The stretch that holds an instant within it.</summary>
    public WrittenStretch At(double time) => Stretches.Single(s => s.From < time && time < s.Until);

    /// <summary>Lines that were broken to fit, whole again.</summary>
    private static List<string> Unwrapped(string text)
    {
        var lines = new List<string>();
        foreach (var line in text.Split('\n'))
        {
            if (line.StartsWith("          ", StringComparison.Ordinal))
            {
                lines[^1] += line[9..];
            }
            else
            {
                lines.Add(line);
            }
        }

        return lines;
    }

    private static double Number(string text) => ExpressionReader.Value(text, 0).Real;

    [GeneratedRegex(
        @"^  From (?<from>[^,]+?)(, when .*,)? until (?<until>[^;:]+)(; τ = t( - (?<start>.+))?|:.*)$",
        RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Heading();
}

/// <summary>A stretch as printed.</summary>
internal sealed record WrittenStretch(
    double From, double Until, double Start, List<WrittenSum> Sums, List<string> Remarks)
{
    /// <summary>What a cause contributes at an instant; zero where it is not listed.</summary>
    public double Value(string cause, double time) =>
        Sums.Find(s => s.Cause == cause) is { } sum ? sum.Value(time - Start) : 0;

    /// <summary>The terms of a cause.</summary>
    public string[] Terms(string cause) => [.. Sums.Single(s => s.Cause == cause).Terms];
}

/// <summary>A cause's terms as printed.</summary>
internal sealed record WrittenSum(string Cause, List<string> Lines)
{
    /// <summary>The terms, without what is only said of them.</summary>
    public IEnumerable<string> Terms => Lines.Where(l => l[0] is '+' or '-');

    /// <summary>Their sum at τ, an impulse aside.</summary>
    public double Value(double tau) =>
        Terms.Where(t => !t.Contains('δ')).Sum(t => ExpressionReader.Value(t, tau).Real);
}
