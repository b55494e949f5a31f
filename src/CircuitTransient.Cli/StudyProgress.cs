using System.Diagnostics;

namespace CircuitTransient.Cli;

/// <summary>The line of a study: what it is doing, how much of it is done, how fast, and how long it will
/// still take.</summary>
public sealed class StudyProgress : IDisposable
{
    private readonly Stopwatch elapsed = Stopwatch.StartNew();
    private readonly Lock turn = new();
    private readonly Progress line;
    private string stage = "starting";
    private long done;
    private long all;
    private long doneAtStart;
    private TimeSpan startOfStage;

    /// <summary>Starts to wait.</summary>
    public StudyProgress(Streams streams) => line = new Progress(streams, _ => Now());

    /// <summary>Says how far the work has come.</summary>
    /// <param name="stage">What is being done, in words.</param>
    /// <param name="done">How much of it is done.</param>
    /// <param name="all">How much there is; 0 where that is not known.</param>
    public void Report(string stage, long done, long all)
    {
        lock (turn)
        {
            if (this.stage != stage)
            {
                (this.stage, doneAtStart, startOfStage) = (stage, done, elapsed.Elapsed);
            }

            (this.done, this.all) = (done, all);
        }
    }

    /// <inheritdoc/>
    public void Dispose() => line.Dispose();

    /// <summary>The line: <c>draws 120,000 of 1,000,000, 24,000 a second, 37 s left</c>.</summary>
    public static string Words(string stage, long done, long all, double rate)
    {
        var words = all > 0 ? $"{stage} {done:N0} of {all:N0}" : done > 0 ? $"{stage} {done:N0}" : stage;
        if (rate <= 0)
        {
            return words;
        }

        words += $", {(rate >= 10 ? rate.ToString("N0") : rate.ToString("0.#"))} a second";
        var left = (all - done) / rate;
        return all <= 0 ? words
            : left < 90 ? $"{words}, {left:0} s left"
            : left < 5400 ? $"{words}, {left / 60:0} min left"
            : $"{words}, {left / 3600:0.#} h left";
    }

    private string Now()
    {
        lock (turn)
        {
            var time = (elapsed.Elapsed - startOfStage).TotalSeconds;
            return Words(stage, done, all, time > 0 ? (done - doneAtStart) / time : 0);
        }
    }
}
