using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CsCheck;
using static CircuitTransient.Tests.Measurements.Verification.HandBuilt;

namespace CircuitTransient.Tests.Measurements.Verification;

/// <summary>The two routes share the equations but no way of solving them; on circuits drawn at random they
/// must agree and obey every law.</summary>
public sealed class TwoRoutesTests
{
    // Values over twelve decades of time constant: 1 µΩ to 1 MΩ, 1 pF to 1 µF, 10 nH to 10 mH.
    private static readonly Gen<(int Kind, int From, int To, double Size, double Start)> Part =
        Gen.Select(Gen.Int[0, 9], Gen.Int[0, 5], Gen.Int[0, 5], Gen.Double[-6, 6], Gen.Double[-10, 10]);

    [Fact]
    public void Propagation_and_inversion_agree_on_circuits_drawn_at_random()
    {
        var compared = 0;
        Part.Array[6, 14].OnEach(
            parts =>
            {
                var (built, switches) = Build(parts);
                var solution = built.Solve(1e-3, switches[..(switches.Length / 2)], (0.3e-3, switches));
                if (solution.Segments.IsEmpty)
                {
                    return; // a loop of contacts and the source, or the like: no unique solution
                }

                var residuals = new LawResiduals(built.Circuit());
                foreach (var sample in ContourInversion.Samples(solution).Samples)
                {
                    var closed = sample.Time < 0.3e-3 ? switches[..(switches.Length / 2)] : switches;
                    residuals.Add(
                        built.Positions(closed), sample.Time, m => solution.ValueAt(m, sample.Time));
                    compared += Compare(solution, sample);
                }

                Assert.InRange(residuals.WorstAtNodes, 0, 1e-9);
                Assert.InRange(residuals.WorstInParts, 0, 1e-9);
            },
            seed: "0000000000000", iter: 150);
        Assert.True(compared > 500); // few circuits fall out as singular, few values as too lightly damped
    }

    private static (HandBuilt Built, int[] Switches) Build((int, int, int, double, double)[] parts)
    {
        var built = new HandBuilt();
        var switches = new List<int>();
        built.Voltage(1, 0, Step(10), Sine(3, 1e4));
        for (var node = 1; node <= 5; node++)
        {
            built.Resistor(node, node - 1, 100 * node); // so that no drawing leaves an island
        }

        foreach (var (kind, from, to, size, start) in parts)
        {
            if (from == to)
            {
                continue;
            }

            switch (kind)
            {
                case 0 or 1: built.Resistor(from, to, Math.Pow(10, size)); break;
                case 2 or 3 or 4: built.Capacitor(from, to, 1e-9 * Math.Pow(10, size / 2), start); break;
                case 5 or 6: built.Inductor(from, to, 1e-5 * Math.Pow(10, size / 2), start); break;
                case 7 or 8: switches.Add(built.Switch(from, to)); break;
                default: built.Current(from, to, Step(start, 0.1e-3)); break;
            }
        }

        return (built, [.. switches]);
    }

    // How many node voltages could be compared.
    private static int Compare(AllAtOnceSolution solution, ContourSample sample)
    {
        var compared = 0;
        var scale = Enumerable.Range(1, 5)
            .Max(node => Math.Abs(solution.ValueAt(new VoltageBetween(node, 0), sample.Time)!.Value));
        for (var node = 1; node <= 5; node++)
        {
            var (value, error) = sample.ValueOf(new VoltageBetween(node, 0))!.Value;
            if (error < 1e-6 * scale)
            {
                var expected = solution.ValueAt(new VoltageBetween(node, 0), sample.Time)!.Value;
                Assert.InRange(Math.Abs(value - expected), 0, (2 * error) + (1e-9 * scale));
                compared++;
            }
        }

        return compared;
    }
}
