using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sizes;

/// <summary>How the aim of a sizing is read off a solution.</summary>
/// <param name="Circuit">The circuit, with the aim among its observations.</param>
/// <param name="Figures">The figures to follow for it.</param>
/// <param name="Unit">Its unit; null where there is no aim.</param>
/// <param name="Sign">+1 for least, −1 for greatest, 0 for none.</param>
/// <param name="Part">The place of the sized part whose own value it is; −1 for a quantity.</param>
internal sealed record SizeAimReading(
    Circuit Circuit, ImmutableArray<StudyFigure> Figures, string? Unit, int Sign, int Part)
{
    private const string Label = "the aim of the sizing";

    /// <summary>Prepares to read an aim, or says why it means nothing.</summary>
    public static Outcome<SizeAimReading> Of(
        Circuit circuit, SizeRequest request, Func<string, Outcome<SourceText>> readBeside)
    {
        if (request.Aim is not Extremal aim)
        {
            return new(new(circuit, [], null, 0, -1), []);
        }

        var sign = aim.IsGreatest ? -1 : 1;
        var words = aim.Of.Content.Trim();
        var name = words.Trim('"');
        for (var i = 0; i < request.Parts.Length; i++)
        {
            if (request.Parts[i].Name == name)
            {
                return new(new(circuit, [], "", sign, i), []);
            }
        }

        if (words.Length == 0 || words.AsSpan().IndexOfAny("\r\n#") >= 0
            || !words.Contains(' ', StringComparison.Ordinal))
        {
            return new(null, [Diagnostic.Error(aim.Of, new TextSpan(0, aim.Of.Content.Length),
                "this is neither a sized part nor a quantity",
                $"write `{request.Parts[0].Name}`, or a quantity: `energy in {request.Parts[0].Name}`")]);
        }

        return WithObservation(circuit, aim, words, readBeside).Then(observed =>
        {
            var last = observed.Observations.Length - 1;
            ImmutableArray<StudyFigure> figures =
                [.. StudyFigures.Of(observed).Where(f => f.Index == last && IsOfObservation(f))];
            return new Outcome<SizeAimReading>(
                new(observed, figures, observed.Observations[last].Unit, sign, -1), []);
        });
    }

    /// <summary>The aim's value: a part's own, a figure, or the greatest magnitude of a waveform.</summary>
    public double? Read(ImmutableArray<double> sized, ReadOnlySpan<double?> values)
    {
        if (Part >= 0)
        {
            return sized[Part];
        }

        double? greatest = null;
        foreach (var value in values)
        {
            if (value is not { } number || !double.IsFinite(number))
            {
                return null;
            }

            greatest = Figures is [_] ? number : Math.Max(greatest ?? 0, Math.Abs(number));
        }

        return greatest;
    }

    private static bool IsOfObservation(StudyFigure figure) =>
        figure.Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum or StudyFigureKind.Reading;

    /// <summary>The circuit with one more observation, written as a last line, so that the places of all
    /// others stay.</summary>
    private static Outcome<Circuit> WithObservation(
        Circuit circuit, Extremal aim, string words, Func<string, Outcome<SourceText>> readBeside)
    {
        const string before = "\nobserve ";
        var text = circuit.Source.Content;
        var start = text.Length + before.Length;
        var source = new SourceText(circuit.Source.Name, $"{text}{before}{words} as \"{Label}\"\n");
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(source);
        var read = CircuitChecker.Check(syntax, mistakes, readBeside);
        if (read.Succeeded)
        {
            return new(read.Value, []);
        }

        // What is wrong is wrong with the words: the file itself has been read before.
        var shift = aim.Of.Content.IndexOf(words, StringComparison.Ordinal) - start;
        return new(null, [.. read.Diagnostics.Where(d => d.Severity == Severity.Error).Select(d => d with
        {
            Source = aim.Of,
            Span = Inside(d.Span, shift, aim.Of.Content.Length),
        })]);
    }

    private static TextSpan Inside(TextSpan span, int shift, int length)
    {
        var from = Math.Clamp(span.Start + shift, 0, length);
        var to = Math.Clamp(span.End + shift, from, length);
        return new TextSpan(from, to - from);
    }
}
