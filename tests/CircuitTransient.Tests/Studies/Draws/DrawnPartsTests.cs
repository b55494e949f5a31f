using CircuitTransient.Studies;

namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>Every kind of part that can vary, held against the exact engine.</summary>
public sealed class DrawnPartsTests
{
    private const double Reached = 1e-8; // a hundredth of what draws promise

    [Fact]
    public void Coupled_coils_agree_with_the_exact_engine() => AllAgree(
        """
        source E at s : sine of 100 V at 50 Hz
        resistor R1 from s to p : 1 Ω ±10 %
        inductor Lp from p to ground : 10 mH ±10 %
        inductor Ls from q to ground : 2.5 mH ±10 %
        coupling M of Lp and Ls : 0.9
        resistor R2 from q to r : 2 Ω ±10 %
        capacitor C from r to ground : 100 µF ±20 %
        switch S from r to ground : open, closes at 12 ms
        observe voltage of q
        observe current through Ls
        observe rate of change of current through Ls
        observe energy in M
        observe power delivered by E
        until 40 ms
        """,
        new EveryTolerance(), new PartValueTarget("M"));

    [Fact]
    public void Terms_of_a_sum_with_values_of_their_own_agree_with_the_exact_engine() => AllAgree(
        """
        value Vx : 3 V ±10 %
        value Vy : 2 V ±20 %
        source E at s : Vx + step of 2*Vx at 1 ms - sine of Vy at 200 Hz from 2 ms +
            ramp of 1 V from 3 ms to 4 ms
        resistor R from s to a : 1 kΩ ±10 %
        capacitor C from a to ground : 1 µF ±10 %
        observe voltage of a
        observe current through C
        until 8 ms
        """,
        new EveryTolerance());

    [Fact]
    public void Dependent_sources_and_their_gains_agree_with_the_exact_engine() => AllAgree(
        """
        source E at s : step of 1 V at 1 ms
        resistor Rs from s to a : 1 kΩ ±10 %
        capacitor Ca from a to ground : 1 µF ±10 %
        dependent source Amp from o to ground : -5 times voltage of a
        resistor Ro from o to x : 100 Ω ±5 %
        capacitor Cx from x to ground : 2 µF ±10 %
        dependent source Cur from x to ground : 0.2 times current through Ro
        resistor Rx from x to ground : 1 kΩ
        observe voltage of x
        observe current through Cx
        observe current through Cur
        until 20 ms
        """,
        new EveryTolerance(), new PartValueTarget("Amp"), new PartValueTarget("Cur"));

    [Fact]
    public void Contacts_with_a_resistance_agree_with_the_exact_engine() => AllAgree(
        """
        value Rk : 2 mΩ ±50 %
        source E at s : 540 V ±10 %
        inductor L from s to a : 100 µH ±10 %
        switch K from a to b : open, closed resistance Rk, open resistance 10 kΩ,
            closes at 1 ms, opens at 5 ms
        capacitor C from b to ground : 1 mF ±20 %, charged to 100 V ±50 %, rated 2 kJ
        resistor R from b to ground : 10 Ω ±5 %, rated 40 kW, rated 1 kJ
        observe voltage of b
        observe power in K
        observe energy in K
        observe I²t through L from 1 ms to 3 ms
        require energy in K at most 1 kJ
        until 20 ms
        """);

    // The charge redistributes in no time: currents are infinite, the voltage jumps.
    [Fact]
    public void Capacitors_joined_by_an_ideal_contact_agree_with_the_exact_engine() => AllAgree(
        """
        capacitor C1 from a to ground : 100 µF ±10 %, charged to 12 V ±5 %
        capacitor C2 from b to ground : 47 µF ±10 %
        resistor R from b to ground : 1 kΩ ±5 %
        switch S from a to b : open, closes at 1 ms
        observe voltage of b
        observe current through S
        observe rate of change of voltage of b
        observe energy in C2
        require rate of change of voltage of a at least -500 V/s
        until 300 ms
        """);

    [Fact]
    public void Coils_parted_by_an_ideal_contact_agree_with_the_exact_engine() => AllAgree(
        """
        source E at s : 10 V
        resistor R from s to a : 1 Ω ±10 %
        inductor L1 from a to b : 1 mH ±10 %
        switch S from b to ground : closed, opens at 2 ms
        inductor L2 from b to c : 2 mH ±10 %
        resistor Rc from c to ground : 5 Ω ±10 %
        observe current through L2
        observe voltage across L2
        until 10 ms
        """);

