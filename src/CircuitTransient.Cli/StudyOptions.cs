using System.Collections.Immutable;

namespace CircuitTransient.Cli;

/// <summary>What every command that writes files is asked for besides its own words.</summary>
/// <param name="Folder">Where the folders of results go; null where no files are wanted.</param>
/// <param name="IsJson">Whether the document takes the place of the summary.</param>
/// <param name="IsQuiet">Whether there is no summary.</param>
public sealed record StudyOptions(string? Folder, bool IsJson, bool IsQuiet)
{
    /// <summary>Where results go unless a folder is named.</summary>
    public const string UsualFolder = "output";

    /// <summary>The words that ask for the folder; none for the usual one.</summary>
    public ImmutableArray<string> FolderAsked => Folder is null or UsualFolder ? [] : ["--out", Folder];
}
