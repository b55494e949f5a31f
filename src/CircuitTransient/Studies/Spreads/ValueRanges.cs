using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The ranges of the varied values: a box with corners.</summary>
internal sealed class ValueRanges(ImmutableArray<VariedValue> values)
{
    public int Count => values.Length;

    public double[] Nominal { get; } = [.. values.Select(v => v.Nominal)];

    public double Lowest(int value) => values[value].Tolerance!.Lowest;

    public double Highest(int value) => values[value].Tolerance!.Highest;

    public double Width(int value) => Highest(value) - Lowest(value);

    /// <summary>Whether every value stands at an end of its range or at its nominal place.</summary>
    public bool IsCorner(ReadOnlySpan<double> point)
    {
        for (var i = 0; i < point.Length; i++)
        {
            if (point[i] != Lowest(i) && point[i] != Highest(i) && point[i] != Nominal[i])
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Corners, one after another; bit i of a corner's number says whether value i is at its upper
    /// end.</summary>
    public double[] Corners(long first, int count)
    {
        var points = new double[count * Count];
        for (var p = 0; p < count; p++)
        {
            for (var i = 0; i < Count; i++)
            {
                points[(p * Count) + i] = (((first + p) >> i) & 1) == 0 ? Lowest(i) : Highest(i);
            }
        }

        return points;
    }

    /// <summary>Points of the unit cube, one after another, stretched to the box.</summary>
    public double[] Stretched(double[] unit)
    {
        var points = new double[unit.Length];
        for (var j = 0; j < unit.Length; j++)
        {
            var i = j % Count;
            points[j] = Lowest(i) + (unit[j] * Width(i));
        }

        return points;
    }
}
