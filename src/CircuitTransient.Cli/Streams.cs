using System.Collections.Immutable;
using System.Text;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>Where a run writes: results to <see cref="Output"/>, mistakes, warnings and progress to
/// <see cref="Error"/>.</summary>
/// <param name="ErrorIsTerminal">Whether somebody watches the errors.</param>
/// <param name="OutputWidth">Columns of the terminal that shows the results; null where none does.</param>
/// <param name="IsColoured">Whether that terminal may be sent colours.</param>
public sealed record Streams(
    TextWriter Output,
    TextWriter Error,
    bool ErrorIsTerminal = false,
    int? OutputWidth = null,
    bool IsColoured = false) : IDisposable
{
    private static readonly UTF8Encoding Encoding = new(encoderShouldEmitUTF8Identifier: false);

    /// <summary>The streams of this process. A pipe closed by its reader swallows the rest.</summary>
    public static Streams OfProcess() =>
        new(
            new StreamWriter(Console.OpenStandardOutput(), Encoding, bufferSize: 1 << 16) { NewLine = "\n" },
            new StreamWriter(Console.OpenStandardError(), Encoding) { NewLine = "\n", AutoFlush = true },
            !Console.IsErrorRedirected,
            Console.IsOutputRedirected ? null : Console.WindowWidth,
            !Console.IsOutputRedirected
                && string.IsNullOrEmpty(Environment.GetEnvironmentVariable("NO_COLOR")));

    /// <summary>One line about something that is wrong and has no place in a file.</summary>
    public void Complain(string message) => Error.WriteLine($"error: {message}");

    /// <summary>Diagnostics with their places.</summary>
    public void Report(ImmutableArray<Diagnostic> diagnostics) =>
        Error.Write(DiagnosticText.Render(diagnostics));

    /// <summary>A result's warnings: with their places in the text where they have one.</summary>
    public void Warn(string file, ImmutableArray<Notice> warnings)
    {
        Report([.. warnings.Select(w => w.Diagnostic).OfType<Diagnostic>()]);
        foreach (var warning in warnings.Where(w => w.Diagnostic is null))
        {
            var place = warning.Line > 0 ? $"{file}:{warning.Line}" : file;
            Error.WriteLine($"{place}: warning: {warning.Text}");
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        Output.Dispose();
        Error.Dispose();
    }
}
