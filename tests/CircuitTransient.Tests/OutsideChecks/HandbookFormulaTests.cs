using CircuitTransient.Reports.Formula;
using CircuitTransient.Tests.Reports.Formula;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>The terms that are printed are the handbook's, term by term.</summary>
/// <remarks>The expressions are mathematics (C): solutions of second-order equations, charge conservation,
/// the modes of coupled circuits; they are written here with their numbers put in.</remarks>
public sealed class HandbookFormulaTests
{
    private const int Digits = 10;

    [Theory]
    [InlineData(0.1)]
    [InlineData(0.5)]
    [InlineData(0.9)]
    public void A_second_order_step_is_one_less_a_damped_cosine(double damping)
    {
        // 1 - e^(-ζ t)/√(1 - ζ²)·cos(√(1 - ζ²) t - asin ζ)
        var ring = Math.Sqrt(1 - (damping * damping));
        var terms = Terms("voltage of c", "E",
            $"""
            source E at s : step of 1 V
            resistor R from s to r : {2 * damping} Ω
            inductor L from r to c : 1 H
            capacitor C from c to ground : 1 F
            observe voltage of c
            until 60 s
            """);
        var angle = double.RadiansToDegrees(Math.Asin(damping));

        Assert.Equal(2, terms.Length);
        Same("+ {}", terms[0], 1);
        Same(
            angle < 45 ? "- {}·e^(-τ/{})·cos(2π·{}·τ - {}°)" : "- {}·e^(-τ/{})·sin(2π·{}·τ + {}°)", terms[1],
            1 / ring, 1 / damping, ring / double.Tau, angle < 45 ? angle : 90 - angle);
    }

    [Fact]
    public void Two_capacitors_share_their_charge_through_a_resistor()
    {
        // C1 V/(C1 + C2)·(1 - e^(-t/τ)), τ = R C1 C2/(C1 + C2)
        var terms = Terms("voltage of b", "C1 initial charge",
            """
            capacitor C1 from a to ground : 100 µF, charged to 12 V
            resistor R from a to b : 1 Ω
            capacitor C2 from b to ground : 47 µF
            observe voltage of b
            until 1 ms
            """);

        Assert.Equal(2, terms.Length);
        Same("+ {}", terms[0], 1200 / 147.0);
        Same("- {}·e^(-τ/{})", terms[1], 1200 / 147.0, 4700e-6 / 147);
    }

    [Fact]
    public void Two_capacitors_joined_by_a_contact_share_it_in_an_impulse()
    {
        const string text =
            """
            capacitor C1 from a to ground : 100 µF, charged to 12 V
            switch K from a to b : open, closes at 0 s
            capacitor C2 from b to ground : 47 µF
            observe voltage of b
            observe current through K
            until 1 ms
            """;

        Same("+ {}", Assert.Single(Terms("voltage of b", "C1 initial charge", text)), 1200 / 147.0);
        // C1 C2 V/(C1 + C2), in five digits
        Assert.Equal(["+ 383.67 µC·δ(τ)"], Terms("current through K", "C1 initial charge", text));
    }

    [Fact]
    public void Coupled_circuits_swing_in_two_cosines_of_half_the_charge()
    {
        // V/2·(cos ω₁t + cos ω₂t), f = f₀/√(1 ± k)
        var terms = Terms("voltage of a", "C1 initial charge",
            """
            inductor L1 from a to ground : 100 µH
            capacitor C1 from a to ground : 1 nF, charged to 10 V
            inductor L2 from b to ground : 100 µH
            capacitor C2 from b to ground : 1 nF
            coupling M of L1 and L2 : 0.1
            observe voltage of a
            until 20 µs
            """);

        Assert.Equal(2, terms.Length);
        Same("+ {}·cos(2π·{}·τ)", terms[0], 5, 479870.208878);
        Same("+ {}·cos(2π·{}·τ)", terms[1], 5, 530516.476973);
    }

    [Fact]
    public void A_critically_damped_current_is_time_times_an_exponential()
    {
        // V/L·t·e^(-t/τ), τ = 2 L/R
        var terms = Terms("current through L", "E", FormulaCircuits.Loop(200));

        Same("+ {}·τ·e^(-τ/{})", Assert.Single(terms), 1e4, 1e-5);
    }

    [Fact]
    public void Past_critical_damping_it_is_a_hyperbolic_sine_however_little_past()
    {
        // V/(L β)·e^(-α t)·sinh β t, α = R/2L, β = √(α² - 1/LC), with R = 200·(1 + 1e-9) Ω
        var terms = Terms("current through L", "E", FormulaCircuits.Loop(200.0000002));
        var beta = 1e5 * Math.Sqrt(2e-9 + 1e-18);

        SameWithin(1e-7, "+ {}·e^(-τ/{})·sinh(τ/{})", Assert.Single(terms), 1e4 / beta, 1e-5, 1 / beta);
    }

    [Fact]
    public void Short_of_critical_damping_it_is_a_sine_however_little_short()
    {
        var terms = Terms("current through L", "E", FormulaCircuits.Loop(199.9999998));
        var beta = 1e5 * Math.Sqrt(2e-9 - 1e-18);

        SameWithin(1e-7, "+ {}·e^(-τ/{})·sin(2π·{}·τ)", Assert.Single(terms),
            1e4 / beta, 1e-5, beta / double.Tau);
    }

    [Fact]
    public void An_undamped_circuit_driven_at_its_own_frequency_grows_with_time()
    {
        // ½·(sin ωt - ωt·cos ωt)
        var terms = Terms("voltage of b", "E",
            """
            source E at a : sine of 1 V at 1 kHz
            inductor L from a to b : 25.330295910584442 mH
            capacitor C from b to ground : 1 µF
            observe voltage of b
            until 5 ms
            """);

        Assert.Equal(2, terms.Length);
        Same("+ {}·sin(2π·{}·τ)", terms[0], 0.5, 1000);
        Same("- {}·τ·cos(2π·{}·τ)", terms[1], 1000 * Math.PI, 1000);
    }

    private static string[] Terms(string quantity, string cause, string text)
    {
        var written = FormulaText.Write(FormulaOf.Text(text), Digits);
        return Assert.Single(WrittenFormula.Read(written, quantity).Stretches).Terms(cause);
    }

    private static void Same(string form, string term, params double[] numbers) =>
        SameWithin(3e-9, form, term, numbers);

    /// <summary>The term has that form, and at its places those numbers.</summary>
    private static void SameWithin(double relative, string form, string term, params double[] numbers)
    {
        var rest = term;
        var pieces = form.Split("{}");
        Assert.Equal(pieces.Length - 1, numbers.Length);
        for (var i = 0; i < numbers.Length; i++)
        {
            Assert.StartsWith(pieces[i], rest);
            rest = rest[pieces[i].Length..];
            var end = pieces[i + 1].Length == 0 ? rest.Length
                : rest.IndexOf(pieces[i + 1], StringComparison.Ordinal);
            Assert.True(end > 0, $"`{term}` is not of the form `{form}`");
            Close.To(numbers[i], ExpressionReader.Value(rest[..end], double.NaN).Real, relative);
            rest = rest[end..];
        }

        Assert.Equal(pieces[^1], rest);
    }
}
