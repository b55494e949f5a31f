using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Draws;

/// <summary>The instants of one draw: its events, intervals and windows.</summary>
internal sealed class DrawTimes(DrawPlan plan)
{
    private readonly double[] acted = new double[plan.Events.Length];
    private readonly double[] starts = new double[plan.Intervals.Length + 1];

    /// <summary>When every interval begins, then the end of the study.</summary>
    public ReadOnlySpan<double> Starts => starts;

    /// <summary>The end of the study in seconds.</summary>
    public double Until => starts[^1];

    /// <summary>Sets the end.</summary>
    public void End(double until) => starts[^1] = until;

    /// <summary>Finds the instants of a draw.</summary>
    /// <returns>Whether the events keep the nominal order.</returns>
    public bool Put(ReadOnlySpan<double> draw, ReadOnlySpan<double> parameters, double? until)
    {
        for (var e = 0; e < acted.Length; e++)
        {
            var planned = plan.Events[e];
            var delay = planned.Value >= 0 ? draw[planned.Value]
                : FormulaValue.Of(planned.Delay, parameters);
            var instant = delay + (planned.After < 0 ? 0 : acted[planned.After]);
            acted[e] = planned.Previous < 0 ? instant : Math.Max(acted[planned.Previous], instant);
            var isLate = e >= plan.Acting;
            if (!(delay >= 0) || (until is { } end && isLate != acted[e] >= end))
            {
                return false;
            }
        }

        for (var k = 0; k < plan.Intervals.Length; k++)
        {
            var events = plan.Intervals[k].Events;
            starts[k] = events.Length == 0 ? 0 : acted[events[0]];
            for (var i = 1; i < events.Length; i++)
            {
                if (acted[events[i]] != starts[k])
                {
                    return false;
                }
            }

            if (k == 0 ? starts[0] != 0 : !(starts[k] > starts[k - 1]))
            {
                return false;
            }
        }

        starts[^1] = until ?? double.NaN;
        return true;
    }

    /// <summary>A declared instant in seconds; not a number where its event does not act.</summary>
    public double Of(Instant instant, ReadOnlySpan<double> parameters)
    {
        var delay = FormulaValue.Of(instant.Delay, parameters);
        if (instant.After is not { } after)
        {
            return delay;
        }

        for (var e = 0; e < plan.Acting; e++)
        {
            if (plan.Events[e].Reference == after)
            {
                return acted[e] + delay;
            }
        }

        return double.NaN;
    }

    /// <summary>A window cut to the study.</summary>
    /// <returns>Whether anything is in it.</returns>
    public bool Of(Window window, ReadOnlySpan<double> parameters, out double from, out double to)
    {
        from = window.From is null ? 0 : Of(window.From, parameters);
        to = window.To is null ? Until : Of(window.To, parameters);
        (from, to) = (Math.Max(0, from), Math.Min(Until, to));
        return from <= to;
    }
}
