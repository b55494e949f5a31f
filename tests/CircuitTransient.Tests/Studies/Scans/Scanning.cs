using System.Collections.Immutable;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Syntax;
using CircuitTransient.Tests.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Scans;

/// <summary>Scans of circuits written in tests, by the words of the command line.</summary>
internal static class Scanning
{
    /// <summary>The plan of some options, such as <c>--part</c> and its range.</summary>
    public static Outcome<ScanPlan> Plan(string circuit, params (string Option, string Words)[] said)
    {
        var scanned = said.Where(s => s.Option != "--scatter").Select(s =>
            ScannedParser.Parse(new SourceText(s.Option, s.Words), Kind(s.Option)).Value!);
        var scatter = said.Where(s => s.Option == "--scatter")
            .Select(s => ScatterParser.Parse(new SourceText(s.Option, s.Words)).Value).SingleOrDefault();
        return ScanPlan.Of(Checking.Circuit(circuit), [.. scanned], scatter, _ => new(null, []));
    }

    /// <summary>What a scan finds.</summary>
    public static ScanResult Run(string circuit, params (string Option, string Words)[] said)
    {
        var plan = Plan(circuit, said);
        Assert.True(plan.Succeeded, Messages(plan.Diagnostics));
        return Scanner.Run(plan.Value, new ScanMemory(), _ => { }, TestContext.Current.CancellationToken);
    }

    /// <summary>What was found of a figure.</summary>
    public static FigureScan Of(this ScanResult result, string figure) =>
        result.Findings.Single(f => f.Figure.Name == figure);

    /// <summary>Diagnostics as the user sees them.</summary>
    public static string Messages(ImmutableArray<Diagnostic> diagnostics) =>
        string.Join('\n', diagnostics.Select(DiagnosticText.Render));

    private static ScannedKind Kind(string option) => option switch
    {
        "--value" => ScannedKind.Value,
        "--phase" => ScannedKind.Phase,
        "--event" => ScannedKind.Event,
        _ => ScannedKind.Part,
    };
}
