using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The mistakes and warnings of one file while they are gathered: one for each place, since a second
/// at the same place follows from the first or repeats it in another round of a repetition.</summary>
internal sealed class Findings(SourceText source)
{
    private const int MostErrors = 20; // more than a screenful helps nobody; common practice, no source

    private readonly List<Diagnostic> found = [];
    private readonly HashSet<(SourceText Source, TextSpan Span, Severity Severity)> places = [];

    public SourceText Source => source;

    public bool HasErrors { get; private set; }

    /// <summary>Names that stand in statements that could not be read: nothing is said of them.</summary>
    public HashSet<string> Excused { get; } = new(StringComparer.Ordinal);

    /// <summary>Whether parts are missing because of a mistake told already: then nothing is said of paths
    /// and loose ends.</summary>
    public bool LacksParts
    {
        get => field || LacksNames;
        set;
    }

    /// <summary>Whether it is not even known which names the missing parts had: then nothing is said of
    /// unknown parts and nodes either.</summary>
    public bool LacksNames { get; set; }

    /// <summary>Whether an unreadable statement may have made, or meant, that name.</summary>
    public bool IsExcused(string name)
    {
        return Excused.Count > 0 && name.Split('/').Any(word =>
            Excused.Contains(word) || Excused.Contains(word.Split('[')[0]));
    }

    public int LineOf(TextSpan span) => source.LineOf(span.Start);

    public bool IsNew(TextSpan span, Severity severity = Severity.Error) =>
        !places.Contains((source, span, severity));

    public void Error(TextSpan span, string message, string? advice = null) =>
        Add(Diagnostic.Error(source, span, message, advice));

    public void Warn(TextSpan span, string message, string? advice = null) =>
        Add(Diagnostic.Warning(source, span, message, advice));

    public void Add(Diagnostic diagnostic)
    {
        HasErrors |= diagnostic.Severity == Severity.Error;
        if (places.Add((diagnostic.Source, diagnostic.Span, diagnostic.Severity)))
        {
            found.Add(diagnostic);
        }
    }

    /// <summary>In the order of the file; the first twenty errors and all warnings.</summary>
    public ImmutableArray<Diagnostic> InOrder()
    {
        var ordered = found.OrderBy(d => ReferenceEquals(d.Source, source) ? 0 : 1)
            .ThenBy(d => d.Source.Name, StringComparer.Ordinal)
            .ThenBy(d => d.Span.Start)
            .ThenBy(d => d.Span.Length);
        var errors = 0;
        return [.. ordered.Where(d => d.Severity == Severity.Warning || errors++ < MostErrors)];
    }
}
