using CircuitTransient.Studies.Records;

namespace CircuitTransient.Studies.Overlays;

/// <summary>The samples of a record that are compared.</summary>
/// <param name="Times">Instants in seconds, ascending.</param>
/// <param name="Values">In SI.</param>
internal sealed record RecordSamples(double[] Times, double[] Values)
{
    public int Count => Times.Length;

    /// <summary>All samples of a record but those marked.</summary>
    public static RecordSamples Of(OscilloscopeRecord record, bool[]? isLeftOut)
    {
        if (isLeftOut is null)
        {
            return new RecordSamples(record.Times, record.Values);
        }

        var kept = isLeftOut.Count(left => !left);
        var (times, values) = (new double[kept], new double[kept]);
        for (int i = 0, k = 0; i < isLeftOut.Length; i++)
        {
            if (!isLeftOut[i])
            {
                (times[k], values[k++]) = (record.Times[i], record.Values[i]);
            }
        }

        return new RecordSamples(times, values);
    }

    /// <summary>At most so many samples, evenly chosen.</summary>
    public RecordSamples Thinned(int most)
    {
        if (Count <= most)
        {
            return this;
        }

        var stride = (Count + most - 1) / most;
        var kept = (Count + stride - 1) / stride;
        var (times, values) = (new double[kept], new double[kept]);
        for (var k = 0; k < kept; k++)
        {
            (times[k], values[k]) = (Times[k * stride], Values[k * stride]);
        }

        return new RecordSamples(times, values);
    }

    /// <summary>The samples from one instant to another, both included.</summary>
    public RecordSamples Between(double from, double until)
    {
        var first = Times.AsSpan().BinarySearch(from);
        first = first < 0 ? ~first : first;
        while (first > 0 && Times[first - 1] == from)
        {
            first--;
        }

        var end = first;
        var last = Times.AsSpan(first).BinarySearch(until);
        end = last < 0 ? first + ~last : first + last + 1;
        while (end < Count && Times[end] == until)
        {
            end++;
        }

        return first == 0 && end == Count ? this : new RecordSamples(Times[first..end], Values[first..end]);
    }
}
