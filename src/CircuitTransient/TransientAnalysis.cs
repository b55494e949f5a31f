using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Solutions;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient;

/// <summary>The whole program: a circuit's text in, an attributed transient out.</summary>
public static class TransientAnalysis
{
    /// <summary>Reads, checks, solves and measures a circuit.</summary>
    /// <param name="source">The circuit file's text.</param>
    /// <param name="options">What is asked for beyond the file.</param>
    /// <param name="readBeside">Reads a file that the circuit names, by its path relative to the circuit
    /// file.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static AnalysisOutcome Run(
        SourceText source,
        AnalysisOptions options,
        Func<string, Outcome<SourceText>> readBeside,
        CancellationToken cancellation = default)
    {
        var circuit = Check(source, readBeside);
        var causes = circuit.Then(c => options.By == Breakdown.Edge
            ? CauseList.ByEdge(c)
            : new(CauseList.FromStart(c), []));
        if (!circuit.Succeeded || !causes.Succeeded)
        {
            return new Mistakes(causes.Diagnostics);
        }

        var solution = TransientSolver.Solve(circuit.Value, causes.Value, cancellation);
        var warnings = circuit.Diagnostics;
        return solution.Succeeded
            ? new Solved(ResultBuilder.Measure(solution.Value, warnings, options, cancellation))
            : Unsolved(solution, warnings);
    }

    private static AnalysisOutcome Unsolved(
        Outcome<TransientSolution> solution, ImmutableArray<Diagnostic> warnings) =>
        solution.Diagnostics.Any(d => d.SaysTooLittle)
            ? new Mistakes([.. warnings, .. solution.Diagnostics])
            : new NoUniqueSolution([.. warnings, .. solution.Diagnostics]);

    /// <summary>Reads, checks and solves a circuit and writes quantities out in closed form.</summary>
    /// <param name="source">The circuit file's text.</param>
    /// <param name="asked">The quantities; none for every observed waveform.</param>
    /// <param name="readBeside">Reads a file that the circuit names, by its path relative to the circuit
    /// file.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static AnalysisOutcome WriteOut(
        SourceText source,
        ImmutableArray<SourceText> asked,
        Func<string, Outcome<SourceText>> readBeside,
        CancellationToken cancellation = default)
    {
        var circuit = Check(source, readBeside);
        var quantities = circuit.Then(c => AskedQuantity.FindAll(c, asked));
        if (!circuit.Succeeded || !quantities.Succeeded)
        {
            return new Mistakes(quantities.Diagnostics);
        }

        var causes = CauseList.FromStart(circuit.Value);
        var solution = TransientSolver.Solve(circuit.Value, causes, cancellation);
        var warnings = circuit.Diagnostics;
        return solution.Succeeded
            ? new WrittenOut(
                ClosedFormBuilder.Study(solution.Value, quantities.Value, cancellation), warnings)
            : Unsolved(solution, warnings);
    }

    /// <summary>Reads and checks a circuit, every mistake in one go; solves nothing.</summary>
    public static Outcome<Circuit> Check(SourceText source, Func<string, Outcome<SourceText>> readBeside)
    {
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(source);
        return CircuitChecker.Check(syntax, mistakes, readBeside);
    }

    /// <summary>Finds the intervals, among those whose switch positions are known without solving, that have
    /// no unique solution.</summary>
    public static ImmutableArray<Diagnostic> FindUnsolvable(
        Circuit circuit, CancellationToken cancellation) =>
        KnownIntervals.FindUnsolvable(circuit, cancellation);
}

/// <summary>What came of an analysis.</summary>
public abstract record AnalysisOutcome;

/// <summary>The circuit was solved.</summary>
public sealed record Solved(TransientResult Result) : AnalysisOutcome;

/// <summary>Its quantities were written out.</summary>
public sealed record WrittenOut(ClosedFormStudy Study, ImmutableArray<Diagnostic> Warnings) : AnalysisOutcome;

/// <summary>No circuit can be built from the text.</summary>
public sealed record Mistakes(ImmutableArray<Diagnostic> Diagnostics) : AnalysisOutcome;

/// <summary>Some interval has no unique solution.</summary>
public sealed record NoUniqueSolution(ImmutableArray<Diagnostic> Diagnostics) : AnalysisOutcome;
