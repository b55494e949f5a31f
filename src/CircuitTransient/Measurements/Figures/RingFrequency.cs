using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Figures;

/// <summary>The frequency a waveform rings at.</summary>
internal static class RingFrequency
{
    /// <summary>How it is defined, in words.</summary>
    public const string Definition =
        "imaginary part over 2π of the network's complex mode with the largest amplitude in it, in the "
        + "interval of its peak";

    /// <summary>Reads it, in hertz; null where no mode of the network rings in it.</summary>
    public static FigureReading Of(WindowedCurve curve)
    {
        var segment = curve.PeakPiece.Segment;
        var modes = segment.Basis.Modes;
        var envelope = new double[segment.Basis.Width];
        segment.Basis.Envelope(0, segment.Length, envelope);
        const double rounding = 1e-12; // of the waveform's own size
        var (largest, frequency) = (rounding * Size(curve.PeakPiece, envelope), 0.0);
        for (var m = 0; m < modes.Length; m++)
        {
            for (var row = 0; row < modes[m].Rows && modes[m].Kind != ModeKind.Forced; row++)
            {
                var (amplitude, turning) = (
                    Amplitude(curve.PeakPiece, m, row, envelope),
                    Math.Abs(modes[m].Rounded[row, row].Imaginary));
                if (turning > 0 && amplitude > largest)
                {
                    (largest, frequency) = (amplitude, turning / (2 * Math.PI));
                }
            }
        }

        return frequency > 0 ? new FigureReading(frequency, curve.Peak.Time) : FigureReading.None(curve);
    }

    /// <summary>A bound of what the functions of one row of a mode amount to in a piece.</summary>
    private static double Amplitude(CurvePiece piece, int mode, int row, double[] envelope) => piece switch
    {
        LinearPiece linear => OfRow(linear, mode, row, envelope),
        QuadraticPiece quadratic => quadratic.Terms.Sum(t => Math.Abs(t.Factor)
            * ((OfRow(t.First, mode, row, envelope) * Size(t.Second, envelope))
                + (OfRow(t.Second, mode, row, envelope) * Size(t.First, envelope)))),
        AccumulatedPiece accumulated => Amplitude(accumulated.Rate, mode, row, envelope),
        _ => 0,
    };

    private static double OfRow(LinearPiece piece, int m, int row, double[] envelope)
    {
        var basis = piece.Segment.Basis;
        var mode = basis.Modes[m];
        double sum = 0;
        for (var column = row; column < mode.Order; column++)
        {
            var carrier = mode.Carrier(row, column);
            var place = basis.Place(m) + (mode.IsReal ? carrier : 2 * carrier);
            sum += basis.Coefficient(piece.Coefficients, m, carrier).Magnitude * envelope[place];
        }

        return sum;
    }

    private static double Size(CurvePiece piece, double[] envelope) => piece switch
    {
        LinearPiece linear => linear.MagnitudeWithin(envelope),
        QuadraticPiece quadratic => quadratic.MagnitudeWithin(envelope),
        AccumulatedPiece accumulated => accumulated.Rate.MagnitudeWithin(envelope),
        _ => 0,
    };
}
