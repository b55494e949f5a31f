namespace CircuitTransient.Solutions.Curves;

/// <summary>A curve about the middle of a stretch: x(τ + s h) = Σ tₖ sᵏ + remainder, |s| ≤ 1. Sums of modes
/// that nearly cancel, as at a quiet node of a long ladder, cancel in the terms too, where bounds of each
/// mode's amplitude do not.</summary>
/// <param name="terms">t₀, t₁, …</param>
public ref struct Expansion(Span<double> terms)
{
    /// <summary>How many terms there are.</summary>
    public const int Order = 12;

    /// <summary>The terms.</summary>
    public Span<double> Terms { get; } = terms;

    /// <summary>A bound of the remainder.</summary>
    public double Rest { get; private set; }

    /// <summary>A bound of the remainder's slope with respect to s.</summary>
    public double RestOfSlope { get; private set; }

    /// <summary>A bound of the remainder's second derivative with respect to s.</summary>
    public double RestOfBend { get; private set; }

    /// <summary>What rounding may blur the value by.</summary>
    public double Noise { get; private set; }

    /// <summary>A bound of the magnitude.</summary>
    public readonly double Size
    {
        get
        {
            var sum = Rest;
            foreach (var term in Terms)
            {
                sum += Math.Abs(term);
            }

            return sum;
        }
    }

    /// <summary>A bound of the magnitude of the slope.</summary>
    public readonly double SizeOfSlope => Math.Abs(Terms[1]) + ChangeOfSlope;

    /// <summary>A bound of the magnitude of the second derivative.</summary>
    public readonly double SizeOfBend => Math.Abs(2 * Terms[2]) + ChangeOfBend;

    /// <summary>By how much at most the slope differs from that in the middle.</summary>
    public readonly double ChangeOfSlope
    {
        get
        {
            var sum = RestOfSlope;
            for (var k = 2; k < Terms.Length; k++)
            {
                sum += k * Math.Abs(Terms[k]);
            }

            return sum;
        }
    }

    /// <summary>By how much at most the second derivative differs from that in the middle.</summary>
    public readonly double ChangeOfBend
    {
        get
        {
            var sum = RestOfBend;
            for (var k = 3; k < Terms.Length; k++)
            {
                sum += k * (k - 1) * Math.Abs(Terms[k]);
            }

            return sum;
        }
    }

    /// <summary>An upper bound of sign × value: an even power is never negative.</summary>
    public readonly double Upper(double sign)
    {
        var sum = (sign * Terms[0]) + Rest;
        for (var k = 1; k < Terms.Length; k++)
        {
            sum += k % 2 == 0 ? Math.Max(0, sign * Terms[k]) : Math.Abs(Terms[k]);
        }

        return sum;
    }

    /// <summary>Adds a term; one of too high a power goes to the remainder.</summary>
    public void Add(int power, double term)
    {
        if (power < Terms.Length)
        {
            Terms[power] += term;
            return;
        }

        AddRest(Math.Abs(term), power * Math.Abs(term), power * (power - 1) * Math.Abs(term));
    }

    /// <summary>Adds to the bounds of the remainder.</summary>
    public void AddRest(double value, double slope, double bend)
    {
        Rest += value;
        RestOfSlope += slope;
        RestOfBend += bend;
    }

    /// <summary>Adds to what rounding may blur the value by.</summary>
    public void AddNoise(double noise) => Noise += noise;

    /// <summary>Adds factor × a × b.</summary>
    public void AddProduct(double factor, scoped Expansion a, scoped Expansion b)
    {
        for (var i = 0; i < a.Terms.Length; i++)
        {
            for (var j = 0; j < b.Terms.Length; j++)
            {
                Add(i + j, factor * a.Terms[i] * b.Terms[j]);
            }
        }

        var f = Math.Abs(factor);
        AddRest(
            f * ((a.Rest * b.Size) + (a.Size * b.Rest)),
            f * ((a.RestOfSlope * b.Size) + (a.Rest * b.SizeOfSlope)
                + (a.SizeOfSlope * b.Rest) + (a.Size * b.RestOfSlope)),
            f * ((a.RestOfBend * b.Size) + (2 * a.RestOfSlope * b.SizeOfSlope) + (a.Rest * b.SizeOfBend)
                + (a.SizeOfBend * b.Rest) + (2 * a.SizeOfSlope * b.RestOfSlope) + (a.Size * b.RestOfBend)));
        AddNoise(f * ((a.Noise * b.Size) + (a.Size * b.Noise)));
    }
}
