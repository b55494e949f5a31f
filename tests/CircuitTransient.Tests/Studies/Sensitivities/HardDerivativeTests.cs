using CircuitTransient.Studies;

namespace CircuitTransient.Tests.Studies.Sensitivities;

/// <summary>Derivatives where poles coincide, equations are singular, sources meet poles or instants fall
/// together, against differences of whole solutions.</summary>
public class HardDerivativeTests
{
    public static TheoryData<string, string, string> Circuits => new()
    {
        {
            "a settled charge held by a floating pair", "C1 C2 R1 E",
            """
            source    E at s : 10 V
            capacitor C1 from a to m : 1 µF, charged to 3 V
            capacitor C2 from m to ground : 2 µF
            resistor  R1 from s to a : 1 kΩ
            switch    K1 from m to x : open, closes at 0.5 ms
            resistor  Rx from x to ground : 500 Ω
            start settled
            observe voltage of a
            observe voltage of m
            until 3 ms
            """
        },
        {
            "coils without leakage", "L1 L2 R2 R1",
            """
            source    E at s : 10 V
            resistor  R1 from s to a : 10 Ω
            inductor  L1 from a to ground : 10 mH, carrying 0.3 A
            inductor  L2 from b to ground : 40 mH
            coupling  M of L1 and L2 : 1
            resistor  R2 from b to ground : 100 Ω
            observe voltage of b
            observe current through R1
            until 3 ms
            """
        },
        {
            "four equal poles in a row", "R1 R2 R3 R4 C1 C4 A2",
            """
            source    E at s : 10 V
            resistor  R1 from s to a : 1 kΩ
            capacitor C1 from a to ground : 0.5 µF
            dependent source A1 from a2 to ground : 1 times voltage of a
            resistor  R2 from a2 to b : 1 kΩ
            capacitor C2 from b to ground : 0.5 µF
            dependent source A2 from b2 to ground : 1 times voltage of b
            resistor  R3 from b2 to c : 1 kΩ
            capacitor C3 from c to ground : 0.5 µF
            dependent source A3 from c2 to ground : 1 times voltage of c
            resistor  R4 from c2 to d : 1 kΩ
            capacitor C4 from d to ground : 0.5 µF
            observe voltage of d
            observe voltage of b
            until 3 ms
            """
        },
        {
            "a decay with the network's own time constant, and ramps", "R1 C1 R2 C2",
            """
            source    E at s : decay of 10 V in 1 ms from 0.2 ms
            source    F at t : straight lines (0 s, 0 V) (0.5 ms, 5 V) (0.5001 ms, 1 V) (2 ms, 4 V)
            resistor  R1 from s to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            resistor  R3 from t to a : 1 MΩ
            resistor  R2 from t to b : 1 kΩ
            capacitor C2 from b to ground : 1 µF
            observe voltage of a
            observe voltage of b
            until 3 ms
            """
        },
        {
            "an undamped pair and integrators", "L1 C1 L2",
            """
            source    E at s : ramp of 10 V from 0 s to 1 ms
            inductor  L1 from s to a : 10 mH
            capacitor C1 from a to ground : 1 µF, charged to 2 V
            inductor  L2 from s to ground : 20 mH
            source    J from ground to q : 1 mA
            capacitor C2 from q to ground : 1 µF
            observe voltage of a
            observe current through L2
            observe voltage of q
            until 3 ms
            """
        },
        {
            "a differentiator of a differentiator", "C1 C2 D1",
            """
            source    E at a : sine of 10 V at 500 Hz
            capacitor C1 at a : 1 µF
            dependent source D1 at b : 3 kΩ times current through C1
            capacitor C2 at b : 2 µF
            dependent source D2 at c : 1 kΩ times current through C2
            resistor  R1 from c to d : 1 kΩ
            capacitor C3 from d to ground : 0.3 µF
            observe voltage of c
            observe current through C1
            observe voltage of d
            until 3 ms
            """
        },
        {
            "a source's step into a coil and a capacitor", "L1 R1 C1 L2",
            """
            source    J from ground to a : step of 1 A at 1 ms
            inductor  L1 from a to b : 1 mH
            resistor  R1 from b to ground : 10 Ω
            inductor  L2 from b to c : 2 mH
            source    E at d : step of 5 V at 2 ms
            capacitor C1 from d to c : 10 µF
            capacitor C2 from c to ground : 5 µF
            observe voltage of b
            observe current through L2
            until 3 ms
            """
        },
        {
            "a short pulse into slow and fast parts", "R1 C1 R2 C2 L1",
            """
            source    E at s : rectangular pulse of 1 kV from 1 ms to 1.00001 ms
            resistor  R1 from s to a : 100 Ω
            capacitor C1 from a to ground : 1 µF
            resistor  R2 from a to b : 1 kΩ
            capacitor C2 from b to c : 1 µF
            inductor  L1 from c to ground : 1 mH
            observe voltage of a
            observe voltage of c
            until 3 ms
            """
        },
        {
            "conditions that hold at once, and events at the start", "R1 C1 C2 Rx",
            """
            source    E at s : 10 V
            switch    K0 from s to s2 : open, closes at 0 s
            resistor  R1 from s2 to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            switch    K1 from a to b : open, closes when voltage of a rises above 4 V
            capacitor C2 from b to ground : 0.5 µF
            switch    K2 from b to x : open, closes when voltage of b rises above 1 V
            resistor  Rx from x to ground : 2 kΩ
            observe voltage of a
            observe current through Rx
            until 3 ms
            """
        },
        {
            "a negative resistance that grows, and a follower's gain in a loop", "R1 Rn G1 C1",
            """
            source    E at s : 1 V
            resistor  R1 from s to a : 1 kΩ
            resistor  Rn from a to ground : -2 kΩ
            capacitor C1 from a to ground : 1 µF
            dependent source G1 from b to ground : 0.5 times voltage of a
            resistor  R2 from b to a : 3 kΩ
            observe voltage of a
            until 3 ms
            """
        },
        {
            "one value in many parts by formulas", "",
            """
            value     Unit : 100 Ω ±10 %
            value     Tau : 1 ms ±5 %
            source    E at s : Unit * 0.1 A
            resistor  R1 from s to a : Unit
            capacitor C1 from a to ground : Tau / (3 * Unit), charged to Unit * 10 mA
            resistor  R2 from a to ground : 2 * Unit ^ 2 / (100 Ω + Unit / 3)
            inductor  L1 from a to c : sqrt(Unit * Unit) * Tau
            inductor  L2 from d to ground : Unit * Tau * 2
            coupling  M of L1 and L2 : 0.5
            resistor  R3 from c to ground : Unit
            resistor  R4 from d to ground : Unit
            switch    K1 from a to e : open, closes at 0.7 * Tau, closed resistance Unit / 10
            resistor  R5 from e to ground : Unit
            observe voltage of a
            observe voltage of d
            until 3 ms
            """
        },
    };

    [Theory]
    [MemberData(nameof(Circuits))]
    public void Derivatives_agree_with_differences(string what, string values, string text)
    {
        Assert.NotEmpty(what);
        var derived = Derived.Of(text, [new EveryTolerance(), .. values.Split(
            ' ', StringSplitOptions.RemoveEmptyEntries).Select(n => new PartValueTarget(n))]);
        Assert.NotEmpty(derived.Varied.Values);
        Assert.All(derived.Analysis.Refusals, Assert.Null);
        double[] times = [.. Enumerable.Range(0, 23).Select(k => ((k * 0.137) + 0.011) * 1e-3)];
        var worst = derived.WorstAgainstDifferences(
            [.. derived.Varied.Circuit.Observations.Select(o => o.Quantity)], times);
        Assert.True(worst < 1e-8, $"{worst:E2}");
    }
}
