using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class StudyPartialTests : IDisposable
{
    private static readonly PartialIdentity Identity = new("ab12", "cd34", "--draws 5");

    private readonly CommandLine commandLine = new();
    private readonly StringWriter error = new() { NewLine = "\n" };
    private readonly Streams streams;
    private readonly StudyPartial partial;

    public StudyPartialTests()
    {
        streams = new Streams(TextWriter.Null, error);
        partial = StudyPartial.In(commandLine.Results, "plant.cause", "spread", "draws");
    }

    public void Dispose()
    {
        streams.Dispose();
        error.Dispose();
        commandLine.Dispose();
    }

    [Fact]
    public void What_is_left_is_taken_up_again()
    {
        partial.Leave(Identity, to => to.Write(12.5), "3 of 5 draws", ["spread", "a b.cause"], streams);
        var found = 0.0;
        var refusal = partial.Refusal(Identity, streams);
        partial.Load(Identity, from => found = from.ReadDouble());

        Assert.Null(refusal);
        Assert.Equal(12.5, found);
        Assert.Equal(
            "stopped after 3 of 5 draws; go on with `circuit-transient spread \"a b.cause\" --resume`\n",
            error.ToString());
        Assert.Equal(["plant/spread.partial"], commandLine.Written);
        partial.Remove();
        Assert.Empty(commandLine.Written);
    }

    [Theory]
    [InlineData("xx", "cd34", "--draws 5", "it is of another circuit, or the circuit has changed since")]
    [InlineData("ab12", "xx", "--draws 5", "a file that the circuit reads has changed since")]
    [InlineData("ab12", "cd34", "--draws 6", "it was asked for --draws 5, which goes on with it")]
    public void Another_study_s_is_refused(string circuit, string beside, string asked, string reason)
    {
        Leave();

        var other = new PartialIdentity(circuit, beside, asked);

        Assert.Equal(ExitStatus.Mistake, partial.Refusal(other, streams));
        Assert.Contains($"spread.partial cannot be taken up: {reason}; without `--resume`", error.ToString());
    }

    [Fact]
    public void One_of_another_command_is_refused()
    {
        Leave();
        var place = Path.Combine(commandLine.Results, "plant", "spread.partial");
        var other = new StudyPartial("scan", "points", place);

        Assert.Equal(ExitStatus.Mistake, other.Refusal(Identity, streams));
        Assert.Contains("it does not hold the unfinished points of a scan", error.ToString());
    }

    [Fact]
    public void Not_a_byte_of_it_may_be_missing_or_changed_or_too_many()
    {
        Leave();
        var path = Path.Combine(commandLine.Results, "plant", "spread.partial");
        var whole = File.ReadAllBytes(path);

        Refused([.. whole, 0], "one more");
        Refused([.. Enumerable.Repeat((byte)0xff, 40)], "nonsense");
        for (var i = 0; i < whole.Length; i++)
        {
            Refused(whole[..i], $"cut at {i}");
            byte[] changed = [.. whole];
            changed[i] ^= 0x80;
            Refused(changed, $"changed at {i}");
        }

        void Refused(byte[] content, string how)
        {
            File.WriteAllBytes(path, content);
            Assert.True(partial.Refusal(Identity, streams) == ExitStatus.Mistake, how);
        }
    }

    [Fact]
    public void What_cannot_be_kept_is_said()
    {
        Directory.CreateDirectory(Path.Combine(commandLine.Results, "plant", "spread.partial"));

        partial.Leave(Identity, _ => { }, "3 of 5 draws", ["spread", "a b.cause"], streams);

        Assert.StartsWith("error: stopped after 3 of 5 draws, which cannot be kept in ", error.ToString());
        Assert.Empty(commandLine.Written);
    }

    private void Leave() => partial.Leave(Identity, to => to.Write(12.5), "a part", ["spread"], streams);
}
