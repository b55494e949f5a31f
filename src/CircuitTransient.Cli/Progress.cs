using System.Diagnostics;

namespace CircuitTransient.Cli;

/// <summary>A line on the terminal's stderr while work takes longer than half a second; gone when it
/// ends.</summary>
public sealed class Progress : IDisposable
{
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(500);

    private readonly string file;
    private readonly TextWriter terminal;
    private readonly Stopwatch elapsed = Stopwatch.StartNew();
    private readonly Lock turn = new();
    private readonly Timer? timer;
    private bool isShown;
    private bool isOver;

    /// <summary>Starts to wait.</summary>
    public Progress(string file, Streams streams)
    {
        this.file = file;
        terminal = streams.Error;
        if (streams.ErrorIsTerminal)
        {
            timer = new Timer(_ => Show(), null, Patience, Patience);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        lock (turn)
        {
            timer?.Dispose();
            if (isShown && !isOver)
            {
                terminal.Write("\r\e[K");
            }

            isOver = true;
        }
    }

    private void Show()
    {
        lock (turn)
        {
            if (!isOver)
            {
                isShown = true;
                terminal.Write($"\r\e[Ksolving {file}, {elapsed.Elapsed.TotalSeconds:F1} s");
            }
        }
    }
}
