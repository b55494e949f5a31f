using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public class StudyProgressTests
{
    [Theory]
    [InlineData("draws", 12_000, 100_000, 2400, "draws 12,000 of 100,000, 2,400 a second, 37 s left")]
    [InlineData("draws", 1000, 1_000_000, 3.3, "draws 1,000 of 1,000,000, 3.3 a second, 84.1 h left")]
    [InlineData("corners", 4096, 65_536, 20, "corners 4,096 of 65,536, 20 a second, 51 min left")]
    [InlineData("between the corners", 500, 0, 100, "between the corners 500, 100 a second")]
    [InlineData("waveforms", 0, 0, 0, "waveforms")]
    public void It_says_how_far_how_fast_and_how_long(
        string stage, long done, long all, double rate, string words) =>
        Assert.Equal(words, StudyProgress.Words(stage, done, all, rate));

    [Fact]
    public void It_is_silent_where_nobody_watches()
    {
        using var error = new StringWriter();
        using (var progress = new StudyProgress(new Streams(TextWriter.Null, error)))
        {
            progress.Report("draws", 1, 2);
        }

        Assert.Equal("", error.ToString());
    }
}
