using System.Collections.Immutable;
using System.Text;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A circuit's text with statements added to it, as a bench adds parts to a plant.</summary>
/// <param name="Source">The text it grows from.</param>
internal sealed record BenchText(SourceText Source)
{
    private ImmutableArray<(SourceText Written, string Statement)> Added { get; init; } = [];

    private ImmutableArray<(TextSpan Span, string Text)> Edits { get; init; } = [];

    /// <summary>Adds a statement.</summary>
    /// <param name="option">The option it stands for, to which mistakes in it are shown.</param>
    /// <param name="written">What the user wrote.</param>
    /// <param name="statement">The statement it becomes, which ends with what was written.</param>
    public BenchText With(string option, string written, string statement) => this with
    {
        Added = Added.Add((new SourceText(option, written), statement)),
    };

    /// <summary>Puts another text in a place.</summary>
    public BenchText Edited(TextSpan span, string text) => this with { Edits = Edits.Add((span, text)) };

    /// <summary>Reads and checks the whole; mistakes in what was added are shown in the option's own
    /// text.</summary>
    public Outcome<Circuit> Check(Func<string, Outcome<SourceText>> readBeside)
    {
        var text = new StringBuilder(Source.Content);
        foreach (var (span, replacement) in Edits.OrderByDescending(e => e.Span.Start))
        {
            text.Remove(span.Start, span.Length).Insert(span.Start, replacement);
        }

        var places = new List<(int Start, int End, SourceText Written)>();
        foreach (var (written, statement) in Added)
        {
            text.Append('\n');
            places.Add((text.Length, text.Length + statement.Length, written));
            text.Append(statement).Append('\n');
        }

        var source = new SourceText(Source.Name, text.ToString());
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(source);
        var outcome = CircuitChecker.Check(syntax, mistakes, readBeside);
        return new(outcome.Value,
            [
                .. outcome.Diagnostics.Where(d => d.Severity == Severity.Error)
                    .Select(d => Own(d, source, places)),
            ]);
    }

    private static Diagnostic Own(
        Diagnostic diagnostic, SourceText whole, List<(int Start, int End, SourceText Written)> places)
    {
        foreach (var (start, end, written) in places)
        {
            var span = diagnostic.Span;
            if (ReferenceEquals(diagnostic.Source, whole) && span.Start >= start && span.Start <= end)
            {
                var lead = end - start - written.Content.Length;
                var from = Math.Clamp(span.Start - start - lead, 0, written.Content.Length);
                var until = Math.Clamp(span.End - start - lead, from, written.Content.Length);
                return diagnostic with { Source = written, Span = new TextSpan(from, until - from) };
            }
        }

        return diagnostic;
    }

    /// <summary>A name as a statement writes it.</summary>
    public static string Name(string name) =>
        name.Length > 0 && name.All(c => char.IsLetterOrDigit(c) || c is '_' or '[' or ']' or '/')
            && (char.IsLetter(name[0]) || name.All(char.IsAsciiDigit))
            ? name
            : $"\"{name}\"";
}
