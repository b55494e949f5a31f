using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Overlays;

/// <summary>The residuals of all records by all unknowns: each record's own offset, gain and level first,
/// then the logarithms of the values over their nominal ones.</summary>
internal sealed class FitSystem(
    IReadOnlyList<FittedRecord> records, double[] nominal, CancellationToken cancellation)
{
    private const double Believed = 1; // standard deviation of a logarithm while only the beginning is seen
    private const double Farthest = 16; // logarithm: a factor of nine million either way

    /// <summary>How many unknowns stand before the values.</summary>
    public int OwnCount => records.Sum(r => r.OwnCount);

    /// <summary>The samples that take part, of each record.</summary>
    public RecordSamples[] Seen { get; private set; } = [];

    /// <summary>How often the circuits were solved.</summary>
    public int Steps { get; private set; }

    /// <summary>Whether values are held near their nominal ones.</summary>
    public bool IsHeld { get; set; }

    /// <summary>Chooses the samples within a part of the study.</summary>
    public void Look(double[] x, double from, double until)
    {
        Seen = [.. records.Select((r, i) =>
        {
            var offset = r.Own(OwnOf(x, i)).Offset;
            return r.Samples.Between(offset + from, offset + until);
        })];
    }

    /// <summary>The values at x.</summary>
    public double[] Values(double[] x) =>
        [.. nominal.Select((p, k) => p * Math.Exp(x[OwnCount + k]))];

    /// <summary>The linearised residuals, in units of each record's noise; null where a circuit has no
    /// solution.</summary>
    public RowTriangle? Linearise(double[] x)
    {
        cancellation.ThrowIfCancellationRequested();
        if (x.AsSpan(OwnCount).ToArray().Any(u => !(Math.Abs(u) <= Farthest)))
        {
            return null;
        }

        Steps++;
        var values = Values(x);
        var evaluated = new (double[] Values, double[] Rates, double[] Slopes)?[records.Count];
        Parallel.For(0, records.Count, i => evaluated[i] = records[i].Evaluate(
            values, Seen[i], records[i].Own(OwnOf(x, i)).Offset, cancellation));
        var triangle = new RowTriangle(x.Length);
        var place = 0;
        for (var i = 0; i < records.Count; i++)
        {
            if (evaluated[i] is not var (at, rates, slopes))
            {
                return null;
            }

            AddRows(triangle, x, i, place, at, rates, slopes, values);
            place += records[i].OwnCount;
        }

        for (var k = OwnCount; k < x.Length && IsHeld; k++)
        {
            var row = new double[x.Length];
            row[k] = 1 / Believed;
            triangle.Add(row, x[k] / Believed);
        }

        return triangle.Reduced();
    }

    private void AddRows(
        RowTriangle triangle, double[] x, int index, int place, double[] at, double[] rates,
        double[] slopes, double[] values)
    {
        var record = records[index];
        var (_, gain, level) = record.Own(OwnOf(x, index));
        var row = new double[x.Length];
        var weight = 1 / record.Noise;
        var count = values.Length;
        for (var k = 0; k < at.Length; k++)
        {
            var n = place;
            if (record.Placed.Given.Offset is null)
            {
                row[n++] = -weight * gain * rates[k];
            }

            if (record.Placed.Given.Gain is null)
            {
                row[n++] = weight * at[k];
            }

            if (record.Placed.Given.Level is null)
            {
                row[n] = weight;
            }

            for (var v = 0; v < count; v++)
            {
                row[OwnCount + v] = weight * gain * slopes[(k * count) + v] * values[v];
            }

            triangle.Add(row, weight * (level + (gain * at[k]) - Seen[index].Values[k]));
        }
    }

    private ReadOnlySpan<double> OwnOf(double[] x, int index)
    {
        var place = records.Take(index).Sum(r => r.OwnCount);
        return x.AsSpan(place, records[index].OwnCount);
    }
}
