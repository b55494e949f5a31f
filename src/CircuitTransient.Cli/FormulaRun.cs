using System.Collections.Immutable;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Reports.Formula;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>formula</c>: each file solved, its quantities written out.</summary>
/// <param name="asked">The quantities asked for; none for every observation.</param>
/// <param name="isJson">Whether documents are printed.</param>
/// <param name="isLatex">Whether LaTeX is printed.</param>
/// <param name="digits">Significant digits.</param>
/// <param name="streams">Where to write.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class FormulaRun(
    ImmutableArray<string> asked, bool isJson, bool isLatex, int digits, Streams streams,
    CancellationToken cancellation)
{
    /// <summary>Writes the closed forms of each file.</summary>
    /// <returns>The worst of their exit statuses.</returns>
    public int Run(IReadOnlyList<string> files)
    {
        var studies = new List<ClosedFormStudy>();
        var worst = ExitStatus.Success;
        foreach (var file in files)
        {
            worst = Math.Max(worst, Study(file, studies));
        }

        if (isJson && files.Count > 1)
        {
            streams.Output.Write(FormulaJson.Write([.. studies]));
        }
        else if (isJson && studies is [var one])
        {
            streams.Output.Write(FormulaJson.Write(one));
        }
        else if (!isJson)
        {
            streams.Output.Write(string.Join('\n', studies.Select(s => isLatex
                ? FormulaLatex.Write(s, digits)
                : FormulaText.Write(s, digits, streams.IsColoured))));
        }

        return worst;
    }

    private int Study(string file, List<ClosedFormStudy> studies)
    {
        var reading = CircuitFile.Read(file, streams);
        if (reading.Source is not { } source)
        {
            return reading.Status;
        }

        using var progress = new Progress(file, streams);
        var outcome = TransientAnalysis.WriteOut(
            source, [.. asked.Select(words => new SourceText("--of", words))], reading.ReadBeside,
            cancellation);
        progress.Dispose();
        switch (outcome)
        {
            case WrittenOut written:
                streams.Report(written.Warnings);
                studies.Add(written.Study);
                return written.Study.SelfChecks.All(c => c.Holds)
                    ? ExitStatus.Success
                    : ExitStatus.SelfCheckFailed;
            default:
                return reading.Refuse(outcome, streams);
        }
    }
}
