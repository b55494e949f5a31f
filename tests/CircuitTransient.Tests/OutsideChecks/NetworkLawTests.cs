using CircuitTransient.Measurements;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Laws of every linear network, tried on networks drawn at random.</summary>
public sealed class NetworkLawTests
{
    private const int Draws = 12;
    private const double Exact = 1e-11; // what the engine promises of small circuits
    private const double Rounding = 1e-12;

    private static readonly double[] Times = [0, 0.4e-3, 1.5e-3, 3e-3, 3.2e-3, 5e-3, 8e-3];

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, Draws)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Contributions_add_up_to_the_total(int seed)
    {
        var solved = SolvedText.WithWaveform(RandomNetwork.Draw(seed).Text(), 200);
        foreach (var wave in solved.Result.Observations)
        {
            for (var k = 0; k < wave.Total.Length; k++)
            {
                Close.OfScale(Size(wave), wave.Total[k], wave.ByCause.Sum(c => c[k]), Rounding);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Each_contribution_is_the_answer_to_its_cause_alone(int seed)
    {
        var network = RandomNetwork.Draw(seed);
        var all = SolvedText.Of(network.Text(), Times);
        foreach (var (c, cause) in all.Result.Causes.Index())
        {
            var alone = SolvedText.Of((network with { OnlyCause = cause.Name.Split(' ')[0] }).Text(), Times);
            foreach (var (wave, other) in all.Result.Observations.Zip(alone.Result.Observations))
            {
                foreach (var (own, total) in wave.Samples.Zip(other.Samples))
                {
                    Close.OfScale(Size(wave), total.Value!.Value, own.ByCause[c]!.Value, Exact);
                }
            }
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Voltages_stay_as_all_impedances_grow_and_all_currents_shrink(int seed) =>
        Same(seed, n => n with { Impedance = 7.3 }, 1, 1);

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Slower_parts_and_sources_give_the_same_wave_later(int seed) =>
        Same(seed, n => n with { Time = 1234.5 }, 1, 1234.5);

    [Theory]
    [MemberData(nameof(Seeds))]
    public void All_causes_times_a_factor_give_the_wave_times_the_factor(int seed) =>
        Same(seed, n => n with { Drive = -3.7 }, -3.7, 1);

    [Theory]
    [MemberData(nameof(Seeds))]
    public void The_order_of_statements_and_the_names_of_nodes_change_nothing(int seed) =>
        Same(
            seed,
            n => n with
            {
                Node = k => k == 0 ? "ground" : $"\"ä {97 - k}\"",
                Order = lines => lines.Reverse().OrderBy(l => l.Length % 7),
            },
            1, 1);

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Without_a_source_the_stored_energy_never_grows(int seed)
    {
        var network = RandomNetwork.Draw(seed, withSources: false);
        var stores = network.Parts.Where(p => p.Kind is "capacitor" or "inductor").ToArray();
        var solved = SolvedText.WithWaveform(
            network.Text([.. stores.Select(p => $"observe energy in {p.Name}")]), 400);
        var waves = stores.Select(p => solved[$"energy in {p.Name}"].Total).ToArray();
        var energies = Enumerable.Range(0, waves[0].Length).Select(k => waves.Sum(w => w[k])).ToArray();
        foreach (var (earlier, later) in energies.Zip(energies.Skip(1)))
        {
            Assert.True(later <= earlier + (Rounding * energies[0]), $"{earlier:R} J, then {later:R} J");
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void No_sample_is_beyond_the_peak_and_no_peak_beyond_its_bound(int seed)
    {
        var solved = SolvedText.WithWaveform(RandomNetwork.Draw(seed).Text(), 1000);
        foreach (var wave in solved.Result.Observations)
        {
            var rounding = 1e-14 * Size(wave);
            var (max, min) = (wave.Max.Value!.Value, wave.Min.Value!.Value);
            Assert.All(wave.Total, value => Assert.InRange(value, min - rounding, max + rounding));
            Assert.InRange(wave.Max.Bound!.Value, max, max + (1e-9 * Size(wave)));
            Assert.InRange(wave.Min.Bound!.Value, min - (1e-9 * Size(wave)), min);
        }
    }

    private static void Same(
        int seed, Func<RandomNetwork, RandomNetwork> change, double amplitude, double time)
    {
        var network = RandomNetwork.Draw(seed);
        var changed = change(network);
        var one = SolvedText.Of(network.Text(), Times);
        var other = SolvedText.Of(changed.Text(), [.. Times.Select(t => t * time)]);
        for (var k = 1; k <= network.Nodes; k++)
        {
            var wave = one[$"voltage of {network.Node(k).Trim('"')}"];
            var twin = other[$"voltage of {changed.Node(k).Trim('"')}"];
            var peak = twin.Greatest.Value!.Value / amplitude;
            Close.OfScale(Size(wave), wave.Greatest.Value!.Value, peak, Rounding);
            foreach (var (a, b) in wave.Samples.Zip(twin.Samples))
            {
                Close.OfScale(Size(wave), a.Value!.Value, b.Value!.Value / amplitude, Rounding);
            }
        }
    }

    private static double Size(ObservationResult wave) => Math.Abs(wave.Greatest.Value!.Value);
}
