namespace CircuitTransient.Cli;

/// <summary>What the system says of a file that cannot be read or written, as a plain sentence.</summary>
public static class FileTrouble
{
    // POSIX errno in the low bits of HResult, as .NET hands it over for errors without a type of their own.
    private const int InputOrOutput = 5;
    private const int IsFolder = 21;
    private const int ReadOnly = 30;
    private const int NoSpaceLeft = 28;
    private const int TooManySymbolicLinks = 40;

    /// <summary>Whether an exception speaks of a file, not of a defect.</summary>
    public static bool IsFileTrouble(this Exception exception) =>
        exception is IOException or UnauthorizedAccessException or System.Security.SecurityException;

    /// <summary>Why it could not be read or written, in lower case, without a full stop.</summary>
    public static string Reason(Exception exception) => exception switch
    {
        FileNotFoundException => "there is no such file",
        DirectoryNotFoundException => "there is no such folder",
        PathTooLongException => "its name is too long",
        UnauthorizedAccessException => "it is not permitted",
        { HResult: NoSpaceLeft } => "the disk is full",
        { HResult: TooManySymbolicLinks } => "its links run in a circle",
        { HResult: InputOrOutput } => "the device does not answer as it should",
        { HResult: IsFolder } => "a folder stands in its place",
        { HResult: ReadOnly } => "it is on a disk that can only be read",
        // The system's own words name whole paths that the user never wrote.
        _ => "the system refuses it",
    };
}
