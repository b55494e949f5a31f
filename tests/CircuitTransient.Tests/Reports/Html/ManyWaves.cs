using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>A large result by formula: every observation rings at twenty frequencies.</summary>
internal static class ManyWaves
{
    /// <summary>So many observations of so many causes at two thousand instants.</summary>
    public static TransientResult Result(int observations, int causes)
    {
        var names = Enumerable.Range(1, causes).Select(c => $"Source {c}").ToImmutableArray();
        var times = Enumerable.Range(0, 2000).Select(i => i * 5e-6).ToImmutableArray();
        var circuit = new Circuit(
            new SourceText("many.cause", "# many\n"), "Many", [], ["ground", "n1"], [], [], [],
            [.. Enumerable.Range(1, observations).Select(o => new Observation(
                $"voltage of n{o}", "V", new VoltageBetween(1, 0), new(null, null), new(0, 0)))],
            [], false, null);
        return SampleResults.Empty(circuit, times[^1]) with
        {
            Causes = [.. names.Select(name => new CauseName(name, CauseKind.Source))],
            SampleTimes = times,
            Observations = [.. Enumerable.Range(1, observations).Select(o => SampleResults.Observed(
                $"voltage of n{o}", "V", times, names,
                [.. Enumerable.Range(1, causes).Select(c => Wave(o, c))]))],
        };
    }

    private static Func<double, double> Wave(int observation, int cause) => t =>
        100.0 / cause * Math.Exp(-t * 90 * (1 + (observation % 7)))
        * Math.Sin((400 * cause * t) + (0.3 * observation));
}
