using CircuitTransient.Measurements;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Spreads;

/// <summary>A text with tolerances, studied as a user would.</summary>
internal static class Spreading
{
    /// <summary>What the tolerances of a text come to.</summary>
    public static SpreadResult Of(string text, int draws = 0, ulong seed = 1, int threads = 1) =>
        Study(text, draws, seed, threads).Finish(_ => { });

    /// <summary>The study before its draws.</summary>
    public static SpreadStudy Study(
        string text, int draws, ulong seed = 1, int threads = 1, CancellationToken cancellation = default)
    {
        var (varied, nominal) = Varied(text);
        return new SpreadStudy(
            varied, nominal, new SpreadOptions(draws, seed, threads), _ => { }, cancellation);
    }

    /// <summary>A text's values with a tolerance, and its nominal result.</summary>
    public static (VariedCircuit Varied, TransientResult Nominal) Varied(string text)
    {
        var outcome = TransientAnalysis.Run(
            new SourceText("check.cause", text), AnalysisOptions.Default,
            _ => new Outcome<SourceText>(null, []));
        var nominal = Assert.IsType<Solved>(outcome).Result;
        var varied = VariedCircuit.Of(
            nominal.Circuit, [new EveryTolerance()], _ => new Outcome<SourceText>(null, []));
        return (varied.Value!, nominal);
    }

    /// <summary>A figure by its name.</summary>
    public static FigureRange Figure(this SpreadResult spread, string name) =>
        spread.Figures.Single(f => f.Figure.Name == name);
}
