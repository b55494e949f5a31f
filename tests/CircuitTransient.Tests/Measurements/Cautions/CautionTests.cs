using CircuitTransient.Measurements;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements.Cautions;

/// <summary>What can kill, burn or wreck is said, with its figure, and only where the result calls for
/// it.</summary>
public sealed class CautionTests
{
    [Fact]
    public void A_harmless_circuit_has_none() => Assert.Empty(Cautions(
        """
        source E at a : step of 24 V
        resistor R from a to c : 1 kΩ
        capacitor C from c to ground : 10 µF
        until 1 s
        """));

    [Fact]
    public void A_capacitor_left_charged_is_named_with_voltage_and_charge()
    {
        var caution = Assert.Single(Cautions(
            """
            capacitor C from c to ground : 1 µF, charged to 118 V
            resistor R from c to ground : 1 GΩ
            until 1 ms
            """));
        Assert.Equal(CautionSeverity.Warning, caution.Severity);
        Assert.Equal(
            "C holds 118.0 V, 118.0 µC at the end of the study, 1.000 ms; over 60 V and 60 µC, and over "
            + "45 µC",
            caution.Text);
        Assert.Equal(
            "common thresholds, verify in IEC 60204-1 and IEC 60335-1 (IEC 61010-1 has the same, from "
            + "memory)", caution.Standard);
    }

    // 0.5 µF at 100 V are 50 µC: exempt by the machine's figure of 60 µC, over the appliance's 45 µC.
    [Fact]
    public void A_charge_between_the_two_figures_is_named_for_the_one()
    {
        var caution = Assert.Single(Cautions(
            """
            capacitor C from c to ground : 0.5 µF, charged to 100 V
            resistor R from c to ground : 1 GΩ
            until 1 ms
            """));
        Assert.Equal(
            ("C holds 100.0 V, 50.00 µC at the end of the study; over 45 µC",
                "common threshold, verify in IEC 60335-1 (IEC 61010-1 has the same, from memory)"),
            (caution.Text, caution.Standard));
    }

    // Five seconds after the opening 118 V·e^(-5/10) = 71.57 V are left, and at the end less than 60 V.
    [Fact]
    public void Five_seconds_after_the_last_opening_count_too()
    {
        var caution = Assert.Single(Cautions(
            """
            source E at s : 118 V
            switch K from s to c : closed, opens at 1 s
            capacitor C from c to ground : 10 µF, charged to 118 V
            resistor R from c to ground : 1 MΩ
            until 20 s
            """));
        Assert.Equal("C holds 71.57 V, 715.7 µC 5 s after K opens; over 60 V and 60 µC", caution.Text);
        Assert.Equal("common threshold, verify in IEC 60204-1", caution.Standard);
    }

    [Fact]
    public void A_great_stored_energy_is_a_danger_and_comes_first()
    {
        var cautions = Cautions(
            """
            capacitor C from c to ground : 1 mF, charged to -400 V
            resistor R from c to ground : 1 kΩ
            until 1 ms
            """);
        Assert.Equal(
            [CautionSeverity.Danger, CautionSeverity.Warning], cautions.Select(c => c.Severity));
        Assert.Equal(
            ("C stores up to 80.00 J (at 400.0 V); over 10 J at over 100 V", "common practice, no source"),
            (cautions[0].Text, cautions[0].Standard));
    }

    [Fact]
    public void Opening_a_coil_s_current_draws_an_arc()
    {
        var caution = Assert.Single(Cautions(
            """
            source E at s : 12 V
            switch K from s to a : closed, opens at 1 ms
            resistor R from a to b : 4 Ω
            inductor L from b to ground : 6 mH, carrying 3 A
            resistor Rp from b to ground : 400 Ω
            until 2 ms
            """));
        Assert.Equal(
            "K opens 3.000 A while L carries 3.000 A; over 0.1 A a real contact draws an arc, which the "
            + "result leaves out",
            caution.Text);
        Assert.Equal(
            "common practice, no source; switching of inductive loads: see IEC 60947 and the switch's own "
            + "data",
            caution.Standard);
    }

    // The coil across the ideal source keeps its current whatever the other branch does.
    [Fact]
    public void A_contact_is_not_blamed_for_a_coil_it_does_not_cut() => Assert.Empty(Cautions(
        """
        source E at s : 12 V
        inductor L from s to b : 6 mH, carrying 3 A
        resistor Rb from b to ground : 4 Ω
        switch K from s to a : closed, opens at 1 ms
        resistor R from a to ground : 4 Ω
        until 2 ms
        """));

