using System.CommandLine;
using System.CommandLine.Parsing;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>Words that several commands share.</summary>
public static class Words
{
    /// <summary>The circuit files a command works on, at least one.</summary>
    public static Argument<string[]> Files()
    {
        var files = new Argument<string[]>("FILE")
        {
            Description = "Circuit files.",
            HelpName = "FILE",
            Arity = ArgumentArity.OneOrMore,
        };
        files.CompletionSources.Add(context => FilesBeginning(context.WordToComplete));
        files.Validators.Add(RefuseUnknownOptions);
        return files;
    }

    /// <summary>Reads a whole number within limits.</summary>
    public static Func<ArgumentResult, int> WholeNumber(int least, int most) => result =>
    {
        var text = result.Tokens is [var token] ? token.Value : "";
        if (int.TryParse(text, out var number) && number >= least && number <= most)
        {
            return number;
        }

        result.AddError($"`{text}` is not a whole number from {least} to {most}");
        return least;
    };

    private static void RefuseUnknownOptions(ArgumentResult result)
    {
        foreach (var word in result.Tokens.Select(token => token.Value).Where(word => word.StartsWith('-')))
        {
            var options = ((CommandResult)result.Parent!).Command.Options.Select(option => option.Name);
            result.AddError(NearestName.Find(word, options) is { } nearest
                ? $"there is no option `{word}`; did you mean `{nearest}`?"
                : $"there is no option `{word}`; a file of that name is written `./{word}`");
        }
    }

    private static IEnumerable<string> FilesBeginning(string word)
    {
        var folder = Path.GetDirectoryName(word) ?? "";
        var place = folder.Length == 0 ? "." : folder;
        if (!Directory.Exists(place))
        {
            return [];
        }

        var folders = Directory.EnumerateDirectories(place).Select(path => Path.GetFileName(path) + "/");
        var files = Directory.EnumerateFiles(place, "*.cause").Select(path => Path.GetFileName(path)!);
        return folders.Concat(files)
            .Order(StringComparer.Ordinal)
            .Select(name => Path.Combine(folder, name))
            .Where(path => path.StartsWith(word, StringComparison.Ordinal));
    }
}
