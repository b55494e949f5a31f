using System.Text;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Checks;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Measurements.Checks;

/// <summary>Networks of 150 stored quantities: equal to closed forms, and every self-check judged.</summary>
/// <remarks>A uniform ladder with its far end open has the shapes sin jθ, θ = (2k − 1)π/(2N + 1), which
/// follows from sin (j − 1)θ + sin (j + 1)θ = 2 cos θ sin jθ and from cos (N + ½)θ = 0 at the open
/// end.</remarks>
public sealed class LargeNetworkTests
{
    private const int Sections = 150;

    [Fact]
    public void A_resistive_ladder_equals_its_closed_form_and_every_check_is_judged() =>
        Holds(
            $"""
            source Feed from n[1] to ground : step of 1 V at 0 s
            repeat {Sections} as k
            resistor R[k] from n[k] to n[k+1] : 1 Ω
            capacitor C[k] from n[k+1] to ground : 1 nF
            end
            observe voltage of n[5]
            until 100 µs
            """,
            Sections, (half, t) => Math.Exp(-4e9 * Math.Sin(half) * Math.Sin(half) * t));

    [Fact]
    public void A_lossless_ladder_equals_its_closed_form_and_every_check_is_judged() =>
        Holds(
            $"""
            source Feed from n[1] to ground : step of 1 V at 0 s
            repeat {Sections / 2} as k
            inductor L[k] from n[k] to n[k+1] : 1 µH
            capacitor C[k] from n[k+1] to ground : 1 nF
            end
            observe voltage of n[5]
            until 30 µs
            """,
            Sections / 2, (half, t) => Math.Cos(2 / Math.Sqrt(1e-15) * Math.Sin(half) * t));

    [Fact]
    public void Every_check_is_judged_on_a_ladder_whose_time_constants_spread_over_fourteen_decades() =>
        AllJudgedAndHeld(Solve("""
            source Feed from n[1] to ground : step of 1 V at 1 µs
            repeat 150 as k
            resistor R[k] from n[k] to n[k+1] : 1 µΩ * 10^(k/15)
            capacitor C[k] from n[k+1] to ground : 1 pF * 10^(k/25)
            end
            observe voltage of n[100]
            until 1 s
            """));

    [Fact]
    public void Every_check_is_judged_on_a_lightly_damped_ladder_with_switchings() =>
        AllJudgedAndHeld(Solve("""
            source Feed from n[1] to ground : step of 1 V at 1 µs
            repeat 75 as k
            inductor L[k] from n[k] to m[k] : 1 µH
            resistor R[k] from m[k] to n[k+1] : 10 mΩ
            capacitor C[k] from n[k+1] to ground : 1 nF
            end
            switch S from n[20] to x : open, closes at 5 µs, opens at 12 µs
            resistor RS from x to ground : 3 Ω
            observe voltage of n[5]
            until 20 µs
            """));

    [Fact]
    public void Every_check_is_judged_on_a_grid_of_coils_with_several_causes() =>
        AllJudgedAndHeld(Solve(Grid(7)));

    private static void Holds(string text, int sections, Func<double, double, double> course)
    {
        var solution = Solve(text);
        var segment = Assert.Single(solution.Segments);
        var phi = new double[segment.Basis.Width];
        foreach (var part in new[] { 0.003, 0.05, 0.31, 1 })
        {
            segment.Basis.Evaluate(part * segment.Length, phi);
            for (var k = 0; k < solution.Circuit.Parts.Length; k++)
            {
                if (solution.Circuit.Parts[k] is Capacitor)
                {
                    var own = segment.Coefficients(new VoltageAcross(k))!.Zip(phi, (a, b) => a * b).Sum();
                    var node = int.Parse(solution.Circuit.Parts[k].Name[2..^1]);
                    Assert.Equal(
                        Exact(node, sections, half => course(half, part * segment.Length)), own, 1e-9);
                }
            }
        }

        AllJudgedAndHeld(solution);
    }

    // 1 − Σ 2/(2N + 1) cot(θ/2) sin jθ · course(θ/2): the step's share of each shape.
    private static double Exact(int node, int sections, Func<double, double> course)
    {
        var sum = 1.0;
        for (var k = 1; k <= sections; k++)
        {
            var half = ((2 * k) - 1) * Math.PI / (2 * ((2 * sections) + 1));
            sum -= 2.0 / ((2 * sections) + 1) / Math.Tan(half) * Math.Sin(2 * half * node) * course(half);
        }

        return sum;
    }

    private static void AllJudgedAndHeld(TransientSolution solution)
    {
        var curves = new CurveBuilder(solution);
        var grams = solution.Segments.Select(GramIntegral.Of).ToArray();
        var (checks, notJudged) = SelfChecks.Run(curves, new StoredEnergy(curves), s => grams[s]);
        Assert.Empty(notJudged);
        Assert.Equal(5, checks.Length);
        Assert.All(
            checks, check => Assert.True(check.Holds, $"{check.Name}: {check.Worst} of {check.Allowed}"));
    }

    private static TransientSolution Solve(string text)
    {
        var circuit = TransientAnalysis.Check(new SourceText("large.cause", text), _ => new(null, [])).Value!;
        return TransientSolver.Solve(circuit, CauseList.FromStart(circuit)).Value!;
    }

    private static string Grid(int size)
    {
        var text = new StringBuilder("source Feed from g00 to ground : step of 1 V at 1 µs\n");
        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                var charge = (i, j) == (3, 5) ? ", charged to 2 V" : "";
                text.Append(i + j == 0 ? "" : $"capacitor C{i}{j} from g{i}{j} to ground : 1 nF{charge}\n");
                Branch($"a{i}{j}", $"g{i}{j}", $"g{i + 1}{j}", i + 1 < size);
                Branch($"b{i}{j}", $"g{i}{j}", $"g{i}{j + 1}", j + 1 < size);
            }
        }

        return text.Append("observe voltage of g33\nuntil 30 µs\n").ToString();

        void Branch(string name, string from, string to, bool exists) => text.Append(!exists ? "" :
            $"""
            inductor L{name} from {from} to x{name} : 1 µH
            resistor R{name} from x{name} to {to} : 0.5 Ω

            """);
    }
}
