using CircuitTransient.Circuits;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

public sealed class LawResidualsTests
{
    [Fact]
    public void A_right_solution_obeys_every_law()
    {
        var (built, closed) = Everything();
        var residuals = Tried(built, closed, (_, value) => value);
        Assert.InRange(residuals.WorstAtNodes, 0, 1e-12);
        Assert.InRange(residuals.WorstInParts, 0, 1e-12);
    }

    [Fact]
    public void A_current_off_by_a_millionth_breaks_a_law_of_its_nodes_and_of_its_part()
    {
        var (built, closed) = Everything();
        var residuals = Tried(
            built, closed,
            (measurand, value) => measurand is CurrentThrough { Part: 1 } ? value * 1.000001 : value);
        Assert.InRange(residuals.WorstAtNodes, 1e-7, 1.1e-6);
        Assert.InRange(residuals.WorstInParts, 0.9e-6, 1.1e-6);
    }

    [Fact]
    public void A_wrong_rate_of_change_breaks_the_law_of_a_coil()
    {
        var (built, closed) = Everything();
        var residuals = Tried(
            built, closed,
            (measurand, value) => measurand is RateOfChange { Of: CurrentThrough } ? value * 1.001 : value);
        Assert.InRange(residuals.WorstAtNodes, 0, 1e-12);
        Assert.InRange(residuals.WorstInParts, 1e-4, 1.1e-3);
    }

    // A source, a resistor, coupled coils, a transformer, contacts in parallel and dependent sources.
    private static (HandBuilt Built, int[] Closed) Everything()
    {
        var built = new HandBuilt();
        built.Voltage(1, 0, Sine(325, 314, 0.4), new WavePiece(0, 1, 5, 7, 20, 0, 0, "decay"));
        var resistor = built.Resistor(1, 2, 3);
        var primary = built.Inductor(2, 3, 10e-3, 1);
        var secondary = built.Inductor(4, 0, 40e-3);
        built.Couple(primary, secondary, 0.9);
        built.Resistor(4, 0, 100);
        var first = built.Switch(3, 5);
        var second = built.Switch(3, 5);
        built.Switch(3, 0);
        built.Transformer(5, 0, 6, 0, 2);
        built.Capacitor(6, 0, 100e-6, 3);
        built.Resistor(6, 0, 20);
        built.Current(6, 0, Step(0.3));
        built.Dependent(7, 0, true, 4, new CurrentThrough(resistor));
        built.Resistor(7, 0, 1e3);
        built.Dependent(8, 0, false, 0.1, new VoltageBetween(6, 4));
        built.Resistor(8, 0, 10);
        return (built, [first, second]);
    }

    private static LawResiduals Tried(HandBuilt built, int[] closed, Func<Measurand, double?, double?> bend)
    {
        var solution = built.Solve(0.02, closed);
        var residuals = new LawResiduals(built.Circuit());
        foreach (var t in new[] { 0, 1e-4, 3.3e-3, 0.02 })
        {
            residuals.Add(built.Positions(closed), t, m => bend(m, solution.ValueAt(m, t)));
        }

        return residuals;
    }
}
