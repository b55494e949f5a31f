namespace CircuitTransient.Tests.Circuits;

/// <summary>No two causes of one name.</summary>
public class CauseNameTests
{
    [Fact]
    public void A_source_is_not_called_as_a_charge_is() =>
        Assert.Equal(
            """
            plant.cause:2:8: error: a source named `C initial charge` could not be told apart: \
            the initial charge of `C` goes by that name
              source "C initial charge" at b : 10 V
                     ^^^^^^^^^^^^^^^^^^
              → give the source another name
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                capacitor C at a : 1 µF, charged to 5 V
                source "C initial charge" at b : 10 V
                resistor R1 from a to b : 1 kΩ
                """));

    [Fact]
    public void A_source_is_not_called_as_the_joint_term_is() =>
        Assert.Equal(
            """
            plant.cause:1:8: error: a source named `joint` could not be told apart: \
            what causes have in a product only together goes by that name
              source joint at a : 10 V
                     ^^^^^
              → give the source another name
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                source joint at a : 10 V
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_charge_that_is_not_stated_takes_no_name() =>
        Assert.Empty(Checking.Messages(
            """
            capacitor C at a : 1 µF
            source "C initial charge" at b : 10 V
            resistor R1 from a to b : 1 kΩ
            """));
}
