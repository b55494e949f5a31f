namespace CircuitTransient.Solutions.Curves;

/// <summary>The integral of a curve over a stretch of one segment.</summary>
internal static class PanelIntegral
{
    /// <summary>∫ of the curve from one instant of its segment to another.</summary>
    public static double Of(CurvePiece curve, double from, double until)
    {
        var basis = curve.Segment.Basis;
        var phi = new double[basis.Width];
        double sum = 0;
        Quadrature.Visit(basis, from, until, (tau, weight) =>
        {
            basis.Evaluate(tau, phi);
            sum += weight * curve.ValueAt(tau, phi);
        });
        return sum;
    }
}
