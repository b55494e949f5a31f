using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>The stretch of time a panel shows.</summary>
/// <param name="From">In seconds.</param>
/// <param name="To">In seconds.</param>
/// <param name="Origin">The instant its axis counts from.</param>
/// <param name="OriginName">What happens there; null for the start of the study.</param>
internal sealed record PlotWindow(double From, double To, double Origin = 0, string? OriginName = null)
{
    private const double ShortPart = 0.02; // of the study: less than this is some twenty points wide

    private const double VisiblePart = 0.02; // of the whole range: what moves less is not worth a panel
    private const int FewestSamples = 20; // a panel of fewer would show corners that are not there
    private const double SameInstant = 1e-12; // of the study: rounding of event times

    /// <summary>The observation's own window: the whole study where none was declared.</summary>
    public static PlotWindow Whole(TransientResult result, ObservationResult observation)
    {
        var declared = result.Circuit.Observations.FirstOrDefault(o => o.Name == observation.Name)?.Window;
        var from = DeclaredInstant.Seconds(result, declared?.From) ?? 0;
        var to = DeclaredInstant.Seconds(result, declared?.To) ?? result.Until;
        return from < to ? new(from, Math.Min(to, result.Until)) : new(0, result.Until);
    }

    /// <summary>The surroundings of an observation's greatest value, where it is too short to be seen in
    /// the whole study; else null.</summary>
    public static PlotWindow? Enlarged(TransientResult result, ObservationResult observation)
    {
        var peak = observation.Greatest;
        if (peak.Value is null or 0 || observation.Max.Value == observation.Min.Value)
        {
            return null;
        }

        var switching = result.Events.LastOrDefault(e => e.Time <= peak.Time);
        var delay = switching is null ? double.PositiveInfinity : peak.Time - switching.Time;
        delay = delay < SameInstant * result.Until ? 0 : delay;
        var (crestFrom, crestTo) = Crest(result, observation);
        var isAfterSwitching = delay > 0 && 2 * delay <= crestTo - crestFrom;
        var width = isAfterSwitching ? 2 * delay : crestTo - crestFrom;
        var whole = Whole(result, observation);
        if (width <= 0 || width >= ShortPart * (whole.To - whole.From))
        {
            return null;
        }

        // Where the switching that led to it is near, the panel begins with the switching.
        var start = delay <= 10 * width ? peak.Time - delay : crestFrom;
        var from = Math.Max(whole.From, start - (0.05 * (peak.Time + (5 * width) - start)));
        var to = Math.Min(whole.To, peak.Time + Math.Max(5 * width, peak.Time - start));
        var moves =
            Span(result, observation, from, to)
            >= VisiblePart * Span(result, observation, whole.From, whole.To);
        if (!moves || result.SampleTimes.Count(time => time >= from && time <= to) < FewestSamples)
        {
            return null;
        }

        return switching is not null && start == peak.Time - delay
            ? new PlotWindow(from, to, switching.Time, InstantWords.Name(switching))
            : new PlotWindow(from, to);
    }

    /// <summary>Whether an instant lies in it, the rounding of its ends apart.</summary>
    public bool Holds(double time) => time >= From - (SameInstant * To) && time <= To + (SameInstant * To);

    /// <summary>The window in words: <c>the first 15.5 ms after Kmain closes</c>.</summary>
    public string Words()
    {
        var to = EngineeringNumber.Format(To - Origin, "s", 3);
        return OriginName is null
            ? $"{EngineeringNumber.Format(From, "s", 3)} to {to}"
            : $"the first {to} after {OriginName}";
    }

    private static double Span(
        TransientResult result,
        ObservationResult observation,
        double from,
        double to)
    {
        var samples = PlotTrace.Within(result.SampleTimes, observation.Total, from, to);
        var values = samples.Select(sample => sample.Y).Where(double.IsFinite).ToArray();
        return values.Length == 0 ? 0 : values.Max() - values.Min();
    }

    // The stretch about the greatest value where the waveform is past the middle between its extremes.
    private static (double From, double To) Crest(TransientResult result, ObservationResult observation)
    {
        var (peak, total, times) = (observation.Greatest, observation.Total, result.SampleTimes);
        var middle = ((observation.Max.Value ?? 0) + (observation.Min.Value ?? 0)) / 2;
        var isUp = peak == observation.Max;
        bool IsPast(int i) => isUp ? total[i] > middle : total[i] < middle;
        var place = Enumerable
            .Range(0, times.Length)
            .Where(i => times[i] == peak.Time && IsPast(i))
            .FirstOrDefault(-1);
        if (place < 0)
        {
            return (0, result.Until);
        }

        var (first, last) = (place, place);
        while (first > 0 && IsPast(first - 1))
        {
            first--;
        }

        while (last < times.Length - 1 && IsPast(last + 1))
        {
            last++;
        }

        return (times[first], times[last]);
    }
}
