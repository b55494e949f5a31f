namespace CircuitTransient.Studies.Draws;

public sealed partial class DrawWorkspace
{
    /// <summary>All integrals over their windows, in closed form.</summary>
    /// <returns>False where an impulse has a share in one.</returns>
    private bool Integrate()
    {
        for (var i = 0; i < integrals.Length; i++)
        {
            var wanted = kernel.Figures.Integrals[i];
            (integrals[i], integralErrors[i]) = (0, 0);
            if (!hasWindow[wanted.Window] || !served[wanted.First] || !served[wanted.Second])
            {
                continue;
            }

            var (from, to) = (windowFrom[wanted.Window], windowTo[wanted.Window]);
            for (var s = 0; s < segmentCount; s++)
            {
                var segment = segments[s];
                var (a, b) = (Math.Max(from, segment.Start), Math.Min(to, segment.End));
                if (segment.Impulse[wanted.First] != 0 || segment.Impulse[wanted.Second] != 0)
                {
                    return false;
                }

                if (a >= b)
                {
                    continue;
                }

                var (sum, size) = ProductIntegral.Of(
                    segment, wanted.First, wanted.Second, a - segment.Start, b - segment.Start);
                var (first, firstError) = ErrorOf(segment, wanted.First);
                var (second, secondError) = ErrorOf(segment, wanted.Second);
                var relative = (first > 0 ? firstError / first : 0)
                    + (second > 0 ? secondError / second : 0) + (2 * inherited);
                integrals[i] += wanted.Factor.Sign * sum;
                integralErrors[i] += relative * size;
            }
        }

        return true;
    }

    private (double Value, bool IsThere) IntegralOf(int index, ref bool isReliable)
    {
        var wanted = kernel.Figures.Integrals[index];
        isReliable &= integralErrors[index] <= Promised * Math.Abs(integrals[index])
            || integralErrors[index] == 0;
        return hasWindow[wanted.Window] ? (integrals[index], true) : (double.NaN, false);
    }

    /// <summary>An integral grows from zero at its window's start, or falls where its factor is
    /// negative.</summary>
    private (double Value, double Time) Integral(IntegralFigure figure, ref bool isReliable)
    {
        var (end, isThere) = IntegralOf(figure.Integral, ref isReliable);
        var wanted = kernel.Figures.Integrals[figure.Integral];
        return !isThere ? (double.NaN, double.NaN)
            : (wanted.Factor.Sign > 0) == figure.IsGreatest ? (end, windowTo[wanted.Window])
            : (0, windowFrom[wanted.Window]);
    }

    private (double Value, double Time) IntegralMargin(IntegralMarginFigure figure, ref bool isReliable)
    {
        var (end, isThere) = IntegralOf(figure.Integral, ref isReliable);
        var wanted = kernel.Figures.Integrals[figure.Integral];
        if (!isThere)
        {
            return (double.NaN, double.NaN);
        }

        var (highest, lowest) = (Math.Max(end, 0), Math.Min(end, 0));
        var (margin, time) = (double.PositiveInfinity, double.NaN);
        if (figure.Upper is { } upper)
        {
            (margin, time) = (upper - highest, windowTo[wanted.Window]);
        }

        return figure.Lower is { } lower && lowest - lower < margin
            ? (lowest - lower, windowFrom[wanted.Window])
            : (margin, time);
    }
}
