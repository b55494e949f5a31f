using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Finds offsets at which a record looks like the model, on an even grid.</summary>
internal static class OffsetSearch
{
    private const int FinestModel = 4096; // steps over the study
    private const int MostSteps = 1 << 17; // steps over the record
    private const int FewestCandidates = 4;
    private const double WorthTrying = 4; // times the squares that the likeliest leaves
    private const int MostCandidates = 24;

    /// <summary>Offsets in seconds, the likeliest first.</summary>
    public static List<double> Candidates(
        RecordSamples samples, ModelCurve model, AlignmentGiven given)
    {
        var first = samples.Times[0];
        var span = samples.Times[^1] - first;
        var usual = span / Math.Max(1, samples.Count - 1);
        var step = Math.Max(Math.Max(model.Until / FinestModel, span / MostSteps), usual);
        step = Math.Min(step, model.Until / 16);
        var record = Binned(samples, first, step, (int)Math.Min(MostSteps, Math.Ceiling(span / step)) + 1);
        var steps = (int)(model.Until / step) + 1;
        var shape = new double[steps];
        model.Evaluate([.. Enumerable.Range(0, steps).Select(j => j * step)], shape, null);
        var scores = Scores(record, shape, given);
        return [.. Peaks(scores).Select(i => first + ((i - (steps - 1)) * step))];
    }

    /// <summary>The mean of the samples in each step; a step without any takes the one before.</summary>
    private static double[] Binned(RecordSamples samples, double first, double step, int count)
    {
        var (sums, counts) = (new double[count], new int[count]);
        for (var k = 0; k < samples.Count; k++)
        {
            var bin = Math.Clamp((int)Math.Round((samples.Times[k] - first) / step), 0, count - 1);
            sums[bin] += samples.Values[k];
            counts[bin]++;
        }

        for (var b = 0; b < count; b++)
        {
            sums[b] = counts[b] > 0 ? sums[b] / counts[b] : b > 0 ? sums[b - 1] : samples.Values[0];
        }

        return sums;
    }

    /// <summary>What is left of the record's squares at each shift, the model holding its first value before
    /// it begins and its last after it ends.</summary>
    private static double[] Scores(double[] record, double[] model, AlignmentGiven given)
    {
        var (n, m) = (record.Length, model.Length);
        var mean = record.Average(); // the sums below lose nothing to a large level
        var centred = Array.ConvertAll(record, r => r - mean);
        var products = FourierTransform.Correlate(centred, model);
        var (sumR, sumM, sumMM) = (Cumulative(centred), Cumulative(model),
            Cumulative(Array.ConvertAll(model, v => v * v)));
        var squares = centred.Sum(r => r * r);
        var scores = new double[products.Length];
        for (var i = 0; i < scores.Length; i++)
        {
            var shift = i - (m - 1); // record index less model index
            var (from, until) = (Math.Clamp(shift, 0, n), Math.Clamp(shift + m, 0, n));
            var (low, high) = (from - shift, until - shift);
            var (before, after) = (from, n - until);
            var s = new LineSums(
                n, 0, squares,
                sumM[high] - sumM[low] + (before * model[0]) + (after * model[^1]),
                sumMM[high] - sumMM[low] + (before * model[0] * model[0]) + (after * model[^1] * model[^1]),
                products[i] + (sumR[from] * model[0]) + ((sumR[n] - sumR[until]) * model[^1]));
            scores[i] = s.Best(given.Gain, given.Level - mean).Left;
        }

        return scores;
    }

    private static double[] Cumulative(double[] x)
    {
        var sums = new double[x.Length + 1];
        for (var i = 0; i < x.Length; i++)
        {
            sums[i + 1] = sums[i] + x[i];
        }

        return sums;
    }

    private static List<int> Peaks(double[] scores)
    {
        var least = new List<int>();
        for (var i = 0; i < scores.Length; i++)
        {
            var isLeast = (i == 0 || scores[i] <= scores[i - 1])
                && (i + 1 == scores.Length || scores[i] < scores[i + 1]);
            if (isLeast)
            {
                least.Add(i);
            }
        }

        least.Sort((a, b) => scores[a].CompareTo(scores[b]) is not 0 and var order ? order : a.CompareTo(b));
        var worthTrying = least.Count(i => scores[i] <= WorthTrying * scores[least[0]]);
        return least[..Math.Clamp(worthTrying, Math.Min(FewestCandidates, least.Count), MostCandidates)];
    }
}

/// <summary>The sums of a straight line r = level + gain · m through points.</summary>
internal readonly record struct LineSums(
    double N, double R, double RR, double M, double MM, double RM)
{
    /// <summary>The line of least squares, with what is given kept, and the squares left over. A gain of
    /// zero or less explains nothing.</summary>
    public (double Gain, double Level, double Left) Best(double? gain, double? level)
    {
        var spread = MM - (M * M / N);
        double g;
        if (gain is { } fixedGain)
        {
            g = fixedGain;
        }
        else if (level is { } zero)
        {
            g = MM > 0 ? Math.Max(0, (RM - (zero * M)) / MM) : 0;
        }
        else
        {
            g = spread > 1e-12 * MM ? Math.Max(0, (RM - (R * M / N)) / spread) : 0;
        }

        var l = level ?? ((R - (g * M)) / N);
        var left = RR + (N * l * l) + (g * g * MM) - (2 * l * R) - (2 * g * RM) + (2 * g * l * M);
        return (g, l, Math.Max(0, left));
    }
}
