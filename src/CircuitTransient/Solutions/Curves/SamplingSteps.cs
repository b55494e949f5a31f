
namespace CircuitTransient.Solutions.Curves;

/// <summary>Chooses instants by how fast a segment's functions move: a step is a fraction of the fastest time
/// constant that is still alive.</summary>
public static class SamplingSteps
{
    /// <summary>Instants from 0 to the length, both included.</summary>
    /// <param name="basis">The functions.</param>
    /// <param name="length">The segment's length in seconds.</param>
    /// <param name="stepFraction">Step over the fastest living time constant.</param>
    /// <param name="mostSteps">At most so many steps: where the functions ring longer, the steps
    /// grow.</param>
    public static double[] Of(SegmentBasis basis, double length, double stepFraction, int mostSteps)
    {
        var instants = new List<double> { 0 };
        double now = 0;
        while (now < length)
        {
            var left = Math.Max(1, mostSteps - instants.Count + 1);
            var step = Math.Max(stepFraction / Speed(basis, now, length), (length - now) / left);
            now = now + (1.5 * step) >= length ? length : now + step;
            instants.Add(now);
        }

        return [.. instants];
    }

    private static double Speed(SegmentBasis basis, double now, double length)
    {
        const double alive = 9; // e^-9 of what it was: too small to shape a picture; bounds do not rely on it
        var fastest = 4 / length;
        foreach (var mode in basis.Modes)
        {
            if (mode.Decay * now < alive)
            {
                fastest = Math.Max(fastest, mode.Speed);
            }
        }

        return fastest;
    }
}
