using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Tests.Studies.Scans;

public class ScanMemoryTests
{
    private const string Ringing = """
        source    Feed at s : 48 V
        switch    K from s to a : open, closes at 1 µs
        inductor  L from a to b : 4 µH, linear up to 60 A
        resistor  R from b to c : 100 mΩ
        capacitor C from c to ground : 10 µF, rated 100 V
        observe voltage of c
        require voltage of c at most 80 V
        until 100 µs
        """;

    // v = g·v has any current as its solution where g = 1; the points about it hold and break.
    private const string Gap = """
        source Feed at a : 1 V
        resistor R from a to b : 1 kΩ
        dependent source E from b to ground : 2 times voltage of b
        observe current through R
        require current through R at most 1.5 mA
        until 1 ms
        """;

    public static TheoryData<string, string[], int> Stops => new()
    {
        { Ringing, ["--part", "R from 50 mΩ to 1 Ω in 12 steps"], 1 },
        { Ringing, ["--part", "R from 50 mΩ to 1 Ω in 12 steps"], 9 },
        { Ringing, ["--part", "R from 50 mΩ to 1 Ω in 12 steps"], 13 },
        { Ringing, ["--part", "R from 50 mΩ to 1 Ω in 3 steps", "--scatter", "K closes by 1 µs"], 100 },
        { Ringing, ["--part", "R from 1 Ω to 2 Ω in 3 steps", "--part", "C from 1 µF to 9 µF in E3"], 5 },
        { Gap, ["--part", "E from 0.5 to 1.5 in 4 steps"], 4 },
    };

    [Theory]
    [MemberData(nameof(Stops))]
    public void A_scan_that_was_stopped_goes_on_to_the_same_document(string text, string[] words, int solved)
    {
        var plan = Scanning.Plan(
            text, [.. words.Chunk(2).Select(pair => (pair[0], pair[1]))]).Value!;
        var whole = ScanJson.Write(Run(plan, new ScanMemory(), _ => { }));

        var stopped = Stopped(plan, solved);
        var memory = Again(stopped);
        var first = -1;
        var resumed = Run(plan, memory, more => first = first < 0 ? more : first);

        Assert.InRange(stopped.PointCount, solved, Scanner.PointCount(plan) + 1);
        Assert.InRange(first, 1, solved + 8); // as many more as threads were at work
        Assert.Equal(whole, ScanJson.Write(resumed));
    }

    [Fact]
    public void What_is_remembered_is_not_solved_again()
    {
        var plan = Scanning.Plan(Ringing, ("--part", "R from 50 mΩ to 1 Ω in 12 steps")).Value!;
        var memory = new ScanMemory();
        var whole = Run(plan, memory, _ => { });
        var again = Again(memory);
        var (points, looks) = (again.PointCount, again.LookCount);

        Run(plan, again, _ => { });

        Assert.Equal((14, true), (points, looks > 10)); // the points, and the circuit as written
        Assert.Equal((points, looks), (again.PointCount, again.LookCount));
        Assert.Equal((points, looks), (memory.PointCount, memory.LookCount));
        Assert.False(whole.AllHold);
    }

    private static ScanResult Run(ScanPlan plan, ScanMemory memory, Action<int> solved) =>
        Scanner.Run(plan, memory, solved, TestContext.Current.CancellationToken);

    private static ScanMemory Stopped(ScanPlan plan, int solved)
    {
        using var stop =
            CancellationTokenSource.CreateLinkedTokenSource(TestContext.Current.CancellationToken);
        var memory = new ScanMemory();
        var left = solved;
        Assert.ThrowsAny<OperationCanceledException>(() => Scanner.Run(plan, memory, Count, stop.Token));
        return memory;

        void Count(int more)
        {
            if (Interlocked.Add(ref left, -more) <= 0)
            {
                stop.Cancel();
            }
        }
    }

    private static ScanMemory Again(ScanMemory memory)
    {
        using var stream = new MemoryStream();
        using var to = new BinaryWriter(stream);
        memory.Save(to);
        stream.Position = 0;
        var again = new ScanMemory();
        using var from = new BinaryReader(stream);
        again.Load(from);
        Assert.Equal(stream.Length, stream.Position);
        return again;
    }
}
