using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

/// <summary>Whole circuits as users write them.</summary>
public class DemoPlantTests
{
    private const string BullwheelBus = """
        reference is minus
        source    Supply at rail : 932 V ±10 %
        resistor  Rs    from rail to a : 18 mΩ ±25 %
        inductor  Ls    from a to b : 180 µH ±15 %
        resistor  Rcore from a to b : 56 Ω                          # choke core loss
        switch    Kpre  from b to p : open, closes at 200 ms, opens at 6 s
        capacitor Cbus  from q to minus : 5.6 mF ±20 %, charged to 140 V between 0 V and 140 V, rated 1.1 kV
        require current through Ls at most 200 A from 1.8 s to 6 s because "Kmain making capacity"
        require voltage across Cbus at most 60 V from 5 s after Kpre opens because "IEC 60204-1"
        until 14 s
        """;

    [Fact]
    public void A_charging_bus_is_read_without_a_word()
    {
        var outcome = CircuitParser.Parse(new SourceText("bus.cause", BullwheelBus));

        Assert.Empty(outcome.Diagnostics);
        Assert.Equal(10, outcome.Value!.Statements.Length);
    }
}
