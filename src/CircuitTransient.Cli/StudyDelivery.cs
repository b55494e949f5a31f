using System.Collections.Immutable;

namespace CircuitTransient.Cli;

/// <summary>Hands over what a study found: its files, then its summary or its document.</summary>
/// <param name="options">What was asked for.</param>
/// <param name="streams">Where to write.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class StudyDelivery(StudyOptions options, Streams streams, CancellationToken cancellation)
{
    /// <summary>Writes and prints.</summary>
    /// <param name="file">The circuit file.</param>
    /// <param name="files">Makes the files; not called where none are wanted.</param>
    /// <param name="document">The study's document.</param>
    /// <param name="summary">Makes the summary, given the files that were written.</param>
    /// <param name="status">The exit status of the study itself.</param>
    /// <returns>That status, or that files could not be written.</returns>
    public int HandOver(
        string file, Func<ImmutableArray<OutputFile>> files, string document,
        Func<ImmutableArray<string>, string> summary, int status)
    {
        ImmutableArray<string> written = [];
        if (options.Folder is { } root)
        {
            var folder = OutputFolder.For(root, file);
            var contents = files();
            var replaced = ReplacedCircuit.In(folder, contents);
            if (OutputFolder.TryWrite(folder, contents, streams, cancellation))
            {
                if (replaced is not null)
                {
                    streams.Error.WriteLine(
                        $"{folder} held the results of another circuit, \"{replaced}\"; these replace them");
                }

                written = [.. contents.Select(f => $"{folder}/{f.Name}")];
            }
            else
            {
                status = ExitStatus.FileTrouble;
            }
        }

        if (options.IsJson)
        {
            streams.Output.Write(document);
        }
        else if (!options.IsQuiet)
        {
            streams.Output.Write(summary(written));
        }

        return status;
    }
}
