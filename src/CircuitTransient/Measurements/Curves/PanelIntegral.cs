namespace CircuitTransient.Measurements.Curves;

/// <summary>The integral of a curve over a short stretch by the ten-point rule of Gauss and Legendre, in
/// panels that
/// the fastest living function crosses in at most two time constants: the rule's error is then below
/// rounding.</summary>
internal static class PanelIntegral
{
    private const int MostPanels = 200_000;

    // Abramowitz and Stegun, Handbook of Mathematical Functions, table 25.4, n = 10 (from memory; the tests
    // integrate
    // powers up to 19 exactly).
    private static ReadOnlySpan<double> Nodes =>
        [0.1488743389816312, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717];

    private static ReadOnlySpan<double> Weights =>
        [0.2955242247147529, 0.2692667193099964, 0.2190863625159820, 0.1494513491505806, 0.0666713443086881];

    public static double Of(CurvePiece curve, double from, double until)
    {
        double sum = 0;
        while (from < until)
        {
            var (stop, fastest) = Living(curve, from, until);
            var panels = (int)Math.Clamp(Math.Ceiling(fastest * (stop - from) / 2), 1, MostPanels);
            sum += Sum(curve, from, stop, panels);
            from = stop;
        }

        return sum;
    }

    private static double Sum(CurvePiece curve, double from, double until, int panels)
    {
        var half = (until - from) / (2 * panels);
        Span<double> phi = stackalloc double[256];
        var width = curve.Segment.Basis.Width;
        phi = width <= 256 ? phi[..width] : new double[width];
        double sum = 0;
        for (var p = 0; p < panels; p++)
        {
            var middle = from + (((2 * p) + 1) * half);
            for (var k = 0; k < Nodes.Length; k++)
            {
                var offset = half * Nodes[k];
                sum += Weights[k] * (Value(curve, middle - offset, phi) + Value(curve, middle + offset, phi));
            }
        }

        return sum * half;
    }

    private static double Value(CurvePiece curve, double tau, Span<double> phi)
    {
        curve.Segment.Basis.Evaluate(tau, phi);
        return curve.ValueAt(tau, phi);
    }

    /// <summary>How fast the living functions are, and until when that stays so.</summary>
    private static (double Stop, double Fastest) Living(CurvePiece curve, double from, double until)
    {
        const double dead = 40; // e^-40 is below the rounding of what it was
        var stop = until;
        double fastest = 0;
        foreach (var mode in curve.Segment.Basis.Modes)
        {
            if (mode.Decay * from >= dead)
            {
                continue;
            }

            fastest = Math.Max(fastest, mode.Speed);
            var death = dead / mode.Decay;
            if (death > from && death < stop)
            {
                stop = death;
            }
        }

        return (stop, fastest);
    }
}
