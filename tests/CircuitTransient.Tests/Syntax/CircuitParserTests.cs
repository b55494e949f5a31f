using System.Diagnostics;
using CircuitTransient.Syntax;
using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Syntax;

/// <summary>Whole files, good and hostile.</summary>
public class CircuitParserTests
{
    // Work that grows with the square of the length would take hours; a busy machine may take seconds.
    private const int MostMilliseconds = 120_000;

    [Fact]
    public void A_file_with_a_mistake_has_no_circuit() =>
        Assert.False(CircuitParser.Parse(new SourceText("a.cause", "until 3 s\nutil 3 s")).Succeeded);

    [Fact]
    public void Every_mistake_is_found_in_one_go() =>
        Assert.Equal(4, Read("resistor R1 from a to b : 4,7 kΩ, ratd 3 W\nvolt 3\nuntil").Diagnostics.Length);

    [Fact]
    public void A_statement_that_cannot_be_read_keeps_its_name_and_what_it_mentions()
    {
        var unreadable = Assert.IsType<UnreadableStatement>(Assert.Single(
            Read("resistor R1 from \"DC+\" to 3 : 4,7 kΩ").Syntax.Statements));

        Assert.Equal(("resistor", "R1"), (unreadable.KeyWord, unreadable.Name?.Text));
        Assert.Contains("DC+", unreadable.Mentions);
        Assert.Contains("3", unreadable.Mentions);
    }

    [Theory]
    [InlineData("dependent source Amp from a to b : 3", "Amp")]
    [InlineData("value Vdc : 3 x", "Vdc")]
    [InlineData("place f as Stage1 with a", "Stage1")]
    [InlineData("assembly f with a\nend", "f")]
    [InlineData("resistor form a to b : 3 Ω", "form")]
    public void The_name_is_found_in_every_kind_of_statement(string text, string name) =>
        Assert.Equal(name, Assert.IsType<UnreadableStatement>(
            Assert.Single(Read(text).Syntax.Statements)).Name?.Text);

    [Fact]
    public void The_lines_of_a_block_that_cannot_be_read_do_not_spill() =>
        Assert.IsType<UnreadableStatement>(Assert.Single(
            Read("repeat as k\nresistor R1 from a to b : 3 Ω\nend").Syntax.Statements));

    [Fact]
    public void A_misspelt_key_word_stands_for_the_one_it_meant()
    {
        var (syntax, diagnostics) = Read("repaet 3 as k\nresistor R1 from a to b : 3 Ω\nend");

        Assert.Equal("repeat", Assert.IsType<UnreadableStatement>(Assert.Single(syntax.Statements)).KeyWord);
        Assert.Equal("no statement starts with `repaet`", Assert.Single(diagnostics).Message);
    }

    [Fact]
    public void Spans_cover_what_was_written()
    {
        var source = new SourceText("a.cause", "  resistor R1 from a to b : (1 Ω + 2 Ω) * 3 ±5 %  # x");
        var resistor =
            Assert.IsType<SimplePartStatement>(Assert.Single(CircuitParser.Parse(source).Value!.Statements));

        Assert.Equal("resistor R1 from a to b : (1 Ω + 2 Ω) * 3 ±5 %", source[resistor.Span]);
        Assert.Equal("(1 Ω + 2 Ω) * 3", source[resistor.Value.Value.Span]);
        Assert.Equal("±5 %", source[resistor.Value.Tolerance!.Span]);
    }

    [Fact]
    public void Two_hundred_parentheses_nest_and_one_more_does_not()
    {
        Assert.Equal(1.0, Reading.Number(new string('(', 200) + "1" + new string(')', 200)).Value);
        Assert.StartsWith("a.cause:1:211: error: the expression is nested deeper than 200",
            Reading.Messages("value x : " + new string('(', 201) + "1" + new string(')', 201)));
    }

    [Theory]
    [InlineData("(", "the expression is nested deeper than 200")]
    [InlineData("-", "the expression is nested deeper than 200")]
    [InlineData("2^", "the expression is nested deeper than 200")]
    [InlineData("sqrt(", "the expression is nested deeper than 200")]
    [InlineData("1 V + ", "the expression has more than 1000 operators in a row")]
    [InlineData("2 * ", "the expression has more than 1000 operators in a row")]
    public void A_line_of_a_million_characters_is_refused_in_no_time(string piece, string message)
    {
        var watch = Stopwatch.StartNew();
        var text = "value x : " + string.Concat(Enumerable.Repeat(piece, 1_000_000 / piece.Length));

        Assert.Contains(message, Reading.Messages(text));
        Assert.InRange(watch.ElapsedMilliseconds, 0, MostMilliseconds);
    }

