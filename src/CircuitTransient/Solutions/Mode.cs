using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>What a mode comes from.</summary>
public enum ModeKind
{
    /// <summary>A pole, or a block of poles, of the network.</summary>
    Pole,

    /// <summary>An exponent of the sources: a constant, a ramp, a sine, a decay.</summary>
    Forced,

    /// <summary>A pole so near an exponent of the sources, over the segment, that the two are kept
    /// together.</summary>
    Joined,
}

/// <summary>A group of functions of time that belong together: the upper triangle of the first rows of exp(T
/// τ), for a small upper triangular T. They are closed under differentiation, X′ = X T, and stay accurate
/// however near the diagonal elements of T are to each other.</summary>
public sealed class Mode
{
    private readonly DoubleDoubleComplex[,] t;
    private readonly Complex[,] rounded;
    private readonly BlockExponential? exponential;

    /// <summary>Takes the triangle.</summary>
    public Mode(ModeKind kind, DoubleDoubleComplex[,] triangle, int rows, int block)
    {
        Kind = kind;
        t = triangle;
        Order = triangle.GetLength(0);
        Rows = rows;
        Block = block;
        rounded = new Complex[Order, Order];
        IsReal = true;
        for (var i = 0; i < Order; i++)
        {
            for (var j = i; j < Order; j++)
            {
                rounded[i, j] = (Complex)t[i, j];
                IsReal &= t[i, j].Im.IsZero;
            }
        }

        for (var i = 0; i < Order; i++)
        {
            Speed = Math.Max(Speed, rounded[i, i].Magnitude);
            Decay = Math.Min(Decay, -rounded[i, i].Real);
        }

        for (var i = 0; i < rows; i++)
        {
            CarrierCount += Order - i;
        }

        if (Order > 1 && (kind == ModeKind.Pole || (kind == ModeKind.Joined && rows > 1)))
        {
            exponential = new BlockExponential(DoubleDoubleComplexMatrix.From(triangle));
        }
    }

    /// <summary>What it comes from.</summary>
    public ModeKind Kind { get; }

    /// <summary>Index of the network's spectral block; −1 for a forced mode.</summary>
    public int Block { get; }

    /// <summary>Rows and columns of T.</summary>
    public int Order { get; }

    /// <summary>How many rows of exp(T τ) count.</summary>
    public int Rows { get; }

    /// <summary>Whether T is real, so that the functions are.</summary>
    public bool IsReal { get; }

    /// <summary>How many functions there are.</summary>
    public int CarrierCount { get; }

    /// <summary>How many real numbers hold them at an instant.</summary>
    public int Width => IsReal ? CarrierCount : 2 * CarrierCount;

    /// <summary>T.</summary>
    public DoubleDoubleComplex[,] Triangle => t;

    /// <summary>T in double precision.</summary>
    public Complex[,] Rounded => rounded;

    /// <summary>exp(T τ) made ready for many instants; null where a chain's own series serves.</summary>
    public BlockExponential? Exponential => exponential;

    /// <summary>The place of the function in row i and column j ≥ i.</summary>
    public int Carrier(int i, int j) => (i * Order) - (i * (i - 1) / 2) + j - i;

    /// <summary>The fastest rate in it, 1/s.</summary>
    public double Speed { get; }

    /// <summary>The slowest decay in it, 1/s; negative where it grows.</summary>
    public double Decay { get; } = double.PositiveInfinity;
}
