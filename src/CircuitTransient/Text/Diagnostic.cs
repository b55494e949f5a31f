namespace CircuitTransient.Text;

/// <summary>How much a diagnostic matters: an error stops the work, a warning does not.</summary>
public enum Severity
{
    /// <summary>Worth reading; the work goes on.</summary>
    Warning,

    /// <summary>The text means nothing that can be solved.</summary>
    Error,
}

/// <summary>Something wrong with what the user wrote: where, what, and the way out.</summary>
/// <param name="Severity">Error or warning.</param>
/// <param name="Source">The text it stands in.</param>
/// <param name="Span">The smallest run of characters at fault.</param>
/// <param name="Message">A headline that stands alone, lower case, without a full stop.</param>
/// <param name="Advice">What to do, ready to paste where possible; null where the message says it
/// all.</param>
public sealed record Diagnostic(
    Severity Severity, SourceText Source, TextSpan Span, string Message, string? Advice)
{
    /// <summary>Whether the text says too little to be solved although a circuit can be built from it: a
    /// mistake in the text, found late.</summary>
    public bool SaysTooLittle { get; init; }

    /// <summary>An error at a place.</summary>
    public static Diagnostic Error(SourceText source, TextSpan span, string message, string? advice = null) =>
        new(Severity.Error, source, span, message, advice);

    /// <summary>A warning at a place.</summary>
    public static Diagnostic Warning(
        SourceText source, TextSpan span, string message, string? advice = null) =>
        new(Severity.Warning, source, span, message, advice);
}
