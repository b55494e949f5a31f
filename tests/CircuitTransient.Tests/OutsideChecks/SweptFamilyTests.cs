namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Families of circuits swept towards a limit: the answer follows its closed form all the way, and
/// has no seam at the limit itself.</summary>
/// <remarks>All closed forms are mathematics (C); none of them takes a difference of near numbers.</remarks>
public sealed class SweptFamilyTests
{
    // Two capacitors joined by a contact: the energy lost and the end do not depend on it, and at no
    // resistance at all the charge passes as an impulse.
    [Fact]
    public void A_contact_of_less_and_less_resistance_becomes_an_impulse()
    {
        for (var k = 0; k <= 12; k += 2)
        {
            var solved = Joined($"open, closed resistance 1e-{k} Ω, closes at 1 ms");
            Close.To(1200.0 / 147, solved.Sample("voltage of b", 0));
            Close.To(2.3020408163265306e-3, solved.Sample("energy in S", 0));
            Close.To(-1 / (1e-4 * 47e-6 / 147e-6 * Math.Pow(10, -k)), solved.Poles(1)[^1].Re);
        }

        var impulsive = Joined("open, closes at 1 ms");
        Close.To(1200.0 / 147, impulsive.Sample("voltage of b", 0));
        Close.To(2.3020408163265306e-3, impulsive.Result.Intervals[1].EnergyLost);

        static SolvedText Joined(string contact) => SolvedText.Of(
            $"""
            capacitor C1 from a to ground : 100 µF, charged to 12 V
            capacitor C2 from b to ground : 47 µF
            switch S from a to b : {contact}
            observe voltage of b
            observe energy in S
            until 3 ms
            """,
            3e-3);
    }

    // Ever smaller contacts beside a stray picofarad and a bleeder: twelve decades in one circuit. The slow
    // pole is exact from the quadratic formula in its stable form.
    [Theory]
    [InlineData(1e-3)]
    [InlineData(1e-6)]
    public void A_contact_a_stray_capacitance_and_a_bleeder_keep_their_digits(double contact)
    {
        const double bulk = 100e-6;
        const double stray = 1e-12;
        const double bleeder = 1e6;
        var solved = SolvedText.Of(
            $"""
            capacitor Bulk from a to ground : 100 µF, charged to 400 V
            resistor Contact from a to b : {contact:R} Ω
            capacitor Stray from b to ground : 1 pF
            resistor Bleeder from b to ground : 1 MΩ
            observe voltage of b
            until 300 s
            """,
            100, 200);
        var sum = (1 / (contact * bulk)) + (1 / (contact * stray)) + (1 / (bleeder * stray));
        var product = 1 / (contact * bleeder) / bulk / stray;
        var fast = (sum + Math.Sqrt((sum * sum) - (4 * product))) / 2;
        var slow = product / fast;
        Close.To(-slow, solved.Poles()[0].Re);
        Close.To(-fast, solved.Poles()[1].Re);
        var level = 400 / (contact * stray) / (fast - slow);
        Close.To(level * Math.Exp(-slow * 100), solved.Sample("voltage of b", 0));
        Close.To(level * Math.Exp(-slow * 200), solved.Sample("voltage of b", 1));
    }

    [Fact]
    public void A_bleeder_from_a_kilohm_to_a_teraohm_sets_the_time_constant()
    {
        for (var k = 3; k <= 12; k++)
        {
            var solved = SolvedText.Of(
                $"""
                source E at s : 600 V
                resistor Rs from s to a : 10 mΩ
                capacitor C from a to ground : 1 mF
                resistor Bleeder from a to ground : 1e{k} Ω
                observe voltage of a
                until 1 s
                """,
                10e-6, 1);
            var bleeder = Math.Pow(10, k);
            var end = 600 * bleeder / (bleeder + 0.01);
            var rate = (bleeder + 0.01) / (bleeder * 0.01 * 1e-3);
            Close.To(-rate, solved.Poles()[0].Re);
            Close.To(end * (1 - Math.Exp(-rate * 10e-6)), solved.Sample("voltage of a", 0));
            Close.To(end, solved.Sample("voltage of a", 1));
        }
    }

    // Modes of two equal coupled circuits: f0/√(1 ± k); at k = 1 the upper one is gone.
    [Fact]
    public void Coupling_that_tends_to_one_sends_a_mode_away()
    {
        foreach (var gap in new[] { 1e-1, 1e-3, 1e-6, 1e-9 })
        {
            var solved = Coupled(1 - gap);
            var actual = 1 - (1 - gap); // the gap that the double nearest to k leaves
            Close.To(1 / Math.Sqrt(2 - actual), solved.Poles()[0].Im, 1e-12);
            Close.To(1 / Math.Sqrt(actual), solved.Poles()[1].Im, 1e-12);
        }

        Close.To(Math.Sqrt(0.5), Assert.Single(Coupled(1).Poles()).Im, 1e-14);
    }

