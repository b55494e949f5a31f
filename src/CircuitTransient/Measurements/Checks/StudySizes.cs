using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Checks;

/// <summary>How large quantities get over the study: what their errors are measured by. A quantity that is
/// zero but for rounding is measured by a trace of the largest of its kind.</summary>
internal sealed class StudySizes
{
    // What lies so far below the largest of its kind is judged by its share in that: an error of 1e-9 of this
    // trace is a thousandth of the rounding of the largest value itself.
    private const double Trace = 1e-10;

    private const double Cancelled = 1e-6; // of modes that cancel: their rounding is then 1e-10 of the size

    private readonly CurveBuilder curves;
    private readonly Dictionary<Measurand, double> sizes = [];
    private readonly double[][][] between;
    private readonly double largestVoltage;
    private readonly double largestCurrent;
    private readonly bool isStill;

    public StudySizes(CurveBuilder curves)
    {
        this.curves = curves;
        between = [.. curves.Tables.Select(t => FunctionsBetween(t.Segment))];
        var parts = Enumerable.Range(0, curves.Solution.Circuit.Parts.Length).ToArray();
        largestVoltage = parts.Max(i => Largest(new VoltageAcross(i)));
        largestCurrent = parts.Max(i => Largest(new CurrentThrough(i)));
        const double noise = 1e-13; // of what the voltages could drive through the greatest resistance
        var resistors = curves.Solution.Circuit.Parts.OfType<Resistor>().ToArray();
        isStill = resistors.Length > 0 && largestCurrent
            <= noise * largestVoltage / resistors.Max(r => Math.Abs(r.Resistance.Nominal));
    }

    /// <summary>A difference over what it is measured by; no size excuses none.</summary>
    public static double Relative(double difference, double size) =>
        difference == 0 ? 0 : size == 0 ? double.PositiveInfinity : difference / size;

    /// <summary>The trace that structure leaves in rates of change: a voltage or current that is zero keeps
    /// <see cref="Equations.SparseVector.Cancelled"/> of the largest, and the fastest mode multiplies
    /// that.</summary>
    public double RateTrace(bool isCurrent) => Equations.SparseVector.Cancelled
        * (isCurrent ? largestCurrent : largestVoltage)
        * curves.Tables.SelectMany(t => t.Segment.Basis.Modes).Select(m => m.Speed).DefaultIfEmpty(0).Max();

    /// <summary>The size of a voltage or current; where nothing but rounding flows anywhere, a current's is a
    /// trace of what the voltages could drive.</summary>
    public double Of(Measurand quantity)
    {
        if (isStill && quantity is CurrentThrough)
        {
            return Cancelled * Conceivable(isCurrent: true);
        }

        if (!sizes.TryGetValue(quantity, out var size))
        {
            var floor = Trace * (quantity is CurrentThrough ? largestCurrent : largestVoltage);
            size = Math.Max(Largest(quantity), floor);
            size = size == 0 ? Cancelled * Conceivable(quantity is CurrentThrough) : size;
            sizes.Add(quantity, size);
        }

        return size;
    }

    /// <summary>Where every current is zero but for rounding, as in a charge at rest, what the voltages could
    /// drive through the least resistance; where every voltage is, what the currents could raise.</summary>
    private double Conceivable(bool isCurrent)
    {
        var resistances = curves.Solution.Circuit.Parts.OfType<Resistor>()
            .Select(r => Math.Abs(r.Resistance.Nominal)).DefaultIfEmpty(1).ToArray();
        return isCurrent ? largestVoltage / resistances.Min() : largestCurrent * resistances.Max();
    }

    private double Largest(Measurand quantity)
    {
        double largest = 0;
        for (var s = 0; s < curves.Tables.Length; s++)
        {
            var table = curves.Tables[s];
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

                foreach (var functions in between[s])
                {
                    largest = Math.Max(largest, Math.Abs(piece.ValueAt(0, functions)));
                }
            }
        }

        return largest;
    }

    /// <summary>The functions at golden parts of a segment: tabulated instants may all be zeros of a
    /// sine.</summary>
    private static double[][] FunctionsBetween(Segment segment)
    {
        const double golden = 0.6180339887498949;
        const int count = 8;
        var functions = new double[count][];
        for (var k = 0; k < count; k++)
        {
            functions[k] = new double[segment.Basis.Width];
            segment.Basis.Evaluate(golden * (k + 1) % 1 * segment.Length, functions[k]);
        }

        return functions;
    }
}
