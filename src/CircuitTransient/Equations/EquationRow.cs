using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>One equation of (s E + G) X = Σ sᵏ Rₖ (U, x₀): a row of each matrix. The columns of Rₖ are the
/// inputs: first the sources' transforms, then the stored quantities at the interval's start (whose
/// transforms are 1).</summary>
internal sealed class EquationRow(SparseVector e, SparseVector g, SparseVector[] r, SparseVector origin)
{
    /// <summary>The row of E.</summary>
    public SparseVector E { get; private set; } = e;

    /// <summary>The row of G.</summary>
    public SparseVector G { get; private set; } = g;

    /// <summary>The rows of R₀, R₁, … ; a right side is a polynomial in s.</summary>
    public SparseVector[] R { get; private set; } = r;

    /// <summary>The written equations this row has become a sum of; empty where nobody asked.</summary>
    public SparseVector Origin { get; private set; } = origin;

    /// <summary>Whether no derivative is left in it.</summary>
    public bool IsAlgebraic => E.IsEmpty;

    /// <summary>Whether its right side is zero.</summary>
    public bool HasNoRight => Array.TrueForAll(R, v => v.IsEmpty);

    /// <summary>The row with one more input on its right side, of weight 1.</summary>
    public EquationRow WithInput(int input) => new(
        E, G,
        [SparseVector.Add(R[0], DoubleDouble.One, SparseVector.From((input, DoubleDouble.One))), .. R[1..]],
        Origin);

    /// <summary>Puts the algebraic equation <paramref name="other"/>, solved for an unknown, in the unknown's
    /// place: in the algebraic part as it is, under the derivative with its right side multiplied by
    /// s.</summary>
    public void Substitute(int unknown, EquationRow other)
    {
        var pivot = other.G.At(unknown);
        var inPlace = G.At(unknown);
        if (!inPlace.IsZero)
        {
            var f = -inPlace / pivot;
            G = SparseVector.Add(G, f, other.G).Without(unknown);
            R = AddRight(R, f, other.R, 0);
            Origin = SparseVector.Add(Origin, f, other.Origin);
        }

        var underDerivative = E.At(unknown);
        if (!underDerivative.IsZero)
        {
            var f = -underDerivative / pivot;
            E = SparseVector.Add(E, f, other.G).Without(unknown);
            R = AddRight(R, f, other.R, 1);
            Origin = SparseVector.Add(Origin, f, other.Origin);
        }
    }

    /// <summary>Subtracts a multiple of another row so that an unknown leaves E.</summary>
    public void ClearDerivative(int unknown, EquationRow other)
    {
        var value = E.At(unknown);
        if (!value.IsZero)
        {
            var f = -value / other.E.At(unknown);
            E = SparseVector.Add(E, f, other.E).Without(unknown);
            G = SparseVector.Add(G, f, other.G);
            R = AddRight(R, f, other.R, 0);
            Origin = SparseVector.Add(Origin, f, other.Origin);
        }
    }

    private static SparseVector[] AddRight(SparseVector[] a, DoubleDouble f, SparseVector[] b, int shift)
    {
        var length = Math.Max(a.Length, b.Length + shift);
        var sum = new SparseVector[length];
        for (var k = 0; k < length; k++)
        {
            var own = k < a.Length ? a[k] : SparseVector.Empty;
            var added = k - shift >= 0 && k - shift < b.Length ? b[k - shift] : SparseVector.Empty;
            sum[k] = SparseVector.Add(own, f, added);
        }

        while (length > 1 && sum[length - 1].IsEmpty)
        {
            length--;
        }

        return sum[..length];
    }
}
