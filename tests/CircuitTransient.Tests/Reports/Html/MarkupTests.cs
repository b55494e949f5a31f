using CircuitTransient.Reports.Html;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>What is put into a page is text unless it was made as markup.</summary>
public class MarkupTests
{
    [Fact]
    public void Text_in_a_hole_loses_every_meaning()
    {
        const string name = "<b a=\"1\" c='2'>&\u0000\u001b\ud800";

        Assert.Equal(
            "<i>&lt;b a=&quot;1&quot; c=&#39;2&#39;&gt;&amp;\uFFFD\uFFFD\uFFFD</i>",
            Markup.Of($"<i>{name}</i>").ToString());
    }

    [Fact]
    public void Markup_in_a_hole_stays_markup() =>
        Assert.Equal("<p><bdi>a&lt;b</bdi> 3</p>", Markup.Of($"<p>{Markup.Name("a<b")} {3}</p>").ToString());

    [Fact]
    public void A_script_cannot_hold_its_own_end() =>
        Assert.Throws<ArgumentException>(() => Markup.Raw("x </SCRIPT> y", "script"));
}
