using CircuitTransient.Circuits;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>Closed forms of a circuit written as a user would write it.</summary>
internal static class FormulaOf
{
    /// <summary>The closed forms of quantities, or of all that the text observes; the self-checks must
    /// hold.</summary>
    public static ClosedFormStudy Text(string text, params string[] quantities)
    {
        var circuit = TransientAnalysis.Check(new SourceText("check.cause", text), _ => new(null, []));
        Assert.True(circuit.Succeeded, string.Join('\n', circuit.Diagnostics.Select(d => d.Message)));
        var solution = TransientSolver.Solve(circuit.Value, CauseList.FromStart(circuit.Value));
        Assert.True(solution.Succeeded);
        var study = ClosedFormBuilder.Study(
            solution.Value,
            quantities.Length == 0
                ? circuit.Value.Observations.RemoveAll(o => o.Quantity is Figure)
                : [.. quantities.Select(Asked)]);
        Assert.All(study.SelfChecks, c => Assert.True(c.Holds, c.Name));
        return study;

        Observation Asked(string words) =>
            AskedQuantity.Find(circuit.Value, new SourceText("--of", words)).Value!;
    }
}
