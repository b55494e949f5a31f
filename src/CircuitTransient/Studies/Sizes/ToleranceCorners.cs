using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>The corners of the tolerances of a varied circuit: every value that has one at its lowest or
/// highest. That of a sized part moves with its value, in proportion.</summary>
public sealed class ToleranceCorners
{
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

    /// <summary>The values at a corner, or with everything else nominal where it is null.</summary>
    public double[] Values(ReadOnlySpan<double> sized, UInt128? corner)
    {
        var values = new double[varied.Values.Length];
        for (var i = 0; i < values.Length; i++)
        {
            values[i] = i < sizedCount ? sized[i] : varied.Values[i].Nominal;
        }

        for (var i = 0; corner is { } highest && i < Toleranced.Length; i++)
        {
            Put(values, sized, i, ((highest >> i) & 1) == 1);
        }

        return values;
    }

    /// <summary>The values with one of <see cref="Toleranced"/> at a limit, all else nominal.</summary>
    public double[] Alone(ReadOnlySpan<double> sized, int index, bool isHighest)
    {
        var values = Values(sized, null);
        Put(values, sized, index, isHighest);
        return values;
    }

    /// <summary>A corner in words: <c>Vdc +10 %, Csn -10 %</c> by names and signs.</summary>
    public ImmutableArray<(string Name, bool IsHighest)> Names(UInt128 corner) =>
        [.. Toleranced.Select((place, i) => (varied.Values[place].Name, ((corner >> i) & 1) == 1))];

    private void Put(double[] values, ReadOnlySpan<double> sized, int index, bool isHighest)
    {
        var place = Toleranced[index];
        var tolerance = varied.Values[place].Tolerance!;
        var limit = isHighest ? tolerance.Highest : tolerance.Lowest;
        values[place] = place < sizedCount
            ? sized[place] * (limit / varied.Values[place].Nominal)
            : limit;
    }
}
