using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>How the end of a study goes with a value: not at all where the file states it, else with the
/// slowest mode of the last interval.</summary>
internal static class StudyEndSlope
{
    /// <summary>The slope; null where the slowest mode is one of several that coincide.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="model">The last interval's network, its laws disturbed.</param>
    /// <param name="variation">The value.</param>
    /// <param name="startShift">How the last interval's start goes with the value.</param>
    public static double? Of(
        TransientSolution solution, IntervalModel model, Variation variation, double startShift)
    {
        if (solution.Circuit.Until is not null)
        {
            return 0;
        }

        var from = StudyEnd.LastCorner(solution.Circuit) > solution.Intervals[^1].From ? 0 : startShift;
        double longest = 0;
        double? slope = null;
        for (var b = 0; b < model.Blocks.Length; b++)
        {
            for (var i = 0; i < model.Blocks[b].Size; i++)
            {
                var (re, im) = (model.Blocks[b].T[i, i].Re.Hi, Math.Abs(model.Blocks[b].T[i, i].Im.Hi));
                var isUndamped = StudyEnd.IsUndamped(re, im);
                if (!isUndamped && re >= 0)
                {
                    continue;
                }

                var (time, rate) = isUndamped
                    ? (StudyEnd.Periods * 2 * Math.PI / im, -im)
                    : (StudyEnd.TimeConstants / -re, re);
                if (time > longest)
                {
                    longest = time;
                    var moved = PoleSlopes.Slope(model, b, variation);
                    slope = model.Blocks[b].Size > 1 ? null
                        : time * (isUndamped ? moved.Imaginary : -moved.Real) / rate;
                }
            }
        }

        return from + slope;
    }
}
