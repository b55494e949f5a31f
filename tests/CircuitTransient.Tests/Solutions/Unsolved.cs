using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Solves a text that has no unique solution, for what the user is told.</summary>
internal static class Unsolved
{
    /// <summary>The whole message, without the warnings of the stages before.</summary>
    public static string Message(string text)
    {
        var outcome = TransientAnalysis.Run(
            new SourceText("plant.cause", text), AnalysisOptions.Default,
            path => throw new InvalidOperationException($"no file is named here: {path}"));
        return DiagnosticText.Render([
            .. Assert.IsType<NoUniqueSolution>(outcome).Diagnostics
                .Where(d => d.Severity == Severity.Error),
        ]);
    }
}
