using CircuitTransient.Studies;
using CircuitTransient.Tests.OutsideChecks;
using CsCheck;

namespace CircuitTransient.Tests.Studies.Sensitivities;

public class RandomDerivativeTests
{
    [Fact]
    public void Derivatives_of_random_networks_agree_with_differences()
    {
        Gen.Int[0, 1_000_000].OnEach(
            seed =>
            {
                var network = RandomNetwork.Draw(seed);
                var derived = Derived.Of(
                    network.Text(),
                    [.. network.Parts.Where(p => p.Kind is not ("voltage" or "current"))
                        .Select(p => new PartValueTarget(p.Name)), new EventTimeTarget("S", true)]);
                double[] times = [.. Enumerable.Range(0, 9).Select(k => ((k * 0.87) + 0.23) * 1e-3)];
                var worst = derived.WorstAgainstDifferences(
                    [.. derived.Varied.Circuit.Observations.Select(o => o.Quantity)], times);
                Assert.True(worst < 1e-7, $"seed {seed}: {worst:E2}");
            },
            seed: "0000KxQ1dYs4", iter: 12);
    }
}