    [Fact]
    public void Half_a_megabyte_of_good_circuit_is_read_whole()
    {
        var watch = Stopwatch.StartNew();
        var lines = Enumerable.Range(0,
            12_000).Select(i => $"resistor R{i} from n{i} to n{i + 1} : 1 kΩ ±5 %");

        var syntax = CircuitParser.Parse(new SourceText("a.cause", string.Join('\n', lines))).Value;

        Assert.Equal(12_000, syntax?.Statements.Length);
        Assert.InRange(watch.ElapsedMilliseconds, 0, MostMilliseconds);
    }

    [Fact]
    public void A_million_characters_of_points_are_read_whole()
    {
        var points = string.Concat(Enumerable.Range(0, 60_000).Select(i => $"({i} µs, {i % 7} V) "));

        var source = Assert.IsType<SourceStatement>(Assert.Single(CircuitParser.Parse(
            new SourceText("a.cause", "source S at a : straight lines " + points)).Value!.Statements));

        Assert.Equal(60_000, Assert.IsType<StraightLinesSyntax>(source.Wave.Terms[0].Piece).Points.Length);
    }

    [Theory]
    [InlineData("x\n", "no statement starts with `x`")]
    [InlineData("end\n", "this `end` closes nothing")]
    [InlineData("repeat 2 as k\n", "blocks are nested deeper than 200")]
    [InlineData("(1 s,1 V)", "the statement has more than two million words and signs")]
    [InlineData("until 1 s\n", "the file has more than 250 000 statements")]
    [InlineData("value x : 1 + 1 + 1 + 1 + 1 + 1 + 1 + 1 + 1 + 1\n",
        "the file has more than three million words and signs")]
    public void Sixteen_mebibytes_of_noise_take_bounded_time(string piece, string message)
    {
        var text = new SourceText("a.cause", string.Concat(Enumerable.Repeat(piece,
            SourceText.LargestFile / piece.Length)));
        var watch = Stopwatch.StartNew();

        var (_, diagnostics) = CircuitParser.ParseWhatCanBe(text);

        Assert.Contains(message, diagnostics.Select(d => d.Message));
        Assert.InRange(diagnostics.Length, 1, CircuitParser.MostErrors + 1);
        Assert.InRange(watch.ElapsedMilliseconds, 0, MostMilliseconds);
    }

    [Fact]
    public void Any_bytes_are_read_or_refused() =>
        Gen.Byte.Array[0, 300].OnEach(
            bytes => SourceText.Read("a.cause", bytes) is { Value: { } text } ? IsAnswered(text) : true,
            iter: 2000, seed: "0000KJ2mYgS1");

    [Fact]
    public void Any_words_and_signs_are_read_or_refused()
    {
        string[] pieces =
        [
            "resistor", "source", "switch", "require", "observe", "repeat", "place", "assembly", "end",
            "value", "R1", "a", "from", "to", "at", "with", "as", "of", "voltage", "current", "through", "I",
            "²", "t", "open", "closes", "when", "after", "once", "sine", "step", "straight", "lines", "(",
            ")", "[", "]", ",", ":", "+", "-", "±", "%", "^", "/", "·", "10", "³", "4,7", "4k7", "1e400",
            "5 V", "\"q\"", "\"", "#", "\n", "\r", "é", "°", "between", "and", "normal", "=", "k", "settling",
            "time", "impulse", "1.2/50 µs", "turns", "times",
        ];
        Gen.Int[0, pieces.Length - 1].Array[0, 30].OnEach(
            places => IsAnswered(new SourceText("a.cause", string.Join(' ', places.Select(p => pieces[p])))),
            iter: 5000, seed: "0000KJ2mYgS1");
    }

    /// <summary>Read whole, or every statement that is missing has something said, in a place of the
    /// text.</summary>
    private static bool IsAnswered(SourceText text)
    {
        var (syntax, diagnostics) = CircuitParser.ParseWhatCanBe(text);
        var hasUnreadable = syntax.Statements.Any(s => s is UnreadableStatement);
        return DiagnosticText.Render(diagnostics) is not null
            && (!hasUnreadable || diagnostics.Length > 0)
            && diagnostics.All(d => d.Span.Start >= 0 && d.Span.End <= text.Content.Length
            && d.Span.Length >= 0);
    }

    private static (CircuitSyntax Syntax,
        System.Collections.Immutable.ImmutableArray<Diagnostic> Diagnostics) Read(
        string text) => CircuitParser.ParseWhatCanBe(new SourceText("a.cause", text));
}
