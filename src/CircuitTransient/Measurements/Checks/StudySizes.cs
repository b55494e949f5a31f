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
    private readonly bool isStill;

    public StudySizes(CurveBuilder curves)
    {
        this.curves = curves;
        var parts = Enumerable.Range(0, curves.Solution.Circuit.Parts.Length).ToArray();
        largestVoltage = parts.Max(i => Largest(new VoltageAcross(i)));
        largestCurrent = parts.Max(i => Largest(new CurrentThrough(i)));
        const double noise = 1e-13; // of what the voltages could drive through the greatest resistance
        var resistors = curves.Solution.Circuit.Parts.OfType<Resistor>().ToArray();
        isStill = resistors.Length > 0 && largestCurrent
            <= noise * largestVoltage / resistors.Max(r => Math.Abs(r.Resistance.Nominal));
    }

    /// <summary>The size of a voltage or current; zero where nothing but rounding flows anywhere.</summary>
    public double Of(Measurand quantity)
    {
        if (isStill && quantity is CurrentThrough)
        {
            return 0;
        }

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
                largest = Math.Max(largest, Cancelled * piece.Bounds(envelope).Value);
                foreach (var value in piece.Tabulated)
                {
                    largest = Math.Max(largest, Math.Abs(value));
                }
            }
        }

        return largest;
    }
}
