using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Checks;

/// <summary>How large quantities get over the study: what their errors are measured by. A quantity that is
/// zero but for rounding is measured by a trace of the largest of its kind.</summary>
internal sealed class StudySizes
{
    private const double Trace = 1e-15; // rounding of double precision
    private const double Cancelled = 1e-6; // of modes that cancel: their rounding is then 1e-10 of the size

    private readonly CurveBuilder curves;
    private readonly Dictionary<Measurand, double> sizes = [];
    private readonly double largestVoltage;
    private readonly double largestCurrent;

    public StudySizes(CurveBuilder curves)
    {
        this.curves = curves;
        var parts = Enumerable.Range(0, curves.Solution.Circuit.Parts.Length).ToArray();
        largestVoltage = parts.Max(i => Largest(new VoltageAcross(i)));
        largestCurrent = parts.Max(i => Largest(new CurrentThrough(i)));
    }

    /// <summary>The size of a voltage or current.</summary>
    public double Of(Measurand quantity)
    {
        if (!sizes.TryGetValue(quantity, out var size))
        {
            var floor = Trace * (quantity is CurrentThrough ? largestCurrent : largestVoltage);
            size = Math.Max(Largest(quantity), floor);
            sizes.Add(quantity, size);
        }

        return size;
    }

    private double Largest(Measurand quantity)
    {
        double largest = 0;
        foreach (var table in curves.Tables)
        {
            if (table.Segment.Coefficients(quantity) is { } coefficients)
            {
                var piece = new LinearPiece(table, coefficients);
                var envelope = new double[coefficients.Length];
                table.Segment.Basis.Envelope(0, table.Segment.Length, envelope);
                largest = Math.Max(largest, Cancelled * piece.MagnitudeWithin(envelope));
                foreach (var value in piece.Tabulated)
                {
                    largest = Math.Max(largest, Math.Abs(value));
                }
            }
        }

        return largest;
    }
}
