namespace CircuitTransient.Cli;

/// <summary>What every study is asked for besides its own words.</summary>
/// <param name="Folder">Where the folders of results go; null where no files are wanted.</param>
/// <param name="IsJson">Whether the document takes the place of the summary.</param>
/// <param name="IsQuiet">Whether there is no summary.</param>
public sealed record StudyOptions(string? Folder, bool IsJson, bool IsQuiet);
