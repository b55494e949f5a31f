namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Poles at any distance from each other, down to none: buffered stages of a resistor and a
/// capacitor, against a power series in 28 digits.</summary>
/// <remarks>The step of n stages with poles −pₖ is Πp Σₘ hₘ(−p) tⁿ⁺ᵐ/(n + m)!, with the complete homogeneous
/// symmetric polynomials hₘ: mathematics (C), no quotient of differences in it.</remarks>
public sealed class CoincidingPolesTests
{
    private static readonly double[] Times = [0.1, 0.7, 2, 4];

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(6)]
    public void No_seam_shows_as_poles_move_together(int stages)
    {
        double[] separations = [0, .. Enumerable.Range(1, 16).Select(k => Math.Pow(10, -k))];
        foreach (var separation in separations)
        {
            double[] resistances = [.. Enumerable.Range(0, stages).Select(k => 1 + (k * separation))];
            var solved = Stages(resistances);
            foreach (var (i, time) in Times.Index())
            {
                Close.Within(
                    Close.Computed, Series(resistances, time), solved.Sample($"voltage of n{stages}", i));
            }
        }
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(6)]
    public void Poles_that_coincide_are_shown_as_one(int stages)
    {
        var pole = Assert.Single(Stages([.. Enumerable.Repeat(1.0, stages)]).Poles());
        Assert.Equal((0, stages), (pole.Im, pole.Multiplicity));
        Close.To(-1, pole.Re);
    }

    [Fact]
    public void Two_triples_of_pole_pairs_are_right_however_near()
    {
        foreach (var separation in new[] { 0, 1e-2, 1e-5, 1e-8, 1e-11, 1e-14 })
        {
            var solved = Resonators(separation);
            foreach (var (i, time) in Times.Index())
            {
                Close.Within(Close.Computed, Resonance(separation, time), solved.Sample("voltage of c3", i));
            }
        }
    }

    private static SolvedText Stages(double[] resistances)
    {
        var stages = resistances.Select((r, i) =>
            $"""
            resistor R{i + 1} from b{i} to n{i + 1} : {r:R} Ω
            capacitor C{i + 1} from n{i + 1} to ground : 1 F
            dependent source B{i + 1} from b{i + 1} to ground : 1 times voltage of n{i + 1}
            """);
        return SolvedText.Of(
            $"""
            source E at b0 : step of 1 V
            {string.Join('\n', stages)}
            resistor End from b{resistances.Length} to ground : 1 Ω
            observe voltage of n{resistances.Length}
            until 5 s
            """,
            Times);
    }

    /// <summary>Three buffered series circuits of 0.2 Ω, 1 H and 1 F, the coils detuned.</summary>
    private static SolvedText Resonators(double separation)
    {
        var stages = Enumerable.Range(1, 3).Select(k =>
            $"""
            resistor R{k} from b{k - 1} to l{k} : 0.2 Ω
            inductor L{k} from l{k} to c{k} : {1 + (k * separation):R} H
            capacitor C{k} from c{k} to ground : 1 F
            dependent source B{k} from b{k} to ground : 1 times voltage of c{k}
            """);
        return SolvedText.Of(
            $"""
            source E at b0 : step of 1 V
            {string.Join('\n', stages)}
            resistor End from b3 to ground : 1 Ω
            observe voltage of c3
            until 5 s
            """,
            Times);
    }

    private static double Series(double[] resistances, double time)
    {
        var poles = resistances.Select(r => 1 / (decimal)r).ToArray();
        return (double)Sum(poles.Aggregate(1m, (a, b) => a * b), Denominator(poles), (decimal)time);
    }

    private static double Resonance(double separation, double time)
    {
        decimal[] denominator = [1m];
        foreach (var k in new[] { 1, 2, 3 })
        {
            var inductance = (decimal)(1 + (k * separation));
            denominator = Product(denominator, [inductance, 0.2m, 1m]); // L s² + R s + 1
        }

        var monic = denominator.Select(d => d / denominator[0]).ToArray();
        return (double)Sum(1 / denominator[0], monic, (decimal)time);
    }

    /// <summary>Coefficients of Π(s + pₖ), highest power first.</summary>
    private static decimal[] Denominator(decimal[] poles) =>
        poles.Aggregate(new[] { 1m }, (product, p) => Product(product, [1m, p]));

    private static decimal[] Product(decimal[] a, decimal[] b)
    {
        var product = new decimal[a.Length + b.Length - 1];
        for (var i = 0; i < a.Length; i++)
        {
            for (var j = 0; j < b.Length; j++)
            {
                product[i + j] += a[i] * b[j];
            }
        }

        return product;
    }

    /// <summary>The step of gain/D(s): 1/D in powers of 1/s by division, each power a power of t.</summary>
    private static decimal Sum(decimal gain, decimal[] d, decimal t)
    {
        var h = new decimal[90];
        h[0] = 1;
        var degree = d.Length - 1;
        var power = 1m;
        for (var k = 1; k <= degree; k++)
        {
            power *= t / k;
        }

        decimal sum = 0;
        for (var m = 0; m < h.Length; m++)
        {
            for (var j = 1; j <= Math.Min(m, degree); j++)
            {
                h[m] -= d[j] * h[m - j];
            }

            sum += h[m] * power;
            power *= t / (degree + m + 1);
        }

        return gain * sum;
    }
}
