using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>The corners of the tolerances of a varied circuit: every value that has one at its lowest or
/// highest. That of a sized part moves with its value, in proportion.</summary>
public sealed class ToleranceCorners
{
    /// <summary>With more tolerances than this, corners are picked one value at a time.</summary>
    public const int MostComplete = 10;

    private readonly VariedCircuit varied;
    private readonly int sizedCount;

    /// <summary>The corners of a circuit whose first values are the sized ones.</summary>
    public ToleranceCorners(VariedCircuit varied, int sizedCount)
    {
        this.varied = varied;
        this.sizedCount = sizedCount;
        Toleranced =
        [
            .. Enumerable.Range(0, varied.Values.Length)
                .Where(i => varied.Values[i].Tolerance is { } t && t.Highest > t.Lowest),
        ];
    }

    /// <summary>The values that have a tolerance, by their places.</summary>
    public ImmutableArray<int> Toleranced { get; }

    /// <summary>Whether <see cref="All"/> are all there are.</summary>
    public bool IsComplete => Toleranced.Length <= MostComplete;

    /// <summary>Every corner, each the set of values at their highest; with too many tolerances only those
    /// with one value away from all others.</summary>
    public ImmutableArray<UInt128> All => IsComplete
        ? [.. Enumerable.Range(0, 1 << Toleranced.Length).Select(i => (UInt128)i)]
        : [.. Enumerable.Range(0, Toleranced.Length).SelectMany(OneAway)];

    /// <summary>The values at a corner, or with everything else nominal where it is null.</summary>
    public double[] Values(ReadOnlySpan<double> sized, UInt128? corner)
    {
        var values = new double[varied.Values.Length];
        for (var i = 0; i < values.Length; i++)
        {
            values[i] = i < sizedCount ? sized[i] : varied.Values[i].Nominal;
        }

        if (corner is { } highest)
        {
            for (var i = 0; i < Toleranced.Length; i++)
            {
                var place = Toleranced[i];
                var tolerance = varied.Values[place].Tolerance!;
                var limit = ((highest >> i) & 1) == 1 ? tolerance.Highest : tolerance.Lowest;
                values[place] = place < sizedCount
                    ? sized[place] * (limit / varied.Values[place].Nominal)
                    : limit;
            }
        }

        return values;
    }

    /// <summary>A corner in words: <c>Vdc +10 %, Csn -10 %</c> by names and signs.</summary>
    public ImmutableArray<(string Name, bool IsHighest)> Names(UInt128 corner) =>
        [.. Toleranced.Select((place, i) => (varied.Values[place].Name, ((corner >> i) & 1) == 1))];

    private IEnumerable<UInt128> OneAway(int place)
    {
        var all = (UInt128.One << Math.Min(Toleranced.Length, 127)) - 1;
        var one = UInt128.One << Math.Min(place, 127);
        return [one, all ^ one];
    }
}
