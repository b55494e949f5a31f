using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>What is stored where constants and sines have been on for ever.</summary>
public sealed class SettledStartTests
{
    // A node between 10 V over 1 kΩ and -4 V over 3 kΩ stands at (10·3 - 4·1)/4 = 7.5 V - 1 V.
    // A divider of 1 kΩ and 3 kΩ holds 7.5 V; the step at t = 0 is not yet there just before it. The sine's
    // phasor over R and C: 10 V·sin(60° − atan ωRC)/√(1 + (ωRC)²).
    [Theory]
    [InlineData("10 V + step of 4 V at 0 s", "resistor Rb at b : 3 kΩ", 7.5)]
    [InlineData("sine of 10 V at 50 Hz phase 60°", "capacitor Cb at b : 2 µF", 3.9566418081)]
    public void A_switch_that_acts_at_the_start_saw_the_settled_state(string wave, string part, double volts)
    {
        var switching = SolvedText.Of($"""
            source S at a : {wave}
            resistor R from a to b : 1 kΩ
            {part}
            switch K from b to c : open, closes at 0 s
            resistor Rc from c to ground : 1 kΩ
            start settled
            until 20 ms
            """).Result.Events.Single();

        Close.Within(1e-9, volts, switching.VoltageBefore!.Value);
        Assert.Equal(0, switching.CurrentBefore);
    }

    [Fact]
    public void The_initial_charge_is_split_among_the_sources_that_made_it()
    {
        var wave = SolvedText.Of(Divider(""))["voltage across C"];
        Close.To(6.5, wave.Start!.Value, 1e-14);
        Assert.Equal(["E1", "E2"], wave.Contributions.Select(c => c.Cause));
        Close.To(7.5, wave.Contributions[0].OwnMax!.Value!.Value, 1e-14);
        Close.To(-1, wave.Contributions[1].OwnMin!.Value!.Value, 1e-14);
    }

    [Fact]
    public void Nothing_moves_until_a_switch_acts()
    {
        var wave = SolvedText.Of(Divider(""), 0.5e-3)["voltage across C"];
        Close.To(6.5, wave.Samples[0].Value!.Value, 1e-14);
        Close.To(6.5, wave.Max.Value!.Value, 1e-14);
    }

    [Fact]
    public void A_stated_charge_replaces_the_whole_and_is_a_cause_of_its_own()
    {
        var wave = SolvedText.Of(Divider(", charged to 2 V"))["voltage across C"];
        Close.To(2, wave.Start!.Value, 1e-14);
        Assert.Equal(["E1", "E2", "C initial charge"], wave.Contributions.Select(c => c.Cause));
        Close.To(2, wave.Contributions[2].OwnMax!.Value!.Value, 1e-14);
    }

    // i = V/|Z| sin(ωt + φ - θ) from the first instant on, no transient.
    [Fact]
    public void A_sine_finds_its_steady_state_at_once()
    {
        const double reactance = 2 * Math.PI * 50 * 0.01;
        var z = double.Hypot(3, reactance);
        var lag = Math.Atan2(reactance, 3);
        var solved = SolvedText.Of(
            """
            source E at s : sine of 100 V at 50 Hz phase 70°
            resistor R from s to a : 3 Ω
            inductor L from a to ground : 10 mH
            observe current through L
            start settled
            until 40 ms
            """,
            0, 7e-3, 33e-3);
        foreach (var sample in solved["current through L"].Samples)
        {
            var phase = (2 * Math.PI * 50 * sample.Time) + (70 * Math.PI / 180) - lag;
            Close.OfScale(100 / z, 100 / z * Math.Sin(phase), sample.Value!.Value, 1e-11);
        }
    }

    [Fact]
    public void A_charge_held_by_capacitors_alone_follows_the_stated_one()
    {
        var solved = SolvedText.Of(Floating(", charged to 3 V"));
        Close.To(3, solved["voltage across C1"].Start!.Value, 1e-14);
        Close.To(7, solved["voltage across C2"].Start!.Value, 1e-14);
    }

    // 100 mA into 10 Ω beside 100 Ω; the capacitor before the open contact takes no part.
    [Fact]
    public void A_constant_does_not_drive_what_an_open_contact_holds()
    {
        var solved = SolvedText.Of(
            """
            source J from ground to m : 0.1 A
            resistor R from m to ground : 10 Ω
            inductor L from m to n : 20 mH
            capacitor C from n to ground : 47 µF
            resistor Rl from n to ground : 100 Ω
            capacitor Cf from n to x : 1 µF, charged to 5 V
            switch S from x to ground : open, closes at 5 ms
            start settled
            observe voltage across C
            observe voltage across Cf
            until 50 ms
            """);
        Close.To(1 / 1.1, solved["voltage across C"].Start!.Value, 1e-14);
        Close.To(5, solved["voltage across Cf"].Start!.Value, 1e-14);
    }

    [Fact]
    public void A_charge_that_nothing_decides_is_an_error() => Assert.Equal(
        "plant.cause:3:1: error: the settled start leaves open what `C1`, `C2` hold: no source and no "
        + "resistor decides it\n" +
        """
          capacitor C1 from a to m : 1 µF
          ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
          → say what it is charged to: `charged to 0 V` on C1

        """,
        Unsolved.Message(Floating("")));

    [Fact]
    public void An_undamped_mode_driven_at_its_own_frequency_is_an_error() => Assert.Equal(
        "plant.cause:1:1: error: there is no settled state to start from: `E` drives an undamped mode at its "
        + "own frequency of 159.2 mHz\n" +
        """
          source E at s : sine of 1 V at 0.15915494309189535 Hz
          ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
          → put in the resistance that damps it, or start as stated

        """,
        Unsolved.Message(
            """
            source E at s : sine of 1 V at 0.15915494309189535 Hz
            inductor L from s to c : 1 H
            capacitor C from c to ground : 1 F
            start settled
            until 10 s
            """));

    [Fact]
    public void A_constant_voltage_across_a_coil_is_an_error() => Assert.Equal(
        "plant.cause:1:1: error: there is no settled state to start from: `E` drives a charge or current "
        + "that nothing limits\n" +
        """
          source E at s : 1 V
          ^^^^^^^^^^^^^^^^^^^
          → put in the resistance that damps it, or start as stated

        """,
        Unsolved.Message(
            """
            source E at s : 1 V
            inductor L from s to ground : 1 H
            start settled
            until 10 s
            """));

    [Fact]
    public void An_unstable_mode_is_an_error() => Assert.Equal(
        """
        plant.cause:2:1: error: there is no settled state to start from: a mode grows, time constant 1.000 ms
          resistor R from a to ground : -1 kΩ
          ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
          → start as stated, with the charges and currents you know

        """,
        Unsolved.Message(
            """
            capacitor C at a : 1 µF
            resistor R from a to ground : -1 kΩ
            start settled
            until 10 ms
            """));

    private static string Divider(string clause) =>
        $"""
        source E1 at a : 10 V
        source E2 at b : -4 V
        resistor R1 from a to c : 1 kΩ
        resistor R2 from b to c : 3 kΩ
        capacitor C from c to d : 1 µF{clause}
        resistor Rd from d to ground : 1 Ω
        switch K from c to ground : open, closes at 1 ms
        observe voltage across C
        start settled
        until 2 ms
        """;

    private static string Floating(string clause) =>
        $"""
        source E at s : 10 V
        resistor R from s to a : 1 kΩ
        capacitor C1 from a to m : 1 µF{clause}
        capacitor C2 from m to ground : 2 µF
        observe voltage across C1
        observe voltage across C2
        start settled
        until 2 ms
        """;
}