    // Its current is C u′, with an impulse at the step.
    [Fact]
    public void A_capacitor_across_a_source_agrees_with_the_exact_engine() => AllAgree(
        """
        source E at s : sine of 100 V at 50 Hz + step of 20 V at 5 ms
        capacitor C from s to ground : 1 µF ±10 %
        resistor R from s to a : 100 Ω ±10 %
        inductor L from a to b : 1 mH ±10 %
        capacitor C2 from b to ground : 2 µF ±10 %
        observe current through C
        observe current delivered by E
        observe voltage of b
        until 30 ms
        """);

    [Fact]
    public void A_settled_start_with_a_held_charge_agrees_with_the_exact_engine() => AllAgree(
        """
        source E at s : sine of 30 V at 50 Hz
        source J from ground to m : 0.1 A ±10 %
        resistor R from s to m : 10 Ω ±10 %
        inductor L from m to n : 20 mH ±10 %
        capacitor C from n to ground : 47 µF ±20 %
        resistor Rl from n to ground : 100 Ω ±10 %
        capacitor Cf from n to x : 1 µF ±10 %, charged to 5 V ±10 %
        switch S from x to ground : open, closes at 5 ms
        start settled
        observe voltage of n
        observe current through S
        until 50 ms
        """);

    [Fact]
    public void A_nominal_double_pole_agrees_with_the_exact_engine() => AllAgree(
        """
        source E at s : 10 V
        resistor R from s to a : 200 Ω
        inductor L from a to b : 1 mH
        capacitor C from b to ground : 100 nF
        capacitor D from b to ground : 1 pF ±10 %
        observe current through L
        until 100 µs
        """);

    // cos t on √(LC) = 1: a repeated pole, the amplitude grows like t
    [Fact]
    public void A_source_at_resonance_agrees_with_the_exact_engine() => AllAgree(
        """
        source E at s : cosine of 1 V at 1 Hz / (2*pi)
        inductor L from s to c : 1 H
        capacitor C from c to ground : 1 F
        capacitor D from c to ground : 1 pF ±10 %
        observe voltage of c
        until 40 s
        """);

    // a microohm, a picofarad and a megohm: twenty decades between the poles
    [Fact]
    public void A_stiff_circuit_agrees_with_the_exact_engine() => AllAgree(
        """
        capacitor Bulk from a to ground : 100 µF ±10 %, charged to 400 V ±5 %
        resistor Contact from a to b : 1 µΩ ±20 %
        capacitor Stray from b to ground : 1 pF ±20 %
        resistor Bleeder from b to ground : 1 MΩ ±20 %
        observe voltage of b
        observe current through Bleeder
        observe voltage of b as "late" from 200 s
        until 300 s
        """);

    [Fact]
    public void An_end_that_follows_from_the_slowest_mode_agrees_with_the_exact_engine() => AllAgree(
        """
        source E at s : 10 V ±5 %
        resistor R from s to p : 1 Ω ±10 %
        inductor L from p to q : 10 mH ±10 %
        capacitor C from q to ground : 2.5 mF ±10 %
        switch S from q to t : open, closes at 20 ms
        resistor R2 from t to ground : 2 Ω ±10 %
        observe voltage of q
        observe current through L
        require settling of voltage of q to 7 V within 10 % by 60 ms
        """);

    [Fact]
    public void A_phase_and_an_instant_agree_with_the_exact_engine() => AllAgree(
        """
        source Grid at g : sine of 325 V at 50 Hz phase 30°
        resistor R from g to a : 0.5 Ω
        inductor L from a to b : 5 mH
        switch S from b to ground : open, closes at 3 ms
        observe current through S
        observe current through S as "later" from 4 ms after S closes
        until 100 ms
        """,
        new SourcePhaseTarget("Grid"), new EventTimeTarget("S", true));

    private static void AllAgree(string text, params StudyTarget[] targets)
    {
        const int draws = 6;
        Assert.Equal(draws, DrawnText.Of(text, targets).AgreesOn(draws, seed: 11, Reached));
    }
}
