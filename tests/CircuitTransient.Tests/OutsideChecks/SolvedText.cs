using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>A circuit written as a user would write it, solved, with its figures at hand.</summary>
internal sealed class SolvedText
{
    private SolvedText(TransientResult result) => Result = result;

    /// <summary>The whole result.</summary>
    public TransientResult Result { get; }

    /// <summary>An observation by its name.</summary>
    public ObservationResult this[string name] => Result.Observations.Single(o => o.Name == name);

    /// <summary>Solves a text; what the result says of itself must hold, too.</summary>
    /// <param name="text">The circuit file.</param>
    /// <param name="at">Instants in seconds whose exact values are wanted.</param>
    public static SolvedText Of(string text, params double[] at) => WithWaveform(text, 16, at);

    /// <summary>Solves a text with a number of waveform samples.</summary>
    public static SolvedText WithWaveform(string text, int samples, params double[] at) =>
        With(text, new AnalysisOptions([.. at], samples));

    /// <summary>Solves a text and breaks it down in a way.</summary>
    public static SolvedText By(Breakdown by, string text, params double[] at) =>
        With(text, new AnalysisOptions([.. at], 16) { By = by });

    private static SolvedText With(string text, AnalysisOptions options)
    {
        var outcome = TransientAnalysis.Run(
            new SourceText("check.cause", text), options with { IsForPage = false }, NoFile);
        var solved = outcome switch
        {
            Solved s => s.Result,
            Mistakes m => throw new InvalidOperationException(Lines(m.Diagnostics)),
            NoUniqueSolution n => throw new InvalidOperationException(Lines(n.Diagnostics)),
            _ => throw new InvalidOperationException(outcome.ToString()),
        };
        Assert.All(solved.SelfChecks, c => Assert.True(c.Holds, $"self-check `{c.Name}`: {c.Worst:E2}"));
        return new SolvedText(solved);
    }

    /// <summary>The greatest value of an observation.</summary>
    public double Max(string name) => this[name].Max.Value!.Value;

    /// <summary>The least value of an observation.</summary>
    public double Min(string name) => this[name].Min.Value!.Value;

    /// <summary>The exact value at the instant asked for at <paramref name="index"/>.</summary>
    public double Sample(string name, int index) => this[name].Samples[index].Value!.Value;

    /// <summary>The values at all instants asked for.</summary>
    public double[] Samples(string name) => [.. this[name].Samples.Select(s => s.Value!.Value)];

    /// <summary>A figure read off a waveform.</summary>
    public double Figure(string name) => Result.Figures.Single(f => f.Name == name).Value!.Value;

    /// <summary>The poles of an interval, a conjugate pair once.</summary>
    public ImmutableArray<Pole> Poles(int interval = 0) => Result.Intervals[interval].Poles;

    private static Outcome<SourceText> NoFile(string path) =>
        throw new InvalidOperationException($"no file is named here: {path}");

    private static string Lines(IEnumerable<Diagnostic> diagnostics) =>
        string.Join(Environment.NewLine, diagnostics.Select(d => d.Message));
}
