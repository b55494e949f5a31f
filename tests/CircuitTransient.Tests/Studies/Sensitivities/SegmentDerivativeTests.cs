using CircuitTransient.Studies;

namespace CircuitTransient.Tests.Studies.Sensitivities;

/// <summary>Derivatives at fixed instants against differences of whole solutions (Richardson's, three steps:
/// some 1e-11 of the largest).</summary>
public class SegmentDerivativeTests
{
    private const double Agrees = 1e-8;

    public static TheoryData<string, string, string> Circuits => new()
    {
        {
            "coils coupled by a factor and by a mutual inductance, a dependent source, a decay at a pole",
            "Ra La Lb k1 M1 Lc Rb Ca G1 Feed",
            """
            source    Feed at in : step of 10 V at 0 s
            source    Wane at w : decay of 5 V in 1 ms
            resistor  Rw   from w to y : 10 Ω
            inductor  Lw   from y to ground : 10 mH
            resistor  Ra   from in to a : 20 Ω
            inductor  La   from a to ground : 2 mH, carrying 0.1 A
            inductor  Lb   from b to ground : 5 mH
            inductor  Lc   from c to ground : 3 mH
            coupling  k1 of La and Lb : 0.9
            coupling  M1 of Lb and Lc : 1 mH
            resistor  Rb   from b to ground : 50 Ω
            capacitor Ca   from b to ground : 1 µF, charged to 3 V
            resistor  Rc   from c to ground : 30 Ω
            dependent source G1 from d to ground : 1.5 times voltage of b
            resistor  Rd   from d to e : 5 Ω
            capacitor Ce   from e to ground : 4.7 µF
            observe voltage of b
            observe current through Lc
            observe voltage of e
            until 3 ms
            """
        },
        {
            "a sum whose terms follow values of their own",
            "value:Vx value:Vy R1",
            """
            value     Vx : 3 V
            value     Vy : 2 V
            source    Feed at in : Vx + step of 2*Vx at 1 ms - sine of Vy at 200 Hz from 2 ms
            resistor  R1 from in to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            observe voltage of a
            until 3 ms
            """
        },
        {
            "a stiff circuit: a microohm, a picofarad, a megaohm",
            "Rbus Lbus Cbig Cstray Rbleed Rl",
            """
            source    Feed at in : 100 V
            resistor  Rbus from in to a : 1 µΩ
            inductor  Lbus from a to b : 2 µH
            resistor  Rl   from b to c : 30 mΩ
            capacitor Cbig from c to ground : 10 mF, charged to 20 V
            resistor  Rtie from c to d : 100 Ω
            capacitor Cstray from d to ground : 3 pF
            resistor  Rbleed from c to ground : 1 MΩ
            observe voltage of c
            observe voltage of d
            observe current through Lbus
            until 3 ms
            """
        },
        {
            "sines at resonance and a ramp",
            "R1 L1 C1 R2",
            """
            source    Hum at in : sine of 10 V at 1591.5494309189535 Hz phase 20°
            source    Rise at r : ramp of 5 V from 0.2 ms to 1.2 ms
            inductor  L1 from in to a : 10 mH
            capacitor C1 from a to ground : 1 µF
            resistor  R2 from r to a : 10 kΩ
            resistor  R1 from a to ground : 30 kΩ
            observe voltage of a
            observe current through L1
            until 3 ms
            """
        },
        {
            "a settled start with sines, a trapped charge and a floating pair",
            "Rs Ls RA LA CA RB LB CB Grid",
            """
            source    Grid at g : sine of 5 kV at 50 Hz phase 90°
            resistor  Rs   from g to h : 45 mΩ
            inductor  Ls   from h to bus : 1.35 mH
            resistor  Rbus from bus to ground : 1.2 kΩ
            resistor  RA   from bus to a1 : 3.2 mΩ
            inductor  LA   from a1 to a2 : 22 µH
            capacitor CA   from a2 to ground : 87.7 µF
            switch    KB   from bus to b0 : open, closes at 0.1 ms
            resistor  RB   from b0 to b1 : 3.6 mΩ
            inductor  LB   from b1 to b2 : 19 µH
            capacitor CB   from b2 to ground : 58.5 µF, charged to -2.1 kV
            start settled
            observe voltage of bus
            observe current through LB
            observe current through Ls
            until 3 ms
            """
        },
        {
            "capacitors joined by an ideal contact",
            "Ca Cb R1 Ra",
            """
            source    Feed at in : 10 V
            resistor  Ra from in to a : 1 kΩ
            capacitor Ca from a to ground : 1 µF, charged to 5 V
            switch    K1 from a to b : open, closes at 1 ms
            capacitor Cb from b to ground : 2 µF, charged to -3 V
            resistor  R1 from b to ground : 3 kΩ
            observe voltage of b
            observe current through Ca
            until 3 ms
            """
        },
        {
            "a capacitor across a stepping source beside another one",
            "Ca Cb Rb Feed",
            """
            source    Feed at in : step of 10 V at 1 ms
            capacitor Ca from in to b : 1 µF
            capacitor Cb from b to ground : 2 µF
            resistor  Rb from b to ground : 400 Ω
            observe voltage of b
            observe current through Rb
            until 3 ms
            """
        },
        {
            "a coil opened onto another coil",
            "La Lb R1 R2 Rp",
            """
            source    Feed at in : 10 V
            resistor  R1 from in to a : 5 Ω
            inductor  La from a to m : 10 mH
            switch    K1 from m to ground : closed, opens at 1 ms
            inductor  Lb from m to o : 20 mH
            resistor  R2 from o to ground : 7 Ω
            resistor  Rp from a to ground : 50 Ω
            observe current through Lb
            observe voltage of a
            until 3 ms
            """
        },
        {
            "switches with resistances, a transformer",
            "R1 C1 L1",
            """
            source    Feed at in : 10 V
            resistor  R1 from in to a : 5 Ω
            switch    K0 from a to b : open, closes at 0.3 ms, closed resistance 0.1 Ω ±10 %,
                open resistance 1 kΩ ±5 %
            transformer T1 primary from b to ground, secondary from s to ground : turns 2 to 1
            inductor  L1 from b to ground : 50 mH
            capacitor C1 from s to ground : 20 µF
            resistor  R2 from s to ground : 12 Ω
            observe voltage of s
            until 3 ms
            """
        },
    };

    [Theory]
    [MemberData(nameof(Circuits))]
    public void Derivatives_agree_with_differences(string what, string values, string text)
    {
        Assert.NotEmpty(what);
        var derived = Of(text, values);
        var quantities = derived.Varied.Circuit.Observations.Select(o => o.Quantity).ToArray();
        double[] times = [.. Enumerable.Range(0, 23).Select(k => ((k * 0.137) + 0.011) * 1e-3)];
        Assert.All(derived.Analysis.Refusals, Assert.Null);
        var worst = derived.WorstAgainstDifferences(quantities, times);
        Assert.True(worst < Agrees, $"{worst:E2}");
    }

    private static Derived Of(string text, string values) => Derived.Of(
        text,
        [
            new EveryTolerance(),
            .. values.Split(' ').Select(n => n.StartsWith("value:", StringComparison.Ordinal)
                ? (StudyTarget)new NamedValueTarget(n["value:".Length..])
                : new PartValueTarget(n)),
        ]);
}
