using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Writes a repetition out round by round, so that each can have values of its own: names with the
/// counter in their index become quoted ones, <c>"R[3]"</c>.</summary>
internal static partial class WrittenOutRepeat
{
    /// <summary>The repetition round a place, not in an assembly and with no other one in it; null where
    /// there is none.</summary>
    public static RepeatStatement? Around(Circuit circuit, TextSpan place) =>
        CircuitParser.ParseWhatCanBe(circuit.Source).Syntax.Statements.OfType<RepeatStatement>()
            .FirstOrDefault(repeat => repeat.Span.Start <= place.Start && place.End <= repeat.Span.End
                && !repeat.Body.OfType<RepeatStatement>().Any());

    /// <summary>What every round says.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="repeat">The repetition.</param>
    /// <param name="editsOf">What a parameter changes in the text.</param>
    /// <returns>The text; null where a value cannot be told to be of one round.</returns>
    public static string? Text(
        Circuit circuit, RepeatStatement repeat, Func<int, IEnumerable<(TextSpan Span, string Text)>> editsOf)
    {
        var all = circuit.Source.Content;
        var from = all.IndexOf('\n', repeat.Span.Start) + 1;
        var to = repeat.Span.End - "end".Length;
        int[][] shared =
        [
            .. Enumerable.Range(0, circuit.Parameters.Length)
                .Where(p => circuit.Parameters[p].ValueSpan.Start >= from
                    && circuit.Parameters[p].ValueSpan.End <= to)
                .GroupBy(p => circuit.Parameters[p].ValueSpan).Select(group => group.ToArray()),
        ];
        if (from == 0 || shared.Length == 0 || shared.Any(group => group.Length != shared[0].Length))
        {
            return null;
        }

        var heading = all[repeat.Span.Start..from].Trim();
        var text = new StringBuilder($"# {heading}, written out\n");
        for (var round = 0; round < shared[0].Length; round++)
        {
            var edits = shared.SelectMany(group => editsOf(group[round])).OrderBy(edit => edit.Span.Start);
            if (!TryWrite(text, all, (from, to), repeat.Counter, round + 1, [.. edits]))
            {
                return null;
            }
        }

        return text.ToString().TrimEnd();
    }

    private static bool TryWrite(
        StringBuilder text, string all, (int From, int To) body, string counter, int round,
        ImmutableArray<(TextSpan Span, string Text)> edits)
    {
        var place = body.From;
        foreach (var (span, replacement) in edits)
        {
            if (!TryNumber(text, all[place..span.Start], counter, round))
            {
                return false;
            }

            if (replacement.Length == 0 && text.Length > 0 && text[^1] == ' ')
            {
                text.Length--;
            }

            text.Append(replacement);
            place = span.End;
        }

        var isWritten = TryNumber(text, all[place..body.To].TrimEnd(), counter, round);
        text.Append('\n');
        return isWritten;
    }

    /// <summary>Appends a piece of the body with the round's number in the counter's places.</summary>
    private static bool TryNumber(StringBuilder text, string piece, string counter, int round)
    {
        var isKnown = true;
        text.Append(Tokens().Replace(piece, token =>
        {
            var name = token.Groups["name"].Value;
            if (name == counter)
            {
                return round.ToString(CultureInfo.InvariantCulture);
            }

            var numbered = Indices().Replace(name, index =>
            {
                var whose = index.Groups["counter"].Value;
                isKnown &= whose.Length == 0 || whose == counter;
                var offset = index.Groups["offset"].Value.Replace(" ", "", StringComparison.Ordinal);
                var number = (whose.Length == 0 ? 0 : round)
                    + (offset.Length == 0 ? 0 : int.Parse(offset, CultureInfo.InvariantCulture));
                return string.Create(CultureInfo.InvariantCulture, $"[{number}]");
            });
            return numbered == name ? token.Value : $"\"{numbered}\"";
        }));
        return isKnown;
    }

    private const string OneName = @"\p{L}[\p{L}\p{Nd}_]*(\[[^\]\n]*\])?";

    // A text in quotes or a comment stands as it is; a name may have indices and inner names.
    [GeneratedRegex(
        "\"[^\"\n]*\"|#[^\n]*|" + @"(?<![\p{L}\p{Nd}_.])(?<name>" + OneName + "(/" + OneName + ")*)",
        RegexOptions.ExplicitCapture | RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 2000)]
    private static partial Regex Tokens();

    [GeneratedRegex(
        """\[ *(?<counter>\p{L}[\p{L}\p{Nd}_]*)? *(?<offset>[+-]? *[0-9]{1,6})? *\]""",
        RegexOptions.ExplicitCapture | RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 2000)]
    private static partial Regex Indices();
}
