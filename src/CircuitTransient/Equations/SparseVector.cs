using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>One non-zero of a sparse vector.</summary>
/// <param name="Index">Its place.</param>
/// <param name="Value">Its value.</param>
/// <param name="Scale">The largest magnitude that went into the value: what a cancellation is judged
/// against.</param>
public readonly record struct Term(int Index, DoubleDouble Value, double Scale);

/// <summary>A sparse vector, its terms sorted by index. A sum that cancels to below <see cref="Cancelled"/>
/// of what went into it is an exact zero of the network's structure and is dropped.</summary>
public sealed class SparseVector
{
    /// <summary>2⁻⁸⁶: far above the rounding of double-double (2⁻¹⁰⁴), far below any ratio of real
    /// parts.</summary>
    public const double Cancelled = 1.3e-26;

    private readonly Term[] terms;

    /// <summary>Takes terms that are sorted by index.</summary>
    public SparseVector(params Term[] terms) => this.terms = terms;

    /// <summary>The vector without terms.</summary>
    public static SparseVector Empty { get; } = new();

    /// <summary>The terms in order.</summary>
    public ReadOnlySpan<Term> Terms => terms;

    /// <summary>How many terms there are.</summary>
    public int Count => terms.Length;

    /// <summary>Whether there is no term.</summary>
    public bool IsEmpty => terms.Length == 0;

    /// <summary>Adds up entries in any order; entries at one index are summed.</summary>
    public static SparseVector From(params IEnumerable<(int Index, DoubleDouble Value)> entries)
    {
        var sum = Empty;
        foreach (var (index, value) in entries)
        {
            if (!value.IsZero)
            {
                sum = Add(sum, DoubleDouble.One,
                    new SparseVector(new Term(index, value, Math.Abs(value.Hi))));
            }
        }

        return sum;
    }

    /// <summary>a + f b.</summary>
    public static SparseVector Add(SparseVector a, DoubleDouble f, SparseVector b)
    {
        if (b.IsEmpty)
        {
            return a;
        }

        var magnitude = Math.Abs(f.Hi);
        var merged = new Term[a.Count + b.Count];
        int i = 0, j = 0, count = 0;
        while (i < a.Count || j < b.Count)
        {
            if (j == b.Count || (i < a.Count && a.terms[i].Index < b.terms[j].Index))
            {
                merged[count++] = a.terms[i++];
            }
            else if (i == a.Count || b.terms[j].Index < a.terms[i].Index)
            {
                var t = b.terms[j++];
                merged[count++] = new Term(t.Index, f * t.Value, magnitude * t.Scale);
            }
            else
            {
                var t = b.terms[j++];
                var value = a.terms[i].Value + (f * t.Value);
                var scale = Math.Max(a.terms[i].Scale, magnitude * t.Scale);
                if (Math.Abs(value.Hi) > Cancelled * scale)
                {
                    merged[count++] = new Term(t.Index, value, scale);
                }

                i++;
            }
        }

        return new SparseVector(count == merged.Length ? merged : merged[..count]);
    }

    /// <summary>f a.</summary>
    public SparseVector Times(DoubleDouble f) => Add(Empty, f, this);

    /// <summary>The vector without the term at an index.</summary>
    public SparseVector Without(int index) => new([.. terms.Where(t => t.Index != index)]);

    /// <summary>The value at an index; zero where no term stands.</summary>
    public DoubleDouble At(int index)
    {
        int low = 0, high = terms.Length - 1;
        while (low <= high)
        {
            var middle = (low + high) >>> 1;
            if (terms[middle].Index == index)
            {
                return terms[middle].Value;
            }

            if (terms[middle].Index < index)
            {
                low = middle + 1;
            }
            else
            {
                high = middle - 1;
            }
        }

        return DoubleDouble.Zero;
    }
}
