using CircuitTransient.Measurements.Verification;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>The rational ones among the sixteen transforms of Davies and Martin, J. Comput. Phys. 33 (1979)
/// 1–32 (the paper: quoted, V2; its list: from memory), each as a network: by the engine, and by the
/// inversion that takes no poles.</summary>
/// <remarks>Values at t = 1 and 5: mathematics, computed (C).</remarks>
public sealed class InversionPairTests
{
    // 1/(s + ½)
    private const string Decay = """
        capacitor C from a to ground : 1 F, charged to 1 V
        resistor R from a to ground : 2 Ω
        observe voltage of a
        until 10 s
        """;

    // 1/((s + 0.2)² + 1): the current of a coil with 0.4 Ω and 1/1.04 F
    private const string DampedSine = """
        capacitor C from a to ground : 1 F / 1.04, charged to 1 V
        inductor L from a to b : 1 H
        resistor R from b to ground : 0.4 Ω
        observe current through L
        until 10 s
        """;

    // 1/(s + 1)²
    private const string Critical = """
        capacitor C from a to ground : 1 F, charged to 1 V
        inductor L from a to b : 1 H
        resistor R from b to ground : 2 Ω
        observe current through L
        until 10 s
        """;

    // 1/(s² + 1)
    private const string Sine = """
        capacitor C from a to ground : 1 F, charged to 1 V
        inductor L from a to ground : 1 H
        observe current through L
        until 10 s
        """;

    // (s² − 1)/(s² + 1)² = s/(s² + 1) · (2s/(s² + 1) − 1/s): resonance, t cos t
    private const string Resonance = """
        source E at s : cosine of 2 V at 1 Hz / (2*pi) - 1 V
        inductor L from s to a : 1 H
        capacitor C from a to ground : 1 F
        observe current through L
        until 10 s
        """;

    [Theory]
    [InlineData(Decay, "voltage of a", 0.6065306597126334, 0.0820849986238988)]
    [InlineData(DampedSine, "current through L", 0.6889381730850401, -0.352768526288806)]
    [InlineData(Critical, "current through L", 0.3678794411714423, 0.03368973499542734)]
    [InlineData(Sine, "current through L", 0.8414709848078965, -0.9589242746631385)]
    [InlineData(Resonance, "current through L", 0.5403023058681397, 1.418310927316131)]
    public void The_engine_gives_the_pairs_values(string text, string name, double at1, double at5)
    {
        var solved = SolvedText.Of(text, 1, 5);
        Close.To(at1, solved.Sample(name, 0));
        Close.To(at5, solved.Sample(name, 1));
    }

    [Fact]
    public void The_inversion_gives_a_decay() =>
        Inverted(Decay, t => Math.Exp(-t / 2));

    [Fact]
    public void The_inversion_gives_a_damped_sine() =>
        Inverted(DampedSine, t => Math.Exp(-0.2 * t) * Math.Sin(t));

    [Fact]
    public void The_inversion_gives_a_double_pole() =>
        Inverted(Critical, t => t * Math.Exp(-t));

    [Fact]
    public void The_inversion_gives_a_sine_early_enough() =>
        Inverted(Sine, Math.Sin);

    [Fact]
    public void The_inversion_gives_a_resonance_early_enough() =>
        Inverted(Resonance, t => t * Math.Cos(t));

    private static void Inverted(string text, Func<double, double> closedForm)
    {
        var circuit = TransientAnalysis.Check(
            new SourceText("check.cause", text), _ => throw new InvalidOperationException()).Value!;
        var still = new SwitchedInterval(0, [.. circuit.Parts.Select(_ => false)]);
        var solution = AllAtOnceSolution.Solve(circuit, new SwitchingSchedule([still], circuit.Until!.Value));
        var (samples, notJudged) = ContourInversion.Samples(solution);
        Assert.Empty(notJudged);
        var sample = Assert.Single(samples);
        Assert.InRange(sample.Time, 1e-2, 10);
        var (value, estimated) = sample.ValueOf(circuit.Observations[0].Quantity)!.Value;
        Assert.InRange(estimated, 0, 1e-6); // beyond it the check is not judged
        Close.Within(Math.Max(estimated, Close.Computed), closedForm(sample.Time), value);
    }
}
