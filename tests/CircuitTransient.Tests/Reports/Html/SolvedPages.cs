using System.Collections.Concurrent;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Html;
using CircuitTransient.Tests.Project;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>Pages of solved circuits.</summary>
internal static class SolvedPages
{
    private static readonly ConcurrentDictionary<string, TransientResult> Solved =
        new(StringComparer.Ordinal);

    /// <summary>Names of the demonstration circuits.</summary>
    public static IEnumerable<string> Demos => Repository.Files
        .Where(f => f.StartsWith("netlists/", StringComparison.Ordinal) && Path.GetExtension(f) == ".cause")
        .Select(f => Path.GetFileNameWithoutExtension(f));

    /// <summary>The circuit of <see cref="Scaled"/> as it stands.</summary>
    public static TransientResult AsItStands { get; } = Scaled();

    /// <summary>A demonstration circuit, solved.</summary>
    public static TransientResult Demo(string name) => Solved.GetOrAdd(
        name, _ => Solve(Repository.Read($"netlists/{name}.cause"), $"{name}.cause"));

    /// <summary>Two sources and a charge, each scaled; something of each kind is judged.</summary>
    public static TransientResult Scaled(double feed = 1, double aid = 1, double charge = 1) => Solve($"""
        circuit "Two feeds and a charge"
        source    Feed at a : step of {100 * feed} V at 1 ms
        source    Aid at d : sine of {40 * aid} V at 200 Hz
        resistor  R1 from a to b : 10 Ω, rated 6 J
        inductor  L1 from b to c : 10 mH, rated 0.4 J
        capacitor C1 from c to ground : 100 µF, charged to {30 * charge} V, rated 130 V, linear up to 100 V
        resistor  R2 from d to c : 25 Ω
        switch    S1 from c to e : open, closes at 12 ms
        resistor  R3 from e to ground : 50 Ω
        observe voltage of c
        observe current through L1
        observe energy in R1
        observe power in R3 from 12 ms to 20 ms
        require voltage of c at most 112 V
        require current through L1 between -5 A and 5 A from 2 ms to 25 ms
        require I²t through R1 at most 0.3 A²s
        require settling of voltage of c to 83 V within 30 % by 25 ms
        until 30 ms
        """, "two-feeds.cause");

    /// <summary>The page of a result.</summary>
    public static string Page(TransientResult result) =>
        HtmlReport.Write(result, $"circuit-transient solve {result.Circuit.Source.Name}");

    /// <summary>A circuit written here, solved.</summary>
    public static TransientResult Solve(string text, string name, AnalysisOptions? options = null)
    {
        var outcome = TransientAnalysis.Run(
            new SourceText(name, text),
            options ?? AnalysisOptions.Default,
            path => throw new InvalidOperationException($"the circuit names {path}"),
            TestContext.Current.CancellationToken);
        return Assert.IsType<CircuitTransient.Solved>(outcome).Result;
    }
}
