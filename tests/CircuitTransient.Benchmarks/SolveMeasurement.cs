using System.Diagnostics;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Benchmarks;

/// <summary>What one `solve` costs: as a process from start to end, and warm inside a process.</summary>
internal static class SolveMeasurement
{
    private const int Runs = 11;

    public static void Print(string program, string circuit)
    {
        var processes = Enumerable.Range(0, Runs).Select(_ => RunProcess(program, circuit)).ToArray();
        Console.WriteLine($"process:  {Spread(processes.Select(p => p.Milliseconds))}");
        Console.WriteLine($"memory:   {processes.Max(p => p.PeakKilobytes) / 1024.0:F0} MiB at most");

        var source = SourceText.Read(circuit, File.ReadAllBytes(circuit)).Value
            ?? throw new InvalidOperationException($"{circuit} is no text");
        for (var warming = 0; warming < Runs; warming++)
        {
            Analyse(source);
        }

        var warm = Enumerable.Range(0, Runs).Select(_ => Analyse(source));
        Console.WriteLine($"analysis: {Spread(warm)} (warm)");
    }

    private static string Spread(IEnumerable<double> milliseconds)
    {
        var sorted = milliseconds.Order().ToArray();
        var median = sorted[sorted.Length / 2];
        return $"{median:F1} ms, {sorted[0]:F1} to {sorted[^1]:F1} ms in {sorted.Length} runs";
    }

    private static double Analyse(SourceText source)
    {
        var elapsed = Stopwatch.StartNew();
        var outcome = TransientAnalysis.Run(
            source, AnalysisOptions.Default with { IsForPage = false }, _ => new(null, []));
        return outcome is Solved
            ? elapsed.Elapsed.TotalMilliseconds
            : throw new InvalidOperationException($"{source.Name} was not solved");
    }

    private static (double Milliseconds, long PeakKilobytes) RunProcess(string program, string circuit)
    {
        var folder = Directory.CreateTempSubdirectory("circuit-transient-");
        try
        {
            var elapsed = Stopwatch.StartNew();
            using var process = Process.Start(new ProcessStartInfo(
                "dotnet", [program, "solve", circuit, "--out", folder.FullName])
            {
                RedirectStandardOutput = true,
                UseShellExecute = false,
            })!;
            var reading = process.StandardOutput.ReadToEndAsync();
            var peak = 0L;
            while (!process.WaitForExit(1))
            {
                peak = Math.Max(peak, PeakOf(process.Id));
            }

            var milliseconds = elapsed.Elapsed.TotalMilliseconds;
            _ = reading.Result;
            return process.ExitCode is 0 or 1
                ? (milliseconds, peak)
                : throw new InvalidOperationException($"solve ended with {process.ExitCode}");
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }

    /// <summary>The kernel's own high-water mark of a process, in kilobytes; 0 once it has ended.</summary>
    private static long PeakOf(int process)
    {
        try
        {
            var line = File.ReadLines($"/proc/{process}/status").FirstOrDefault(l => l.StartsWith("VmHWM:"));
            return line is null ? 0 : long.Parse(line.Split(' ', StringSplitOptions.RemoveEmptyEntries)[^2]);
        }
        catch (IOException)
        {
            return 0;
        }
    }
}
