using System.Diagnostics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Draws;
using CircuitTransient.Text;

namespace CircuitTransient.Benchmarks;

/// <summary>How many draws a second the kernel evaluates, warm, on one thread and on two, and what it
/// allocates.</summary>
internal static class DrawMeasurement
{
    private const int Seconds = 2;

    // ten parts, one switching, three observed peaks, everything varied
    private const string TenParts =
        """
        source Feed at r : 540 V ±10 %
        resistor Rs from r to a : 20 mΩ ±25 %
        inductor Ls from a to b : 100 µH ±15 %
        resistor Rcore from a to b : 50 Ω ±10 %
        switch K from b to c : open, closes at 1 ms
        resistor Rc from c to bus : 5 mΩ ±20 %
        resistor Resr from bus to q : 10 mΩ ±20 %
        capacitor Cbus from q to ground : 2 mF ±20 %, charged to 400 V ±10 %
        resistor Rload from bus to ground : 100 Ω ±10 %
        capacitor Cfast from bus to ground : 1 µF ±10 %
        observe voltage of bus
        observe current through Ls
        observe voltage across Cbus
        until 20 ms
        """;

    /// <summary>Measures circuit files; without any, a circuit of ten parts.</summary>
    public static void Print(string[] circuits)
    {
        if (circuits.Length == 0)
        {
            Measure(new SourceText("ten parts", TenParts));
        }

        foreach (var circuit in circuits)
        {
            Measure(SourceText.Read(circuit, File.ReadAllBytes(circuit)).Value
                ?? throw new InvalidOperationException($"{circuit} is no text"));
        }
    }

    private static void Measure(SourceText source)
    {
        var circuit = TransientAnalysis.Check(source, _ => new(null, [])).Value
            ?? throw new InvalidOperationException($"{source.Name} is no circuit");
        var varied = VariedCircuit.Of(circuit, [new EveryTolerance()], _ => new(null, [])).Value!;
        var figures = StudyFigures.Of(circuit);
        var (kernel, reason) = DrawKernel.For(varied, figures);
        Console.WriteLine($"{source.Name}: {varied.Values.Length} values, {figures.Length} figures");
        if (kernel is null)
        {
            Console.WriteLine($"  not served: {reason}");
            return;
        }

        foreach (var (i, figure) in figures.Index().Where(f => kernel.Unserved[f.Index] is not null))
        {
            Console.WriteLine($"  by the exact engine: {figure.Name}, {kernel.Unserved[i]}");
        }

        Run(kernel, varied, figures.Length, 0); // warm
        foreach (var threads in new[] { 1, 2 })
        {
            Print(kernel, varied, figures.Length, threads);
        }
    }

    private static void Print(DrawKernel kernel, VariedCircuit varied, int figures, int threads)
    {
        var tallies = new Tally[threads];
        var elapsed = Stopwatch.StartNew();
        var busy = Environment.CpuUsage.TotalTime;
        var running = Enumerable.Range(0, threads)
            .Select(t => new Thread(() => tallies[t] = Run(kernel, varied, figures, t))).ToArray();
        foreach (var thread in running)
        {
            thread.Start();
        }

        foreach (var thread in running)
        {
            thread.Join();
        }

        var draws = tallies.Sum(t => t.Draws);
        Console.WriteLine(
            $"  threads: {threads}, {draws / elapsed.Elapsed.TotalSeconds:F0} draws a second, "
            + $"{draws / (Environment.CpuUsage.TotalTime - busy).TotalSeconds:F0} a second of one core, "
            + $"{tallies.Sum(t => t.Bytes) / (double)draws:F2} bytes allocated a draw, "
            + $"{tallies.Sum(t => t.Doubtful) / (double)draws:P3} doubtful");
    }

    private static Tally Run(DrawKernel kernel, VariedCircuit varied, int figures, int seed)
    {
        var random = new Random(seed);
        var workspace = kernel.CreateWorkspace();
        var values = new double[kernel.ValueCount];
        var (found, times) = (new double[figures], new double[figures]);
        kernel.Evaluate(workspace, [.. varied.Values.Select(v => v.Nominal)], found, times);
        var before = GC.GetAllocatedBytesForCurrentThread();
        var elapsed = Stopwatch.StartNew();
        var (draws, doubtful) = (0, 0);
        for (; elapsed.ElapsedMilliseconds < 1000 * Seconds; draws++)
        {
            for (var k = 0; k < values.Length; k++)
            {
                var tolerance = varied.Values[k].Tolerance!;
                values[k] = tolerance.Lowest
                    + (random.NextDouble() * (tolerance.Highest - tolerance.Lowest));
            }

            doubtful += kernel.Evaluate(workspace, values, found, times) == DrawStatus.Doubtful ? 1 : 0;
        }

        return new Tally(draws, doubtful, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    private sealed record Tally(int Draws, int Doubtful, long Bytes);
}
