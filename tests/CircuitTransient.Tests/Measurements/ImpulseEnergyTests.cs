using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements;

/// <summary>What passes in an impulse counts in every figure of the part that carries it.</summary>
/// <remarks>Figures: half of C V² is lost between an ideal source and a capacitor, C₂/(C₁ + C₂) of what was
/// stored between two capacitors (Singal, arXiv:1309.5034, quoted).</remarks>
public sealed class ImpulseEnergyTests
{
    [Fact]
    public void A_source_delivers_what_an_impulse_takes()
    {
        var solved = SolvedText.Of(
            """
            source S at a : step of 10 V at 1 ms
            capacitor C from a to ground : 100 µF
            resistor R from a to ground : 1 kΩ
            observe energy delivered by S
            observe energy in C
            require energy delivered by S at most 5 mJ
            until 2 ms
            """,
            2e-3);
        Close.To(10.1e-3, solved.Sample("energy delivered by S", 0));
        Close.To(5e-3, solved.Sample("energy in C", 0));
        Assert.False(solved.Result.Requirements.Single().Holds);
    }

    [Fact]
    public void An_ideal_contact_takes_what_is_lost_and_breaks_every_bound_on_its_current_squared()
    {
        var solved = SolvedText.Of(
            """
            capacitor C1 from a to ground : 10 µF, charged to 100 V
            switch K from a to b : open, closes at 1 ms, rated 1 A²s, rated 1 J
            capacitor C2 from b to ground : 30 µF
            observe energy in K
            require I²t through K at most 1 A²s
            require power in K at most 1 W
            require energy in K at most 1 mJ
            until 2 ms
            """,
            2e-3);
        Close.To(37.5e-3, solved.Sample("energy in K", 0));
        Assert.All(solved.Result.Requirements, r => Assert.False(r.Holds));
        var contact = solved.Result.Parts.Single(p => p.Name == "K");
        Assert.Null(contact.JouleIntegral);
        Close.To(37.5e-3, contact.Energy!.Value);
        Assert.Equal([false, true], contact.Ratings.Select(r => r.Holds));
    }

    [Fact]
    public void Timed_pieces_of_a_wave_add_in_any_order()
    {
        var solved = SolvedText.Of(
            """
            source S at a : step of 5 V at 10 µs + rectangular pulse of 3 V from 20 µs to 30 µs -
                step of 1 V at 40 µs
            resistor R from a to ground : 1 Ω
            observe voltage of a
            until 50 µs
            """,
            15e-6, 25e-6, 35e-6, 45e-6);
        foreach (var (sample, expected) in new[] { 5.0, 8, 5, 4 }.Index())
        {
            Close.To(expected, solved.Sample("voltage of a", sample));
        }
    }
}
