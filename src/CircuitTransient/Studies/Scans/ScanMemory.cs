using System.Collections.Concurrent;
using System.Collections.Immutable;
using System.Runtime.InteropServices;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>What a scan has solved so far, its points and its looks between them. A scan that was stopped
/// goes on from there: of the same plan, what is remembered is to the bit what would be solved
/// again.</summary>
public sealed class ScanMemory
{
    private const int MostLooks = 500_000; // some 50 MB; further ones are made again

    private readonly ConcurrentDictionary<Place, ScanPoint> points = [];
    private readonly ConcurrentDictionary<Place, SlopedSample> looks = [];
    private int lookCount;

    /// <summary>How many points are remembered.</summary>
    public int PointCount => points.Count;

    /// <summary>How many looks between points are remembered.</summary>
    public int LookCount => looks.Count;

    /// <summary>Writes all of it.</summary>
    public void Save(BinaryWriter to)
    {
        var (solved, looked) = (points.ToArray(), looks.ToArray());
        to.Write(solved.Length);
        foreach (var (place, point) in solved)
        {
            place.Write(to);
            Write(to, point);
        }

        to.Write(looked.Length);
        foreach (var (place, sample) in looked)
        {
            place.Write(to);
            to.Write(sample.X);
            to.Write(sample.Y);
            to.Write(sample.Slope);
        }
    }

    /// <summary>Remembers what <see cref="Save"/> wrote of a scan of the same plan.</summary>
    public void Load(BinaryReader from)
    {
        for (var left = from.ReadInt32(); left > 0; left--)
        {
            points[Place.Read(from)] = ReadPoint(from);
        }

        for (var left = from.ReadInt32(); left > 0; left--, lookCount++)
        {
            looks[Place.Read(from)] =
                new SlopedSample(from.ReadDouble(), from.ReadDouble(), from.ReadDouble());
        }
    }

    /// <summary>A point that is remembered; else null.</summary>
    /// <param name="values">A value for each that varies; three at most.</param>
    /// <param name="axis">The value whose slopes are wanted; −1 for none.</param>
    internal ScanPoint? Point(double[] values, int axis) =>
        points.GetValueOrDefault(Place.Of(values, axis, 0));

    /// <summary>Remembers a point.</summary>
    internal void Keep(double[] values, int axis, ScanPoint point) =>
        points[Place.Of(values, axis, 0)] = point;

    /// <summary>A look that is remembered, or is made now.</summary>
    /// <param name="values">A value for each that varies; three at most.</param>
    /// <param name="axis">Along which of them.</param>
    /// <param name="figure">What is looked at.</param>
    /// <param name="look">Makes it.</param>
    internal SlopedSample Look(double[] values, int axis, int figure, Func<SlopedSample> look)
    {
        var place = Place.Of(values, axis, figure);
        if (looks.TryGetValue(place, out var known))
        {
            return known;
        }

        var sample = look();
        if (Interlocked.Increment(ref lookCount) <= MostLooks)
        {
            looks[place] = sample;
        }

        return sample;
    }

    private static void Write(BinaryWriter to, ScanPoint point)
    {
        Write(to, point.At);
        to.Write(point.Trouble is not null);
        if (point.Trouble is { } trouble)
        {
            to.Write(trouble);
        }

        to.Write(point.Found is not null);
        if (point.Found is { } found)
        {
            Write(to, found.Values);
            Write(to, found.Times);
        }

        Write(to, point.Slopes);
        Write(to, point.LinearUsed);
    }

    private static ScanPoint ReadPoint(BinaryReader from)
    {
        var at = ReadNumbers(from);
        var trouble = from.ReadBoolean() ? from.ReadString() : null;
        var found = from.ReadBoolean() ? new StudyPoint(ReadOptional(from), ReadOptional(from)) : null;
        return new ScanPoint(at, found, ReadNumbers(from), trouble) { LinearUsed = ReadNumbers(from) };
    }

    private static void Write(BinaryWriter to, ImmutableArray<double> numbers)
    {
        // In one piece each: a hundred thousand points are to be written within the grace of an interrupt.
        to.Write(numbers.Length);
        to.Write(MemoryMarshal.AsBytes(numbers.AsSpan()));
    }

    private static void Write(BinaryWriter to, ImmutableArray<double?> numbers)
    {
        Write(to, [.. numbers.Select(number => number ?? 0)]);
        to.Write(numbers.Select(number => number.HasValue ? (byte)1 : (byte)0).ToArray());
    }

    private static ImmutableArray<double> ReadNumbers(BinaryReader from)
    {
        var numbers = new double[from.ReadInt32()];
        from.BaseStream.ReadExactly(MemoryMarshal.AsBytes(numbers.AsSpan()));
        return ImmutableCollectionsMarshal.AsImmutableArray(numbers);
    }

    private static ImmutableArray<double?> ReadOptional(BinaryReader from)
    {
        var numbers = ReadNumbers(from);
        var isThere = from.ReadBytes(numbers.Length);
        return [.. numbers.Select((number, i) => isThere[i] == 1 ? number : (double?)null)];
    }

    private readonly record struct Place(int Axis, int Figure, double First, double Second, double Third)
    {
        public static Place Of(ReadOnlySpan<double> values, int axis, int figure) => new(
            axis, figure, values[0], values.Length > 1 ? values[1] : 0, values.Length > 2 ? values[2] : 0);

        public static Place Read(BinaryReader from) => new(
            from.ReadInt32(), from.ReadInt32(), from.ReadDouble(), from.ReadDouble(), from.ReadDouble());

        public void Write(BinaryWriter to)
        {
            to.Write(Axis);
            to.Write(Figure);
            to.Write(First);
            to.Write(Second);
            to.Write(Third);
        }
    }
}