    // 1 H carrying 200 A: ½ · 1 H · (200 A)² = 20 kJ, and 200 A in 5 Ω are 1 kV.
    [Fact]
    public void A_coil_s_energy_counts_as_a_capacitor_s_does() => Assert.Equal(
        "L stores up to 20.00 kJ (and bears 1.000 kV); over 10 J at over 100 V",
        Cautions(
            """
            inductor L from a to ground : 1 H, carrying 200 A
            resistor R from a to ground : 5 Ω
            until 1 s
            """)[0].Text);

    // 6 mH · 3 A
    [Fact]
    public void A_voltage_without_limit_threatens_insulation()
    {
        var caution = Assert.Single(
            Cautions(
                """
                source E at s : 12 V
                switch K from s to a : closed, opens at 1 ms
                inductor L from a to b : 6 mH, carrying 3 A
                resistor R from b to ground : 4 Ω
                until 2 ms
                """),
            c => c.Text.Contains("Vs", StringComparison.Ordinal));
        Assert.Equal(
            ("18.00 mVs across K in no time, -18.00 mVs across L in no time: a real voltage is limited by "
                + "stray capacitance, an arc or a breakdown alone, and may pierce insulation",
                "no threshold; the coil's own data and its insulation decide"),
            (caution.Text, caution.Standard));
    }

    // Without a path beside it the coil's 3 A have to stop at once: 18 mWb.
    [Fact]
    public void A_coil_that_is_cut_at_once_is_blamed_too() => Assert.Contains(
        Cautions(
            """
            source E at s : 12 V
            switch K from s to a : closed, opens at 1 ms
            inductor L from a to b : 6 mH, carrying 3 A
            resistor R from b to ground : 4 Ω
            until 2 ms
            """),
        c => c.Text.StartsWith("K opens 3.000 A while L carries 3.000 A", StringComparison.Ordinal));

    [Fact]
    public void A_resistive_load_draws_no_such_caution() => Assert.Empty(Cautions(
        """
        source E at s : 12 V
        switch K from s to a : closed, opens at 1 ms
        resistor R from a to ground : 4 Ω
        until 2 ms
        """));

    // Q = C1 C2/(C1 + C2) · V: 383.673469388 µC.
    [Fact]
    public void A_charge_that_passes_in_no_time_is_named()
    {
        var caution = Assert.Single(Cautions(
            """
            capacitor C1 from a to ground : 100 µF, charged to 12 V
            capacitor C2 from b to ground : 47 µF
            switch K from a to b : open, closes at 1 ms
            resistor R from b to ground : 1 kΩ
            until 2 ms
            """));
        Assert.Equal(
            "-383.7 µC through C1 in no time, 383.7 µC through C2 in no time, 383.7 µC through K in no time: "
            + "a real current is limited by stray parts alone, and may weld contacts",
            caution.Text);
    }

    [Fact]
    public void Over_a_kiloampere_the_parts_are_named_together()
    {
        var caution = Assert.Single(Cautions(
            """
            source E at s : step of 24 V
            resistor R1 from s to a : 10 mΩ
            resistor R2 from a to ground : 10 mΩ
            until 2 ms
            """));
        Assert.Equal(
            "1.200 kA through E and R1 and R2: over 1 kA, forces and contacts count", caution.Text);
    }

    [Fact]
    public void A_mode_that_grows_is_named_with_its_time_constant()
    {
        var caution = Assert.Single(Cautions(
            """
            capacitor C from a to ground : 1 µF, charged to 1 V
            resistor R from a to ground : -1 kΩ
            until 2 ms
            """));
        Assert.Equal(
            "a mode grows, time constant 1.000 ms: what limits it in truth is not in the circuit",
            caution.Text);
    }

    [Fact]
    public void Where_a_discharge_is_judged_the_returning_voltage_is_noted()
    {
        var caution = Assert.Single(Cautions(
            """
            capacitor C from c to ground : 1 µF, charged to 90 V
            resistor R from c to ground : 1 kΩ
            require voltage of c at most 60 V from 5 ms because "touch"
            until 10 ms
            """));
        Assert.Equal(CautionSeverity.Note, caution.Severity);
        Assert.Equal(
            "after a discharge part of a capacitor's voltage returns by itself (dielectric absorption), "
            + "which a linear network does not show: short-circuit and earth before work",
            caution.Text);
    }

    private static IReadOnlyList<Caution> Cautions(string text) => SolvedText.Of(text).Result.Cautions;
}
