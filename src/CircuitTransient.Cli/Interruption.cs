using System.Runtime.InteropServices;

namespace CircuitTransient.Cli;

/// <summary>Ctrl-C (and a request to terminate) as a cancellation; work that does not heed it
/// is cut off.</summary>
public sealed class Interruption : IDisposable
{
    // Half a second is promised; what is left of it is for removing unfinished files and leaving.
    private static readonly TimeSpan Grace = TimeSpan.FromMilliseconds(300);

    private static readonly TimeSpan GraceOfWriting = TimeSpan.FromSeconds(5);

    private readonly CancellationTokenSource source = new();
    private readonly PosixSignalRegistration interrupt;
    private readonly PosixSignalRegistration terminate;

    /// <summary>Starts to listen.</summary>
    public Interruption()
    {
        interrupt = PosixSignalRegistration.Create(PosixSignal.SIGINT, Stop);
        terminate = PosixSignalRegistration.Create(PosixSignal.SIGTERM, Stop);
    }

    /// <summary>Cancelled by the signal.</summary>
    public CancellationToken Token => source.Token;

    /// <inheritdoc/>
    public void Dispose()
    {
        interrupt.Dispose();
        terminate.Dispose();
        source.Dispose();
    }

    private void Stop(PosixSignalContext context)
    {
        context.Cancel = true;
        if (source.IsCancellationRequested)
        {
            return;
        }

        source.Cancel();
        Thread.Sleep(Grace);

        // What a large study leaves to go on with takes longer, and is worth it.
        SpinWait.SpinUntil(() => !UnfinishedFile.IsAny, GraceOfWriting);
        UnfinishedFile.RemoveAll();
        Environment.Exit(ExitStatus.Interrupted);
    }
}
