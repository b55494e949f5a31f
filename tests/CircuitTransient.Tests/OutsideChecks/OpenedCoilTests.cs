using CircuitTransient.Measurements;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>A coil's current cut off by a contact: 12 V, 4 Ω, 6 mH.</summary>
/// <remarks>The problem with its 3 A and 27 mJ: Alexander and Sadiku, quoted (V2); figures for the stray
/// capacitance and the resistor across the coil: computed (C).</remarks>
public sealed class OpenedCoilTests
{
    private const string Coil = """
        source Feed at plus : 12 V
        resistor Rw from plus to w : 4 Ω
        inductor L from w to contact : 6 mH, carrying 3 A
        switch S from contact to ground : closed, opens at 1 ms
        observe current through L
        observe energy in L
        observe voltage of contact
        observe voltage from contact to plus
        until 1.1 ms
        """;

    [Fact]
    public void It_carries_3_amperes_and_stores_27_millijoules()
    {
        var solved = SolvedText.Of(Coil + "\ncapacitor Stray from contact to ground : 1 nF", 0.5e-3);
        Close.To(3, solved.Sample("current through L", 0));
        Close.To(27e-3, solved.Sample("energy in L", 0));
    }

    [Fact]
    public void Its_current_charges_a_nanofarad_to_7_kilovolts()
    {
        var solved = SolvedText.Of(Coil + "\ncapacitor Stray from contact to ground : 1 nF");
        Close.To(7351.04559584, solved.Max("voltage of contact"));
        Close.To(3.8496508e-6, solved["voltage of contact"].Max.Time - 1e-3, Close.Instant);
    }

    [Fact]
    public void Through_400_ohms_across_it_it_gives_1200_volts()
    {
        var solved = SolvedText.Of(Coil + "\nresistor Rd from contact to plus : 400 Ω");
        var wave = solved["voltage from contact to plus"];
        Close.To(1200, wave.Max.Value!.Value);
        Assert.Equal((1e-3, InstantSide.After), (wave.Max.Time, wave.Max.Side));
        Close.To(-1 / 14.8514851485149e-6, Assert.Single(solved.Poles(1)).Re); // 6 mH / 404 Ω
    }

    [Fact]
    public void Cut_off_with_nothing_across_it_it_is_an_impulse_of_its_flux()
    {
        var solved = SolvedText.Of(Coil);
        var impulse = solved.Result.Intervals[1].Impulses.Single(i => i.Part == "L");
        Close.To(-18e-3, impulse.VoltSeconds!.Value); // 6 mH · 3 A
        Close.To(27e-3, solved.Result.Intervals[1].EnergyLost);
    }
}
