namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Two resonant circuits whose coils are coupled.</summary>
/// <remarks>Mode frequencies: mathematics, computed (C); complete transfer at k = (b² − a²)/(b² + a²): coil
/// builders' papers, quoted (V2).</remarks>
public sealed class CoupledResonatorTests
{
    [Fact]
    public void Equal_circuits_split_into_two_modes()
    {
        var modes = Frequencies("100 µH", "1 nF", "100 µH", "1 nF", 0.1);
        Close.To(479870.208878, modes[0]);
        Close.To(530516.476973, modes[1]);
        Close.To(0.100629964144, (modes[1] - modes[0]) / 503292.121045);
    }

    [Fact]
    public void Unequal_circuits_have_the_modes_of_the_quadratic_formula()
    {
        var modes = Frequencies("100 µH", "1 nF", "400 µH", "0.3 nF", 0.2);
        Close.To(434643.2767, modes[0]);
        Close.To(542976.52986, modes[1]);
    }

    [Theory]
    [InlineData(1, 0.6, 3.97383530632e-6, -1)]
    [InlineData(2, 0.3846153846153846, 7.39340411281e-6, 1)]
    [InlineData(3, 0.28, 10.6629190516e-6, -1)]
    public void Tuned_alike_and_coupled_aright_all_energy_passes_over(
        int lower, double coupling, double time, int sign)
    {
        var solved = Transformer(coupling, time);
        var upper = lower + 1;
        Close.To(coupling, (double)((upper * upper) - (lower * lower)) / ((upper * upper) + (lower * lower)));
        Close.To(sign * 100e3, solved.Sample("voltage of q", 0));
        // Four quantities vanish at once, as far as the twelve digits of the instant go.
        var slip = 0.5e-11 * time * double.Tau * 200e3;
        Close.OfScale(10e3, 0, solved.Sample("voltage of p", 0), slip + 1e-9);
        Close.OfScale(100, 0, solved.Sample("current through L1", 0), 10 * slip);
        Close.OfScale(10, 0, solved.Sample("current through L2", 0), 10 * slip);
    }

    [Fact]
    public void Between_the_right_couplings_some_energy_stays_behind()
    {
        var wave = Transformer(0.2)["voltage of q"];
        Close.To(99395.282707, wave.Greatest is { } peak ? Math.Abs(peak.Value!.Value) : 0);
    }

    private static SolvedText Transformer(double coupling, params double[] at) => SolvedText.Of(
        $"""
        capacitor C1 from p to ground : 10 nF, charged to 10 kV
        inductor L1 from p to ground : 100 µH
        inductor L2 from q to ground : 10 mH
        capacitor C2 from q to ground : 100 pF
        coupling M of L1 and L2 : {coupling}
        observe voltage of p
        observe voltage of q
        observe current through L1
        observe current through L2
        until 60 µs
        """,
        at);

    private static double[] Frequencies(string l1, string c1, string l2, string c2, double coupling)
    {
        var solved = SolvedText.Of(
            $"""
            capacitor C1 from p to ground : {c1}, charged to 1 V
            inductor L1 from p to ground : {l1}
            inductor L2 from q to ground : {l2}
            capacitor C2 from q to ground : {c2}
            coupling M of L1 and L2 : {coupling}
            observe voltage of q
            until 20 µs
            """);
        return [.. solved.Poles().Select(p => p.Im / double.Tau)];
    }
}
