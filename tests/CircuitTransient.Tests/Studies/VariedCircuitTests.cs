using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Studies;
using CircuitTransient.Tests.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies;

public class VariedCircuitTests
{
    private const string Charging = """
        value Rch : 100 Ω
        value Wide : 2 ms
        source    Feed  at in : 10 V ±10 %
        source    Kick  at k : rectangular pulse of 5 V from 1 ms to (1 ms + Wide)
        resistor  R1    from in to a : Rch
        resistor  R2    from k to b : 2*Rch
        resistor  R3    from b to c : 50 Ω ±5 %
        switch    K1    from a to c : open, closes at 3 ms
        source    Ring  from c to d : sine of 1 V at 50 Hz phase 30°
        resistor  R4    from d to ground : 1 kΩ
        capacitor C1    from c to ground : 10 µF ±20 %, charged to 1 V between 0 V and 2 V
        require voltage of c at most 9 V from 1 ms after K1 closes
        until 20 ms
        """;

    [Fact]
    public void Every_tolerance_of_the_file_varies_and_nothing_else()
    {
        var varied = Varied(Charging, new EveryTolerance());
        Assert.Equal(["Feed", "R3", "C1", "C1 initial charge"], varied.Values.Select(v => v.Name));
        Assert.Equal(["V", "Ω", "F", "V"], varied.Values.Select(v => v.Unit));
        Assert.Equal([10, 50, 10e-6, 1], varied.Values.Select(v => v.Nominal));
    }

    [Fact]
    public void A_named_value_reaches_parts_and_waves()
    {
        var varied = Varied(Charging, new NamedValueTarget("Rch"), new NamedValueTarget("Wide"));
        var other = varied.At([120, 4e-3]).Value!;
        Assert.Equal(120, other.Part<Resistor>("R1").Resistance.Nominal);
        Assert.Equal(240, other.Part<Resistor>("R2").Resistance.Nominal);
        Assert.Equal(5e-3, other.Part<VoltageSource>("Kick").Wave.Pieces[1].Start);
    }

    [Fact]
    public void An_event_moves_and_what_follows_it_moves_along()
    {
        var varied = Varied(
            Charging + "\nsource Late at e : step of 1 V at 1 ms after K1 closes\nresistor R9 at e : 1 Ω",
            new EventTimeTarget("K1", true));
        var other = varied.At([7e-3]).Value!;
        Assert.Equal(7e-3, ((AtInstant)other.Part<Switch>("K1").Events[0].Trigger).Instant.Delay.Nominal);
        Assert.Equal(8e-3, other.Part<VoltageSource>("Late").Wave.Pieces[0].Start);
    }

    [Fact]
    public void A_phase_turns_to_the_stated_one()
    {
        var varied = Varied(Charging, new SourcePhaseTarget("Ring"));
        Assert.Equal(Math.PI / 6, varied.Values[0].Nominal, 15);
        var other = varied.At([Math.PI / 2]).Value!;
        Assert.Equal(0, other.Part<VoltageSource>("Ring").Wave.Pieces[0].Phase, 15);
    }

    [Fact]
    public void The_same_figures_come_out_as_of_a_file_with_those_values()
    {
        var varied = Varied(Charging, new EveryTolerance());
        var figures = StudyFigures.Of(varied.Circuit);
        var stop = TestContext.Current.CancellationToken;
        var point = StudySolver.At(varied.At([11, 47.5, 12e-6, 0]).Value!, figures, stop).Value!;
        var written = Charging.Replace("10 V ±10 %", "11 V").Replace("50 Ω ±5 %", "47.5 Ω")
            .Replace("10 µF ±20 %, charged to 1 V between 0 V and 2 V", "12 µF, charged to 0 V");
        var solved = (Solved)TransientAnalysis.Run(
            new SourceText("other.cause", written), AnalysisOptions.Default, _ => new(null, []), stop);
        var result = solved.Result;
        double?[] expected =
        [
            .. result.Observations.SelectMany(o => new[] { o.Max.Value, o.Min.Value }),
            .. result.Requirements.Select(r => r.Margin),
        ];
        Assert.Equal(expected.Length, point.Values.Length);
        for (var i = 0; i < expected.Length; i++)
        {
            Assert.Equal(expected[i]!.Value, point.Values[i]!.Value, 1e-11 * 11);
        }
    }

    [Theory]
    [InlineData("R9", "the study:1:1: error: there is no part `R9`\n  R9\n  ^^\n  → did you mean `R1`?")]
    [InlineData("R2", "plant.cause:6:1: error: the value of `R2` follows from named values\n"
        + "  resistor  R2    from k to b : 2*Rch\n  ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^\n"
        + "  → vary those: `--value NAME`")]
    public void A_part_that_cannot_vary_is_told_from_one_that_is_not_there(string name, string message)
    {
        var outcome = VariedCircuit.Of(
            Checking.Circuit(Charging), [new PartValueTarget(name)], _ => new(null, []));
        Assert.Equal(message, DiagnosticText.Render(Assert.Single(outcome.Diagnostics)));
    }

    [Fact]
    public void A_value_no_part_can_have_is_said()
    {
        var varied = Varied(Charging, new PartValueTarget("C1"));
        var outcome = varied.At([-1e-6]);
        Assert.Equal(
            "the capacitance of `C1` would be zero, less, or no number",
            Assert.Single(outcome.Diagnostics).Message);
    }

    [Fact]
    public void Coils_that_could_store_negative_energy_are_no_circuit()
    {
        var varied = Varied(
            """
            source Feed at a : 1 V
            resistor R1 from a to b : 1 Ω
            inductor L1 at b : 1 mH
            inductor L2 at b : 1 mH
            inductor L3 at b : 1 mH
            coupling M12 of L1 and L2 : 0.5
            coupling M23 of L2 and L3 : 0.5
            coupling M13 of L1 and L3 : 0.5
            until 1 ms
            """,
            new PartValueTarget("M13"));
        Assert.True(varied.At([-0.49]).Succeeded);
        Assert.Equal(
            "`L1`, `L2`, `L3` so coupled could store negative energy",
            Assert.Single(varied.At([-0.51]).Diagnostics).Message);
    }

    [Fact]
    public void Slopes_of_formulas_are_those_of_their_differences()
    {
        Formula formula = new BinaryFormula('/',
            new CallFormula("sqrt", new BinaryFormula('*', new ParameterFormula(0), new ParameterFormula(1))),
            new BinaryFormula('^', new ParameterFormula(1), new ParameterFormula(2)));
        double[] at = [3, 1.7, 0.6];
        for (var k = 0; k < 3; k++)
        {
            double[] up = [.. at], down = [.. at];
            (up[k], down[k]) = (at[k] + 1e-6, at[k] - 1e-6);
            var difference = (FormulaValue.Of(formula, up) - FormulaValue.Of(formula, down)) / 2e-6;
            Assert.Equal(difference, FormulaValue.Slope(formula, k, at), 1e-9);
        }
    }

    private static VariedCircuit Varied(string text, params ImmutableArray<StudyTarget> targets)
    {
        var outcome = VariedCircuit.Of(Checking.Circuit(text), targets, _ => new(null, []));
        Assert.True(outcome.Succeeded, DiagnosticText.Render(outcome.Diagnostics));
        return outcome.Value;
    }
}
