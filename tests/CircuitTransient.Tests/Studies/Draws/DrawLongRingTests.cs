namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>Rings of very many periods, most of which are bounded and not walked: the fast evaluation finds
/// the peaks that the exact engine proves.</summary>
public sealed class DrawLongRingTests
{
    private const double Reached = 1e-10;

    // Two rings, one twenty times as fast, some four hundred periods.
    private const string TwoRings = """
        source    Feed at in : step of 100 V
        inductor  L1 from in to b : 10 mH ±10 %
        resistor  R1 from b to c : 20 mΩ ±50 %
        capacitor C1 from c to ground : 10 µF ±10 %
        inductor  L2 from c to d : 200 µH ±10 %
        resistor  R2 from d to e : 30 mΩ
        capacitor C2 from e to ground : 1.2 µF ±10 %
        observe voltage of c
        observe current through L2
        observe power in R2
        observe energy in C2
        require voltage of e between -240 V and 240 V from 10 ms to 35 ms
        until 40 ms
        """;

    // A ring without loss and a sine near it: beats, whose crests are all but alike.
    private const string Beats = """
        source    Feed at in : sine of 10 V at 4.9 kHz
        inductor  L1 from in to a : 1 mH ±1 %
        capacitor C1 from a to ground : 1 µF
        resistor  R1 from a to ground : 2 kΩ ±20 %
        observe voltage of a
        observe current through L1
        until 30 ms
        """;

    // A ring on a ramp, on a slow decay and under a late pulse.
    private const string OnTheWay = """
        source    Feed from in to mid : ramp of 50 V from 1 ms to 21 ms
        source    Late from mid to ground : 20 V + rectangular pulse of 3 V from 24 ms to 25 ms
        resistor  R1 from in to a : 0.5 Ω
        inductor  L1 from a to b : 1 mH ±10 %
        capacitor C1 from b to ground : 0.5 µF ±10 %, charged to -40 V
        resistor  R2 from b to c : 10 kΩ ±10 %
        capacitor C2 from c to ground : 1 µF
        observe voltage of b
        observe voltage of c
        observe current through L1 from 5 ms to 28 ms
        until 30 ms
        """;

    [Theory]
    [InlineData(TwoRings)]
    [InlineData(Beats)]
    [InlineData(OnTheWay)]
    public void The_peaks_of_long_rings_are_those_of_the_exact_engine(string text) =>
        Assert.Equal(12, DrawnText.Of(text).AgreesOn(12, seed: 11, Reached));
}
