using System.Diagnostics;

namespace CircuitTransient.Cli;

/// <summary>A line on the terminal's stderr while work takes longer than half a second; gone when it
/// ends.</summary>
public sealed class Progress : IDisposable
{
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(500);

    private readonly Func<TimeSpan, string> words;
    private readonly TextWriter terminal;
    private readonly Stopwatch elapsed = Stopwatch.StartNew();
    private readonly Lock turn = new();
    private readonly Timer? timer;
    private bool isShown;
    private bool isOver;

    /// <summary>Starts to wait for a file to be solved.</summary>
    public Progress(string file, Streams streams)
        : this(streams, elapsed => $"solving {file}, {elapsed.TotalSeconds:F1} s")
    {
    }

    /// <summary>Starts to wait.</summary>
    /// <param name="streams">Where to write.</param>
    /// <param name="words">What is going on, after so long.</param>
    public Progress(Streams streams, Func<TimeSpan, string> words)
    {
        this.words = words;
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
                terminal.Write($"\r\e[K{words(elapsed.Elapsed)}");
            }
        }
    }
}
