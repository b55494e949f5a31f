using CircuitTransient.Reports;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Reports;

/// <summary>Which extreme the summary explains where a settling is required besides.</summary>
public sealed class SettlingVerdictTests
{
    [Fact]
    public void A_required_settling_does_not_turn_the_explanation_to_another_extreme()
    {
        var solved = SolvedText.Of(
            """
            source S at a : 24 V
            resistor R from a to b : 1 Ω
            inductor L from b to c : 1 mH
            capacitor C from c to ground : 1 µF
            observe voltage of c
            require voltage of c at most 60 V
            require settling of voltage of c to 24 V within 2 % by 1 ms
            until 20 ms
            """,
            0);
        var worst = WorstObservation.Find(solved.Result)!;
        Assert.True(worst.AtMax);
        Assert.Equal("nearest to its requirement", worst.Why);
    }
}
