using System.CommandLine.Parsing;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>The words of <c>--by</c>: what peaks are broken down by.</summary>
internal static class ByWords
{
    /// <summary>All of them.</summary>
    public static IEnumerable<string> All => Enum.GetValues<Breakdown>().Select(Of);

    /// <summary>The word for a breakdown.</summary>
    public static string Of(Breakdown by) => by.ToString().ToLowerInvariant();

    /// <summary>Reads the word; one that means nothing is said with the nearest that does.</summary>
    public static Breakdown Read(ArgumentResult result)
    {
        var word = result.Tokens is [var token] ? token.Value : "";
        foreach (var by in Enum.GetValues<Breakdown>())
        {
            if (word == Of(by))
            {
                return by;
            }
        }

        var way = NearestName.Find(word, All) is { } nearest
            ? $"did you mean `{nearest}`?"
            : $"write {string.Join(", ", All)}";
        result.AddError($"--by `{word}` is no breakdown: {way}");
        return Breakdown.Origin;
    }
}
