using System.CommandLine;

namespace CircuitTransient.Cli;

/// <summary><c>check FILE…</c>: every mistake and warning, nothing solved.</summary>
internal sealed class CheckCommand : Command
{
    private readonly Argument<string[]> files = Words.Files();

    /// <summary>The command, writing to these streams.</summary>
    public CheckCommand(Streams streams, CancellationToken cancellation)
        : base("check", "Read circuits and print every mistake and warning; solve nothing.")
    {
        Add(files);
        SetAction(parsed =>
            parsed.GetRequiredValue(files).Select(file => Check(file, streams, cancellation)).Max());
    }

    private static int Check(string file, Streams streams, CancellationToken cancellation)
    {
        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        var outcome = TransientAnalysis.Check(source, reading.ReadBeside);
        var unsolvable =
            outcome.Succeeded ? TransientAnalysis.FindUnsolvable(outcome.Value, cancellation) : [];
        cancellation.ThrowIfCancellationRequested();
        streams.Report([.. outcome.Diagnostics, .. unsolvable]);
        if (!outcome.Succeeded)
        {
            return Math.Max(ExitStatus.Mistake, reading.Status);
        }

        if (!unsolvable.IsEmpty)
        {
            return ExitStatus.OfUnsolved(unsolvable);
        }

        streams.Output.WriteLine($"{file}: no mistakes{Warnings(outcome.Diagnostics.Length)}");
        return ExitStatus.Success;
    }

    private static string Warnings(int count) => count switch
    {
        0 => "",
        1 => ", one warning",
        _ => $", {count} warnings",
    };
}
