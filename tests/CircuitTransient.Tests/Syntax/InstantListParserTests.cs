using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

public class InstantListParserTests
{
    [Fact]
    public void Instants_are_read_in_the_order_written()
    {
        var list = InstantListParser.Parse(new SourceText("--at", "2.5 ms, 0 s,100us , 1 min")).Value!;

        Assert.Equal([2.5e-3, 0, 100e-6, 60], list.Instants.Select(instant => instant.Value));
    }

    [Theory]
    [InlineData("", "--at:1:1: error: no instant is given\n  → such as `1 ms, 2.5 ms`")]
    [InlineData(
        "5",
        "--at:1:1: error: `5` has no unit; an instant is in seconds\n  5\n  ^\n  → write `5 s`")]
    [InlineData(
        "1 ms, 3 V",
        "--at:1:7: error: `3 V` is not an instant, which is in seconds\n  1 ms, 3 V\n        ^^^\n"
        + "  → such as `1 ms, 2.5 ms`")]
    [InlineData(
        "-1 ms",
        "--at:1:1: error: an instant before t = 0 is before the study\n  -1 ms\n  ^\n"
        + "  → the study starts at t = 0: write a time after it, such as `1 ms`")]
    [InlineData(
        "2*1 ms",
        "--at:1:2: error: an instant is one number with its unit, and no sum or product\n  2*1 ms\n   ^\n"
        + "  → such as `1 ms, 2.5 ms`")]
    [InlineData(
        "1 ms 2 ms",
        "--at:1:6: error: `2` stands where `,` should\n  1 ms 2 ms\n       ^\n  → such as `1 ms, 2.5 ms`")]
    [InlineData(
        "1 ms,",
        "--at:1:6: error: the statement ends where an instant should stand\n  1 ms,\n       ^\n"
        + "  → such as `1 ms, 2.5 ms`")]
    [InlineData(
        "1,2",
        "--at:1:1: error: `1,2` has no unit; an instant is in seconds\n  1,2\n  ^^^\n"
        + "  → write `1 s, 2 s` for two instants, `1.2 s` for one")]
    [InlineData(
        "1 ms, 1,2",
        "--at:1:7: error: `1,2` has no unit; an instant is in seconds\n  1 ms, 1,2\n        ^^^\n"
        + "  → write `1 s, 2 s` for two instants, `1.2 s` for one")]
    [InlineData(
        "0,5 ms",
        "--at:1:1: error: `0,5` has a decimal comma; the decimal mark is a point\n  0,5 ms\n  ^^^\n"
        + "  → write `0.5 ms`")]
    public void A_slip_is_shown_in_its_place(string text, string message)
    {
        var outcome = InstantListParser.Parse(new SourceText("--at", text));

        Assert.False(outcome.Succeeded);
        Assert.Equal(message, DiagnosticText.Render(Assert.Single(outcome.Diagnostics)));
    }
}
