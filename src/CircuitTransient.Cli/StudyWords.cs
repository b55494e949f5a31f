using System.CommandLine;

namespace CircuitTransient.Cli;

/// <summary>The words of every command that writes files.</summary>
internal sealed class StudyWords
{
    private readonly Option<string> folder = new("--out")
    {
        Description = "Folder of the results; each circuit gets a folder of its own in it.",
        HelpName = "DIR",
        DefaultValueFactory = _ => StudyOptions.UsualFolder,
    };

    private readonly Option<bool> json = new("--json")
    {
        Description = "Print the document in place of the summary.",
    };

    private readonly Option<bool> noFiles = new("--no-files") { Description = "Write no files." };

    private readonly Option<bool> quiet = new("--quiet")
    {
        Description = "Print no summary; mistakes and warnings still go to stderr.",
    };

    /// <summary>Adds them to a command.</summary>
    public void AddTo(Command command)
    {
        foreach (var option in (Option[])[folder, json, noFiles, quiet])
        {
            command.Add(option);
        }
    }

    /// <summary>Reads what was said.</summary>
    public StudyOptions Read(ParseResult parsed) => new(
        parsed.GetValue(noFiles) ? null : parsed.GetRequiredValue(folder),
        parsed.GetValue(json),
        parsed.GetValue(quiet));
}
