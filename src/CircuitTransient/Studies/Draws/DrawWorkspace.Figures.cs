namespace CircuitTransient.Studies.Draws;

public sealed partial class DrawWorkspace
{
    // Bounds of a figure's error: of its own size, what draws promise; or of what its waveform is made of
    // over the study, where little is left of it in a window.
    private const double Promised = 1e-6;
    private const double Negligible = 1e-12;

    internal bool Sample(int observation, ReadOnlySpan<double> instants, Span<double> samples)
    {
        if (kernel.Figures.Observed[observation] is not { } track || segmentCount == 0
            || !served[track.First] || (track.Second >= 0 && !served[track.Second]))
        {
            samples.Fill(double.NaN);
            return false;
        }

        var factor = Factor(track.Factor);
        var s = 0;
        for (var i = 0; i < instants.Length; i++)
        {
            s = i > 0 && instants[i] < instants[i - 1] ? 0 : s;
            while (s + 1 < segmentCount && segments[s + 1].Start <= instants[i])
            {
                s++;
            }

            segments[s].Evaluate(instants[i] - segments[s].Start, startSlots);
            samples[i] = factor * segments[s].Value(track.First, startSlots)
                * (track.Second < 0 ? 1 : segments[s].Value(track.Second, startSlots));
        }

        return true;
    }

    private bool PutFigures(Span<double> figures, Span<double> instants)
    {
        var isReliable = true;
        for (var i = 0; i < kernel.Figures.Figures.Length; i++)
        {
            var (value, time) = kernel.Unserved[i] is not null
                ? (double.NaN, double.NaN)
                : Figure(kernel.Figures.Figures[i], ref isReliable);
            (figures[i], instants[i]) = (value, time);
        }

        return isReliable;
    }

    private (double Value, double Time) Figure(PlannedFigure figure, ref bool isReliable)
    {
        switch (figure)
        {
            case ExtremeFigure f:
                return Extreme(f, ref isReliable);
            case MarginFigure f:
                return Margin(f, ref isReliable);
            case SettlingFigure f:
                return Settling(f, ref isReliable);
            case PeakUsedFigure f:
                var (peak, time) = Peak(f.Track, ref isReliable);
                return (peak / f.Limit, time);
            case StoredEnergyFigure f:
                var (held, _) = Peak(f.Track, ref isReliable);
                return (Factor(f.Factor) * held * held / f.Limit, double.NaN);
            case IntegralFigure f:
                return Integral(f, ref isReliable);
            case IntegralMarginFigure f:
                return IntegralMargin(f, ref isReliable);
            case IntegralUsedFigure f:
                var (sum, _) = IntegralOf(f.Integral, ref isReliable);
                return (Math.Abs(f.IsMean ? sum / times.Until : sum) / f.Limit, double.NaN);
            default:
                return (double.NaN, double.NaN);
        }
    }

    /// <summary>Whether a track has values, and their error is small enough.</summary>
    private bool IsKnown(int track, ref bool isReliable)
    {
        if (!hasWindow[kernel.Figures.Tracks[track].Window])
        {
            return false;
        }

        ref var state = ref tracks[track];
        var size = Math.Max(
            double.IsFinite(state.Maximum) ? Math.Abs(state.Maximum) : 0,
            double.IsFinite(state.Minimum) ? Math.Abs(state.Minimum) : 0);
        isReliable &= state.Error <= Promised * size || state.Error <= Negligible * state.Size;
        return true;
    }

    private (double Value, double Time) Extreme(ExtremeFigure figure, ref bool isReliable)
    {
        if (!IsKnown(figure.Track, ref isReliable))
        {
            return (double.NaN, double.NaN);
        }

        ref var state = ref tracks[figure.Track];
        var infinite = figure.IsGreatest ? state.Up : state.Down;
        return !double.IsNaN(infinite) ? (double.NaN, infinite)
            : figure.IsGreatest ? (state.Maximum, state.MaximumTime)
            : (state.Minimum, state.MinimumTime);
    }

    private (double Value, double Time) Margin(MarginFigure figure, ref bool isReliable)
    {
        if (!IsKnown(figure.Track, ref isReliable))
        {
            return (double.NaN, WindowStart(figure.Track));
        }

        ref var state = ref tracks[figure.Track];
        var infinite = double.MinNumber(state.Up, state.Down); // an impulse breaks bounds on either side
        if (!double.IsNaN(infinite))
        {
            return (double.NegativeInfinity, infinite);
        }

        var (margin, time) = (double.PositiveInfinity, double.NaN);
        if (figure.Upper is { } upper)
        {
            (margin, time) = (upper - state.Maximum, state.MaximumTime);
        }

        return figure.Lower is { } lower && state.Minimum - lower < margin
            ? (state.Minimum - lower, state.MinimumTime)
            : (margin, time);
    }

    private (double Value, double Time) Settling(SettlingFigure figure, ref bool isReliable)
    {
        if (!IsKnown(figure.Track, ref isReliable))
        {
            return (double.NaN, WindowStart(figure.Track));
        }

        ref var state = ref tracks[figure.Track];
        var (above, below) = (state.Maximum - figure.Target, figure.Target - state.Minimum);
        return above > below
            ? (figure.Band - Math.Abs(above), state.MaximumTime)
            : (figure.Band - Math.Abs(below), state.MinimumTime);
    }

    /// <summary>Where a requirement that was not judged is said to stand.</summary>
    private double WindowStart(int track)
    {
        var window = kernel.Figures.Windows[kernel.Figures.Tracks[track].Window];
        var start = window.From is null ? 0 : times.Of(window.From, parameters);
        return double.IsNaN(start) ? times.Until : Math.Max(0, start);
    }

    private (double Value, double Time) Peak(int track, ref bool isReliable)
    {
        if (!IsKnown(track, ref isReliable))
        {
            return (double.NaN, double.NaN);
        }

        ref var state = ref tracks[track];
        var infinite = double.IsNaN(state.Up) ? state.Down : state.Up;
        return !double.IsNaN(infinite) ? (double.NaN, infinite)
            : Math.Abs(state.Maximum) >= Math.Abs(state.Minimum)
                ? (Math.Abs(state.Maximum), state.MaximumTime)
                : (Math.Abs(state.Minimum), state.MinimumTime);
    }
}
