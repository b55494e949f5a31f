namespace CircuitTransient.Studies.Overlays;

/// <summary>The noise of a record's samples, rms.</summary>
/// <param name="Value">In the record's unit.</param>
/// <param name="RelativeError">Its own relative standard error.</param>
/// <param name="Source">Where it was read off, in words.</param>
public sealed record NoiseEstimate(double Value, double RelativeError, string Source);

/// <summary>Estimates the noise of a record.</summary>
internal static class RecordNoise
{
    private const int HighestOrder = 10;
    private const int BlockLength = 64;
    private const int FewestQuiet = 30;
    private const double MostHidden = 3; // times: more is no noise but a model that lies wrong
    private const int MostSamples = 1 << 20;
    private const int MostCodes = 4096;
    private const int FewestCodes = 8; // fewer are the levels of a square wave, not of a converter
    private const double LeastOfSpan = 1e-6; // fewer digits than any table of a bench has

    /// <summary>From the differences of neighbouring samples, of the lowest order from which on a higher one
    /// no longer lowers them: the waveform has gone by then, the noise stays.</summary>
    public static NoiseEstimate FromDifferences(double[] times, double[] values)
    {
        if (!IsEven(times))
        {
            return FromNeighbours(times, values);
        }

        var x = values.AsSpan(0, Math.Min(values.Length, MostSamples)).ToArray();
        var before = double.PositiveInfinity;
        var order = 0;
        for (var k = 1; k <= Math.Min(HighestOrder, x.Length / 4); k++)
        {
            for (var i = 0; i + 1 < x.Length - k + 1; i++)
            {
                x[i] = x[i + 1] - x[i];
            }

            var now = MedianOfBlocks(x.AsSpan(0, x.Length - k)) / Math.Sqrt(Binomial(2 * k, k));
            if (now > 0.95 * before)
            {
                break;
            }

            (before, order) = (now, k);
        }

        // High differences are correlated, a median is less sharp than a mean, the lowest order counts. Not
        // derived: with 1.6/√n ten of 400 seeded records of 700 samples passed three errors.
        var error = 2.2 / Math.Sqrt(Math.Max(1, x.Length));
        return new NoiseEstimate(order == 0 ? 0 : before, error,
            $"differences of order {Math.Max(1, order)} of neighbouring samples");
    }

    /// <summary>The noise by differences, unless the samples before the model moves show another: noise that
    /// moves slowly escapes the differences. Never less than what the steps of the converter leave.</summary>
    public static NoiseEstimate Of(double[] times, double[] all, Aligned aligned)
    {
        var noise = FromDifferences(times, all);
        var count = Leading(aligned.Model, 0.2 * noise.Value);
        if (count >= FewestQuiet)
        {
            var part = aligned.Compared.Values.AsSpan(0, count).ToArray();
            var mean = part.Average();
            var rms = Math.Sqrt(part.Sum(v => (v - mean) * (v - mean)) / (count - 1));
            var error = 1 / Math.Sqrt(2.0 * (count - 1));
            var isOther = Math.Abs(rms - noise.Value) > 3 * error * rms && rms < MostHidden * noise.Value;
            noise = isOther
                ? new NoiseEstimate(rms, error, $"the {count} samples before the model moves")
                : noise with { Source = $"{noise.Source}; the {count} samples before the model moves agree" };
        }

        var floor = StepOf(all) / Math.Sqrt(12);
        var digits = LeastOfSpan * (all.Max() - all.Min());
        return noise.Value >= Math.Max(floor, digits) ? noise
            : floor >= digits
                ? new NoiseEstimate(floor, 0.05, "the steps of the converter, which hide a smaller noise")
                : new NoiseEstimate(digits, 0, "a millionth of the record's span, less is not looked at");
    }

    /// <summary>Whether instants stand evenly, but for a few gaps.</summary>
    public static bool IsEven(double[] times)
    {
        const double odd = 0.05; // of a step, and of all steps
        var sorted = new double[times.Length - 1];
        for (var k = 0; k < sorted.Length; k++)
        {
            sorted[k] = times[k + 1] - times[k];
        }

        Array.Sort(sorted);
        var usual = sorted[sorted.Length / 2];
        var strange = sorted.Count(s => Math.Abs(s - usual) > odd * usual);
        return strange <= odd * sorted.Length;
    }

    /// <summary>From the distance of each sample to the straight line through its neighbours: the waveform's
    /// bend is in it, so it is an upper estimate where samples are far apart.</summary>
    private static NoiseEstimate FromNeighbours(double[] times, double[] values)
    {
        var distances = new List<double>();
        for (var k = 1; k + 1 < Math.Min(values.Length, MostSamples); k++)
        {
            var gap = times[k + 1] - times[k - 1];
            if (gap > 0)
            {
                var share = (times[k] - times[k - 1]) / gap;
                var line = values[k - 1] + (share * (values[k + 1] - values[k - 1]));
                distances.Add((values[k] - line)
                    / Math.Sqrt(1 + (share * share) + ((1 - share) * (1 - share))));
            }
        }

        return new NoiseEstimate(
            distances.Count == 0 ? 0 : MedianOfBlocks([.. distances]),
            2.2 / Math.Sqrt(Math.Max(1, distances.Count)),
            "the distance of samples to the line through their neighbours");
    }

    /// <summary>The smallest distance of two codes; zero where values do not come in steps.</summary>
    public static double StepOf(double[] values)
    {
        var codes = new HashSet<double>();
        foreach (var value in values)
        {
            codes.Add(value);
            if (codes.Count > MostCodes)
            {
                return 0;
            }
        }

        if (codes.Count * 4 > values.Length || codes.Count < FewestCodes)
        {
            return 0;
        }

        var sorted = codes.Order().ToArray();
        return sorted.Zip(sorted.Skip(1), (a, b) => b - a).Where(d => d > 1e-9 * Math.Abs(sorted[^1])).Min();
    }

    /// <summary>How many samples stand before the model moves by more than a bound.</summary>
    private static int Leading(double[] model, double bound)
    {
        var k = 0;
        while (k < model.Length && Math.Abs(model[k] - model[0]) <= bound)
        {
            k++;
        }

        return k < model.Length ? k : 0;
    }

    private static double MedianOfBlocks(ReadOnlySpan<double> x)
    {
        var variances = new List<double>();
        for (var start = 0; start < x.Length; start += BlockLength)
        {
            var block = x[start..Math.Min(x.Length, start + BlockLength)];
            if (block.Length < BlockLength && variances.Count > 0)
            {
                break;
            }

            double sum = 0;
            foreach (var v in block)
            {
                sum += v * v;
            }

            variances.Add(sum / block.Length);
        }

        variances.Sort();
        return Math.Sqrt(variances[variances.Count / 2]);
    }

    private static double Binomial(int n, int k)
    {
        double product = 1;
        for (var i = 1; i <= k; i++)
        {
            product *= (double)(n - k + i) / i;
        }

        return product;
    }
}
