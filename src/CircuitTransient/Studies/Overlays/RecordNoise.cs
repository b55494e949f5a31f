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

    /// <summary>From the differences of neighbouring samples, of the lowest order from which on a higher one
    /// no longer lowers them: the waveform has gone by then, the noise stays.</summary>
    public static NoiseEstimate FromDifferences(double[] values)
    {
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

        // High differences are correlated, and a median is less sharp than a mean: some 1.6/√n.
        var error = 1.6 / Math.Sqrt(Math.Max(1, x.Length));
        return new NoiseEstimate(order == 0 ? 0 : before, error,
            $"differences of order {Math.Max(1, order)} of neighbouring samples");
    }

    /// <summary>The noise by differences, unless the samples before the model moves show another: noise that
    /// moves slowly escapes the differences. Never less than what the steps of the converter leave.</summary>
    public static NoiseEstimate Of(double[] all, Aligned aligned)
    {
        var noise = FromDifferences(all);
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
        return noise.Value >= floor ? noise
            : new NoiseEstimate(floor, 0.05, "the steps of the converter, which hide a smaller noise");
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

        if (codes.Count * 4 > values.Length || codes.Count < 2)
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
