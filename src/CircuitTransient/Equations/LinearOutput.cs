using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>A voltage or current as a linear function of the state and the inputs:
/// y = c z + d₀ u + d₁ u′ + …, where a stored quantity's input is an impulse at the interval's
/// start.</summary>
/// <param name="State">c, one for each state variable.</param>
/// <param name="Direct">d₀, d₁, …, each one for each input.</param>
/// <param name="Open">How it goes with each direction that the equations leave open.</param>
public sealed record LinearOutput(DoubleDouble[] State, DoubleDouble[][] Direct, DoubleDouble[] Open)
{
    /// <summary>Whether the equations fix it.</summary>
    public bool IsDetermined => Array.TrueForAll(Open, x => Math.Abs(x.Hi) <= SparseVector.Cancelled);

    /// <summary>a y₁ + b y₂.</summary>
    public static LinearOutput Combine(DoubleDouble a, LinearOutput first, DoubleDouble b,
        LinearOutput second)
    {
        var direct = new DoubleDouble[Math.Max(first.Direct.Length, second.Direct.Length)][];
        for (var k = 0; k < direct.Length; k++)
        {
            direct[k] = k >= first.Direct.Length ? Scale(b, second.Direct[k])
                : k >= second.Direct.Length ? Scale(a, first.Direct[k])
                : Sum(a, first.Direct[k], b, second.Direct[k]);
        }

        return new LinearOutput(
            Sum(a, first.State, b, second.State), direct, Sum(a, first.Open, b, second.Open));
    }

    private static DoubleDouble[] Scale(DoubleDouble a, DoubleDouble[] x)
    {
        var y = new DoubleDouble[x.Length];
        for (var i = 0; i < x.Length; i++)
        {
            y[i] = a * x[i];
        }

        return y;
    }

    private static DoubleDouble[] Sum(DoubleDouble a, DoubleDouble[] x, DoubleDouble b, DoubleDouble[] y)
    {
        var z = new DoubleDouble[x.Length];
        for (var i = 0; i < x.Length; i++)
        {
            z[i] = (a * x[i]) + (b * y[i]);
        }

        return z;
    }
}
