using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>What the process ends with; the higher, the worse.</summary>
public static class ExitStatus
{
    /// <summary>Solved; all requirements and ratings hold.</summary>
    public const int Success = 0;

    /// <summary>Solved; a requirement or rating is broken.</summary>
    public const int RequirementBroken = 1;

    /// <summary>The circuit file or the command line is wrong.</summary>
    public const int Mistake = 2;

    /// <summary>Some interval has no unique solution.</summary>
    public const int NoUniqueSolution = 3;

    /// <summary>A self-check failed.</summary>
    public const int SelfCheckFailed = 4;

    /// <summary>A file could not be read or written.</summary>
    public const int FileTrouble = 5;

    /// <summary>Stopped by Ctrl-C.</summary>
    public const int Interrupted = 130;

    /// <summary>The status of a circuit that was built and could not be solved.</summary>
    /// <param name="diagnostics">What was said of it.</param>
    public static int OfUnsolved(IEnumerable<Diagnostic> diagnostics) =>
        diagnostics.Any(d => d is { Severity: Severity.Error, SaysTooLittle: false })
            ? NoUniqueSolution
            : Mistake;

    /// <summary>The status of a circuit that was solved.</summary>
    /// <param name="result">Its result.</param>
    /// <param name="isStrict">Whether warnings and passed linear ranges count as broken requirements.</param>
    public static int Of(TransientResult result, bool isStrict)
    {
        if (!result.ChecksHold)
        {
            return SelfCheckFailed;
        }

        var isDoubtful = !result.Warnings.IsEmpty
            || result.Parts.Any(part => part.LinearUpTo is { Holds: false });
        return result.AllHold && !(isStrict && isDoubtful) ? Success : RequirementBroken;
    }
}
