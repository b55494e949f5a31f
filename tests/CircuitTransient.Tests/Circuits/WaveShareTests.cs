using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>How waves go with values that vary.</summary>
public class WaveShareTests
{
    [Fact]
    public void A_tolerance_a_point_cannot_carry_is_told() =>
        Assert.Equal(
            """
            plant.cause:2:41: warning: `Vdc` is held at its nominal value here
              source Feed at a : straight lines (0 s, Vdc) (1 s, 0 V)
                                                      ^^^
              → its tolerance is drawn in part values, wave levels, switching instants and windows only
            """,
            Checking.Messages(
                """
                value Vdc : 10 V ±5 %
                source Feed at a : straight lines (0 s, Vdc) (1 s, 0 V)
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void Each_term_of_a_sum_follows_its_own_level()
    {
        var circuit = Checking.Circuit(
            """
            value Vdc : 10 V ±5 %
            source Feed at a : Vdc + sine of 3 V at 50 Hz - step of Vdc/2 at 1 s
            resistor R1 at a : 1 kΩ
            """);
        double[] values = [10.5, .. circuit.Parameters.Skip(1).Select(p => p.Nominal)];
        var moved = ParameterSubstitution.Put(circuit, values).Value!;
        Assert.Equal(
            [10.5, 3, -5.25], moved.Part<VoltageSource>("Feed").Wave.Pieces.Select(p => p.Amplitude));
    }
}
