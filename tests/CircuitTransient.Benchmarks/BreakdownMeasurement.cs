using System.Diagnostics;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Benchmarks;

/// <summary>What each breakdown costs beside a plain solve, results document and summary included: warm, the
/// kinds taking turns in one process, so that a busy machine slows all alike.</summary>
internal static class BreakdownMeasurement
{
    private const int Runs = 21;

    public static void Print(IReadOnlyList<string> circuits)
    {
        foreach (var circuit in circuits)
        {
            var source = SourceText.Read(circuit, File.ReadAllBytes(circuit)).Value
                ?? throw new InvalidOperationException($"{circuit} is no text");
            var kinds = Enum.GetValues<Breakdown>();
            var times = kinds.ToDictionary(by => by, _ => new List<double>());
            for (var run = -5; run < Runs; run++)
            {
                foreach (var by in kinds)
                {
                    var time = Solve(source, by);
                    if (run >= 0)
                    {
                        times[by].Add(time);
                    }
                }
            }

            var plain = Median(times[Breakdown.Origin]);
            var ratios = kinds.Skip(1).Select(by => $"{by} {Median(times[by]) / plain:F2}");
            Console.WriteLine($"{circuit}: plain {plain:F1} ms; times it: {string.Join(", ", ratios)}");
        }
    }

    private static double Median(List<double> times) => times.Order().ElementAt(times.Count / 2);

    private static double Solve(SourceText source, Breakdown by)
    {
        var elapsed = Stopwatch.StartNew();
        var outcome = TransientAnalysis.Run(
            source, AnalysisOptions.Default with { By = by, IsForPage = false }, _ => new(null, []));
        var result = outcome is Solved solved
            ? solved.Result
            : throw new InvalidOperationException($"{source.Name} was not solved");
        _ = JsonReport.Write(result);
        _ = TerminalSummary.Write(result, []);
        return elapsed.Elapsed.TotalMilliseconds;
    }
}
