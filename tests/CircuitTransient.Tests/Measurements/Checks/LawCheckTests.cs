using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Checks;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Measurements.Checks;

/// <summary>The check of each part's own law finds a solution that belongs to slightly other parts.</summary>
public sealed class LawCheckTests
{
    private const double Change = 1e-6; // of a value; the check allows 1e-9

    private const string EveryKind =
        """
        source E at e : 5 V + sine of 2 V at 1 kHz
        resistor R1 from e to a : 10 Ω
        capacitor C1 at a : 1 µF
        inductor L1 from a to b : 1 mH
        inductor L2 from c to ground : 2 mH
        coupling M1 of L1 and L2 : 0.5
        resistor R2 from b to ground : 20 Ω
        resistor R3 from c to ground : 30 Ω
        transformer T1 primary from a to ground, secondary from d to ground : turns 3 to 1
        resistor R4 from d to ground : 40 Ω
        dependent source Amp from f to ground : 10 times voltage of b
        dependent source Pump from g to ground : 2 times current through R2
        resistor R5 from f to g : 50 Ω
        resistor R6 from g to ground : 60 Ω
        source I at g : 20 mA
        switch K from g to h : closed, closed resistance 1 Ω, open resistance 1 kΩ, opens at 1 ms
        resistor R7 from h to ground : 70 Ω
        until 2 ms
        """;

    [Fact]
    public void A_solution_obeys_the_laws_of_its_own_parts()
    {
        var solution = Solved(EveryKind);
        Assert.InRange(Worst(solution, solution.Circuit.Parts), 0, 1e-12);
    }

    [Theory]
    [InlineData("R1"), InlineData("C1"), InlineData("L1"), InlineData("T1"), InlineData("Amp")]
    [InlineData("Pump"), InlineData("E"), InlineData("I"), InlineData("K")]
    public void A_part_of_another_value_breaks_its_law(string name)
    {
        var solution = Solved(EveryKind);
        var parts = solution.Circuit.Parts.Select(p => p.Name == name ? Other(p) : p);
        Assert.InRange(Worst(solution, [.. parts]), 1e-8, 1e-5);
    }

    private static Part Other(Part part) => part switch
    {
        Resistor r => r with { Resistance = Other(r.Resistance) },
        Capacitor c => c with { Capacitance = Other(c.Capacitance) },
        Inductor l => l with { Inductance = Other(l.Inductance) },
        IdealTransformer t => t with { Ratio = t.Ratio * (1 + Change) },
        DependentSource d => d with { Gain = Other(d.Gain) },
        VoltageSource s => s with { Wave = s.Wave with { Scale = Other(s.Wave.Scale) } },
        CurrentSource s => s with { Wave = s.Wave with { Scale = Other(s.Wave.Scale) } },
        Switch s => s with { ClosedResistance = Other(s.ClosedResistance!) },
        _ => throw new InvalidOperationException(part.Kind),
    };

    private static Quantity Other(Quantity quantity) => quantity.Nominal * (1 + Change);

    private static double Worst(TransientSolution solution, ImmutableArray<Part> parts)
    {
        var sizes = new StudySizes(new CurveBuilder(solution));
        var judged = solution with { Circuit = solution.Circuit with { Parts = parts } };
        return LawCheck.Worst(new CurveBuilder(judged), sizes);
    }

    private static TransientSolution Solved(string text)
    {
        var circuit = TransientAnalysis.Check(new SourceText("laws.cause", text),
            _ => throw new InvalidOperationException("no file is named")).Value!;
        return TransientSolver.Solve(circuit, CauseList.FromStart(circuit), default).Value!;
    }
}
