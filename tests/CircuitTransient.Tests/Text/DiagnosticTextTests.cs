using CircuitTransient.Text;

namespace CircuitTransient.Tests.Text;

/// <summary>Diagnostics as the user sees them.</summary>
public class DiagnosticTextTests
{
    [Fact]
    public void An_error_shows_its_place_its_line_and_the_way_out() =>
        Assert.Equal(
            "dir/bus.cause:2:4: error: no\n  bcd\n   ^\n  → yes",
            Render("a\n  bcd\ne", 5, 1, "no", "yes"));

    [Fact]
    public void A_warning_says_so_and_may_stand_without_advice()
    {
        var source = new SourceText("a.cause", "abc");

        Assert.Equal("a.cause:1:2: warning: so\n  abc\n   ^^",
            DiagnosticText.Render(Diagnostic.Warning(source, new TextSpan(1, 2), "so")));
    }

    [Fact]
    public void A_place_at_the_end_of_a_line_is_marked_behind_it() =>
        Assert.Equal("dir/bus.cause:1:4: error: no\n  abc\n     ^", Render("abc\nde", 3, 0, "no", null));

    [Fact]
    public void A_mark_ends_with_its_line() =>
        Assert.Equal("dir/bus.cause:1:2: error: no\n  abc\n   ^^", Render("abc\nde", 1, 5, "no", null));

    [Fact]
    public void A_blank_line_is_not_shown() =>
        Assert.Equal("dir/bus.cause:2:1: error: no", Render("a\n\nb", 2, 0, "no", null));

    [Fact]
    public void Tabs_keep_the_marks_aligned() =>
        Assert.Equal("dir/bus.cause:1:4: error: no\n  a\tb\n   \t^", Render("\ta\tb", 3, 1, "no", null));

    [Fact]
    public void Wide_and_combining_characters_keep_the_marks_aligned() =>
        Assert.Equal("dir/bus.cause:1:5: error: no\n  電e\u0301 b\n      ^", Render("電e\u0301 b", 4, 1, "no",
            null));

    [Fact]
    public void What_would_move_the_cursor_is_replaced_everywhere() =>
        Assert.Equal("dir/bus.cause:1:2: error: no \uFFFD\n  a\uFFFDb\uFFFDc\n   ^\n  → \uFFFD[2J",
            Render("a\u001bb\u202ec", 1, 1, "no \u001b", "\u001b[2J"));

    [Fact]
    public void A_long_line_is_cut_to_a_window_round_the_fault()
    {
        var content = new string('x', 500_000) + "FAULT" + new string('y', 500_000);
        var lines = Render(content, 500_000, 5, "no", null).Split('\n');

        Assert.Equal("  …" + new string('x', 60) + "FAULT" + new string('y', 95) + "…", lines[1]);
        Assert.Equal("   " + new string(' ', 60) + "^^^^^", lines[2]);
    }

    [Fact]
    public void A_window_does_not_cut_a_character_in_two()
    {
        var lines = Render(string.Concat(Enumerable.Repeat("😀", 400)) + "x", 401, 2, "no", null).Split('\n');

        Assert.DoesNotContain('\uFFFD', lines[1]);
    }

    [Fact]
    public void Many_are_shown_in_the_order_of_their_places_and_twenty_at_most()
    {
        var source = new SourceText("a.cause", new string('x', 30));
        var errors = Enumerable.Range(0, 23).Reverse()
            .Select(i => Diagnostic.Error(source, new TextSpan(i, 1), $"number {i}"));
        var warning = Diagnostic.Warning(source, new TextSpan(29, 1), "look");
        var text = DiagnosticText.Render(errors.Append(warning));

        Assert.StartsWith("a.cause:1:1: error: number 0\n", text);
        Assert.Contains("error: number 19\n", text);
        Assert.DoesNotContain("error: number 20\n", text);
        Assert.Contains("a.cause:1:30: warning: look\n", text);
        Assert.EndsWith("\nand 3 more errors\n", text);
    }

    [Fact]
    public void One_more_is_one()
    {
        var source = new SourceText("a.cause", "x");
        var warnings = Enumerable.Repeat(Diagnostic.Warning(source, new TextSpan(0, 1), "look"), 21);

        Assert.EndsWith("\nand 1 more warning\n", DiagnosticText.Render(warnings));
    }

    private static string Render(string content, int start, int length, string message, string? advice) =>
        DiagnosticText.Render(Diagnostic.Error(
            new SourceText("dir/bus.cause", content), new TextSpan(start, length), message, advice));
}
