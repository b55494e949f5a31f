using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>The values a study may vary, and how parts follow them.</summary>
public class ParameterTests
{
    [Fact]
    public void Every_own_value_is_a_parameter_by_the_name_of_its_part()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at a : 10 V ±10 % normal
            resistor R1 from a to b : 1 kΩ
            capacitor C1 at b : 1 µF -20 % +80 %, charged to 3 V between 0 V and 3 V
            inductor L1 at b : 1 mH, carrying 2 A
            """);

        Assert.Equal(["Feed", "R1", "C1", "C1 initial charge", "L1", "L1 initial current"],
            circuit.Parameters.Select(p => p.Name));
        Assert.Equal(new Tolerance(9, 11, IsNormal: true), circuit.Parameters[0].Tolerance);
        Assert.Null(circuit.Parameters[1].Tolerance);
        Assert.Equal(0.8e-6, circuit.Parameters[2].Tolerance!.Lowest, 1e-20);
        Assert.Equal(1.8e-6, circuit.Parameters[2].Tolerance!.Highest, 1e-20);
        Assert.Equal(new Tolerance(0, 3, IsNormal: false), circuit.Parameters[3].Tolerance);
    }

    [Fact]
    public void Parts_follow_the_named_values_they_are_made_of()
    {
        var circuit = Checking.Circuit(
            """
            value Vdc : 200 V ±10 %
            value Rdc : 100 Ω ±8 %
            source Feed at a : Vdc
            resistor R1 from a to b : Rdc
            inductor L1 at b : 1 H, carrying Vdc/Rdc
            """);

        Assert.Equal(["Vdc", "Rdc", "L1"], circuit.Parameters.Select(p => p.Name));
        Assert.Equal(1.1, circuit.Part<VoltageSource>("Feed").Wave.Scale.At(220, 100, 1), 1e-15);
        Assert.Equal(110, circuit.Part<Resistor>("R1").Resistance.At(200, 110, 1));
        Assert.Equal(2, circuit.Part<Inductor>("L1").InitialCurrent!.At(220, 110, 1), 1e-15);
        Assert.Equal(2, circuit.Part<Inductor>("L1").InitialCurrent!.Nominal);
    }

    [Fact]
    public void A_tolerance_upon_named_values_is_a_factor_of_its_own()
    {
        var circuit = Checking.Circuit(
            """
            value Rx : 100 Ω ±10 %
            source Feed at a : 10 V
            resistor R1 at a : 2*Rx ±5 %
            """);

        Assert.Equal(["Rx", "Feed", "R1"], circuit.Parameters.Select(p => p.Name));
        Assert.Equal(220 * 1.05, circuit.Part<Resistor>("R1").Resistance.At(110, 10, 210), 1e-12);
    }

    [Fact]
    public void The_level_of_any_wave_of_one_term_is_a_parameter()
    {
        var circuit = Checking.Circuit("source Feed at a : sine of 5 V at 50 Hz\nresistor R1 at a : 1 kΩ");

        Assert.Equal(("Feed", 5.0), (circuit.Parameters[0].Name, circuit.Parameters[0].Nominal));
        Assert.Equal(2, circuit.Part<VoltageSource>("Feed").Wave.Scale.At(10, 1000));
    }

    [Fact]
    public void A_source_of_zero_may_have_a_tolerance()
    {
        var circuit = Checking.Circuit(
            "source Feed at a : 0 V between -1 V and 2 V\nresistor R1 at a : 1 kΩ");
        var wave = circuit.Part<VoltageSource>("Feed").Wave;

        Assert.Equal(0, wave.Scale.Nominal * wave.Pieces[0].Amplitude);
        Assert.Equal(1.5, wave.Scale.At(1.5, 1000) * wave.Pieces[0].Amplitude);
    }

    [Fact]
    public void A_value_and_a_part_of_one_name_are_told_apart()
    {
        var circuit = Checking.Circuit(
            """
            value R1 : 100 Ω
            source Feed at a : 10 V
            resistor R1 from a to b : 50 Ω
            resistor R2 at b : 2*R1 ±1 %
            """);

        Assert.Equal(["value R1", "Feed", "part R1", "R2"], circuit.Parameters.Select(p => p.Name));
    }

    [Fact]
    public void A_coupling_a_gain_and_contact_resistances_are_parameters()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at a : 10 V
            inductor L1 at b : 1 mH
            inductor L2 at b : 1 mH
            coupling M1 of L1 and L2 : 0.9 ±5 %
            dependent source Amp at b : 2 times current through L1
            switch K1 from a to b : open, closed resistance 1 mΩ, open resistance 1 MΩ ±20 %, closes at 1 s
            """);

        Assert.Equal(["K1 closed resistance", "K1 open resistance", "Feed", "L1", "L2", "Amp", "M1"],
            circuit.Parameters.Select(p => p.Name));
        Assert.False(circuit.Part<DependentSource>("Amp").SetsVoltage);
        Assert.True(Assert.Single(circuit.Couplings).IsFactor);
    }

    [Fact]
    public void Marking_codes_take_the_unit_of_their_part()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at a : 10 V
            resistor R1 from a to b : 4k7
            resistor R2 from a to b : R047
            capacitor C1 at b : 4n7
            inductor L1 at b : 3u3
            """);

        Assert.Equal([10, 4700, 0.047, 4.7e-9, 3.3e-6], circuit.Parameters.Select(p => p.Nominal));
    }

    // Doubling a value forty times would write out 2^40 operands.
    [Fact]
    public void A_chain_of_doublings_is_stopped_before_it_is_written_out()
    {
        var chain =
            string.Join('\n', Enumerable.Range(1, 40).Select(k => $"value V{k} : V{k - 1} + V{k - 1}"));

        var messages =
            Checking.Messages($"value V0 : 1 Ω\n{chain}\nsource Feed at a : 10 V\nresistor R1 at a : V40");

        Assert.StartsWith(
            "plant.cause:14:13: error: with its named values written out `V12 + V12` grows past ",
            messages, StringComparison.Ordinal);
        Assert.Equal(1, messages.Split("error:").Length - 1);
    }
}
