namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Standard surges written as sums of exponentials, and as networks that make them.</summary>
/// <remarks>Wave constants: IEEE C62.41 and a high-voltage textbook (Kuffel, Zaengl, Kuffel), from memory;
/// what they give is computed (C). Front and tail by IEC 60060-1, quoted (V2).</remarks>
public sealed class SurgeWaveTests
{
    private const string Voltage = "voltage of a";

    [Fact]
    public void The_1_2_50_wave_has_its_crest()
    {
        var wave = Exponentials("1.037 V", "68.22 µs", "0.407 µs", "100 µs")[Voltage];
        Close.To(0.999792294129146, wave.Max.Value!.Value);
        Close.To(2.08694465169492e-6, wave.Max.Time, Close.Instant);
    }

    [Theory]
    [InlineData("3155 µs", "62.48 µs", 0.905526623476726, 249.990831458087e-6)]
    [InlineData("2877 µs", "104 µs", 0.851004807150526, 358.241691399654e-6)]
    public void Two_published_250_2500_waves_have_different_times_to_peak(
        string slow, string fast, double crest, double time)
    {
        var wave = Difference("1 V", slow, fast, "5 ms")[Voltage];
        Close.To(crest, wave.Max.Value!.Value);
        Close.To(time, wave.Max.Time, Close.Instant);
    }

    [Fact]
    public void The_5_50_nanosecond_wave_has_its_crest()
    {
        var wave = Exponentials("1.270 V", "55.6 ns", "3.5 ns", "200 ns")[Voltage];
        Close.To(1.00004403717473, wave.Max.Value!.Value);
        Close.To(9.89263784571e-9, wave.Max.Time, Close.Instant);
    }

    [Fact]
    public void The_100_kHz_ring_wave_has_its_crests()
    {
        const string ring = """
            value Fast : 1/(1/0.533 µs + 1/9.788 µs)
            source E at a : cosine of 1.59 V at 100 kHz decaying in 9.788 µs -
              cosine of 1.59 V at 100 kHz decaying in Fast
            resistor R from a to ground : 50 Ω
            observe voltage of a
            observe voltage of a as "second crest" from 2 µs
            observe voltage of a as "third crest" from 7 µs
            until 30 µs
            """;
        var solved = SolvedText.Of(ring);
        Close.To(1.00008706040195, solved.Max(Voltage));
        Close.To(0.85241824320665e-6, solved[Voltage].Max.Time, Close.Instant);
        Close.To(-0.966503968401267, solved.Min("second crest"));
        Close.To(0.579979168049295, solved.Max("third crest"));
        Close.To(9.7434559981331e-6, solved["third crest"].Max.Time, Close.Instant);
    }

    // Four equal stages behind buffers: 6k/(s + 1/τ)⁴, a fourfold pole.
    [Fact]
    public void The_idealised_8_20_current_is_made_by_a_fourfold_pole()
    {
        var solved = EightTwenty();
        Close.To(0.999573870683841, solved.Max("current through Load"));
        Close.To(11.733e-6, solved["current through Load"].Max.Time, Close.Instant);
        var pole = solved.Poles().Single(p => p.Re != 0);
        Assert.Equal(4, pole.Multiplicity);
        Close.To(-1 / 3.911e-6, pole.Re);
    }

    [Fact]
    public void The_idealised_8_20_current_carries_its_charge()
    {
        var solved = EightTwenty();
        var charge = solved["voltage of q"].Final!.Value; // on one farad
        Close.To(17.449124559188e-6, charge);
        Close.To(17.4565633e-6, charge / solved.Max("current through Load"), 3e-9); // nine digits given
    }

    // Published: Wu 2014, doi 10.1109/TEMC.2013.2296573, at least 4.29 (abstract, quoted: V2); the instants
    // of t e^(−t) are computed (C).
    [Fact]
    public void No_two_real_poles_make_a_pulse_shorter_than_its_front_says()
    {
        var solved = SolvedText.Of(
            """
            capacitor C from a to ground : 1 F, charged to 1 V
            inductor L from a to b : 1 H
            resistor R from b to ground : 2 Ω
            observe current through L
            until 20 s
            """,
            0.0382212417467994, 0.608341284733432, 0.231960952986534, 2.67834699001666);
        var levels = solved.Samples("current through L");
        var crest = solved.Max("current through L");
        Close.To(0.1, levels[0] / crest);
        Close.To(0.9, levels[1] / crest);
        Close.To(0.5, levels[2] / crest);
        Close.To(0.5, levels[3] / crest);
        Close.AsPrinted(4.29, (2.67834699001666 - 0.231960952986534)
            / (0.608341284733432 - 0.0382212417467994), 2);
    }

    private static SolvedText EightTwenty()
    {
        var charge = 0.01243 * 6 * Math.Pow(3.911, 3);
        return SolvedText.Of(
            $"""
            capacitor C1 from n1 to ground : 3.911 µF, charged to {charge} V
            resistor R1 from n1 to ground : 1 Ω
            {string.Join('\n', Enumerable.Range(1, 3).Select(Stage))}
            dependent source Out from ground to load : 1 S times voltage of n4
            resistor Load from load to q : 1 Ω
            capacitor Q from q to ground : 1 F
            observe current through Load
            observe voltage of q
            until 60 µs
            """);
    }

    private static string Stage(int k) =>
        $"""
        dependent source B{k} from b{k} to ground : 1 times voltage of n{k}
        resistor R{k + 1} from b{k} to n{k + 1} : 1 Ω
        capacitor C{k + 1} from n{k + 1} to ground : 3.911 µF
        """;

    private static SolvedText Exponentials(string peak, string slow, string front, string until) =>
        Difference(peak, slow, $"(1/(1/{front} + 1/{slow}))", until);

    private static SolvedText Difference(string peak, string slow, string fast, string until) =>
        SolvedText.Of($"""
        source E at a : decay of {peak} in {slow} - decay of {peak} in {fast}
        resistor R from a to ground : 50 Ω
        observe voltage of a
        until {until}
        """);
}