    // cos ωt − cos t over 1 − ω²: as a product of sines it has no seam at resonance.
    [Fact]
    public void A_source_swept_through_resonance_shows_no_seam()
    {
        double[] detunings = [0, .. Enumerable.Range(1, 16).SelectMany(k =>
            new[] { Math.Pow(10, -k), -Math.Pow(10, -k) })];
        foreach (var detuning in detunings)
        {
            var frequency = 1 + detuning;
            var solved = SolvedText.Of(
                $"""
                source E at s : cosine of 1 V at {frequency:R} Hz / (2*pi)
                inductor L from s to c : 1 H
                capacitor C from c to ground : 1 F
                observe voltage of c
                until 40 s
                """,
                3, 17, 40);
            foreach (var (i, t) in new[] { 3.0, 17, 40 }.Index())
            {
                var half = (1 - frequency) / 2 * t;
                var sinc = half == 0 ? 1 : Math.Sin(half) / half;
                var expected = t / (1 + frequency) * sinc * Math.Sin((1 + frequency) / 2 * t);
                Close.OfScale(solved.Max("voltage of c"), expected, solved.Sample("voltage of c", i));
            }
        }
    }

    // e^(−αt) sin(ωt)/ω, with ω² of either sign, by its power series in ω²t².
    [Fact]
    public void Damping_swept_through_critical_shows_no_seam()
    {
        double[] detunings = [0, .. Enumerable.Range(2, 15).SelectMany(k =>
            new[] { Math.Pow(10, -k), -Math.Pow(10, -k) })];
        foreach (var detuning in detunings)
        {
            var resistance = 2 * (1 + detuning);
            var solved = SolvedText.Of(
                $"""
                source E at s : step of 1 V
                resistor R from s to r : {resistance:R} Ω
                inductor L from r to c : 1 H
                capacitor C from c to ground : 1 F
                observe current through L
                until 12 s
                """,
                0.3, 1, 4, 10);
            var beside = (resistance / 2) - 1;
            var square = beside * (2 + beside);
            foreach (var (i, t) in new[] { 0.3, 1, 4, 10 }.Index())
            {
                var (sum, term) = (1.0, 1.0);
                for (var k = 1; k <= 12; k++)
                {
                    term *= square * t * t / (2 * k) / ((2 * k) + 1);
                    sum += term;
                }

                Close.To(t * Math.Exp(-resistance / 2 * t) * sum, solved.Sample("current through L", i));
            }
        }
    }

    // Charge on an island of two capacitors: the zero pole holds it for ever.
    [Fact]
    public void A_charge_on_a_floating_node_does_not_drift_in_a_million_seconds()
    {
        var solved = SolvedText.Of(
            """
            source E at s : sine of 10 V at 50 mHz
            resistor R from s to a : 1 kΩ
            capacitor C1 from a to island : 3.3 µF, charged to -7 V
            capacitor C2 from island to b : 4.7 µF, charged to 5 V
            resistor Rb from b to ground : 330 Ω
            observe voltage across C1
            observe voltage across C2
            until 1e6 s
            """,
            0, 333_333.3, 1e6);
        var (first, second) = (solved.Samples("voltage across C1"), solved.Samples("voltage across C2"));
        foreach (var (v1, v2) in first.Zip(second))
        {
            // the island's charge C2 v2 − C1 v1
            Close.To((4.7 * 5) + (3.3 * 7), (4.7 * v2) - (3.3 * v1), 1e-13);
        }

        Close.To(0, solved.Poles()[0].Re, 0);
    }

    // 1e5 cycles later: the phase is wrong by no more than the last bit of the input allows.
    [Fact]
    public void A_ring_keeps_its_phase_for_a_hundred_thousand_cycles()
    {
        var time = 1e5 * double.Tau;
        var solved = SolvedText.Of(
            $"""
            inductor L from a to ground : 1 H
            capacitor C from a to ground : 1 F, charged to 1 V
            observe voltage of a
            observe current through L
            until {time + 1:R} s
            """,
            time, time + 0.5);
        Close.Within(1e-9, Math.Cos(time), solved.Sample("voltage of a", 0));
        Close.Within(1e-9, Math.Sin(time), solved.Sample("current through L", 0));
        Close.Within(1e-9, Math.Cos(time + 0.5), solved.Sample("voltage of a", 1));
    }

    // Six sections detuned by ever less: no seam against the exactly equal ones.
    [Fact]
    public void Equal_sections_slightly_detuned_stay_near_the_equal_ones()
    {
        var equal = Sections(0);
        for (var k = 10; k <= 16; k++)
        {
            var detuned = Sections(Math.Pow(10, -k));
            foreach (var (a, b) in equal.Zip(detuned))
            {
                Close.Within((10 * Math.Pow(10, -k)) + 1e-13, a, b);
            }
        }
    }

    private static double[] Sections(double detuning)
    {
        var sections = Enumerable.Range(1, 6).Select(k =>
            $"""
            inductor L{k} from n{k - 1} to n{k} : {1 + (k * detuning):R} H
            capacitor C{k} from n{k} to ground : 1 F
            """);
        return SolvedText.Of(
            $"""
            source E at n0 : step of 1 V
            {string.Join('\n', sections)}
            resistor End from n6 to ground : 1 Ω
            observe voltage of n6
            until 20 s
            """,
            4, 8, 12, 20).Samples("voltage of n6");
    }

    private static SolvedText Coupled(double coupling) => SolvedText.Of(
        $"""
        capacitor C1 from p to ground : 1 F, charged to 1 V
        inductor L1 from p to ground : 1 H
        inductor L2 from q to ground : 1 H
        capacitor C2 from q to ground : 1 F
        coupling M of L1 and L2 : {coupling:R}
        observe voltage of q
        until 0.1 s
        """);
}
