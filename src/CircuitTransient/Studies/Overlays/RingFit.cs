using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Finds damped oscillations in samples, the strongest first, each by the highest place of the
/// spectrum of what is left and then by least squares together with those found before.</summary>
internal sealed class RingFit
{
    private const int MostModes = 4;
    private const double Significance = 60; // F of four more unknowns; 5 would do for pure chance
    private const double LeastPeriods = 2;

    private readonly double[] times;
    private readonly double[] values;
    private readonly double[] rates;
    private readonly double span;

    /// <summary>Takes samples.</summary>
    /// <param name="samples">The samples.</param>
    /// <param name="realRates">Decays in 1/s that may lie beneath.</param>
    public RingFit(RecordSamples samples, IEnumerable<double> realRates)
    {
        times = Array.ConvertAll(samples.Times, t => t - samples.Times[0]);
        values = samples.Values;
        span = times[^1];
        rates = [.. realRates.Where(r => r * span > 0.5 && r * span < samples.Count / 4.0).Take(4)];
    }

    /// <summary>The modes, the strongest first.</summary>
    public List<RingMode> Find(double noise)
    {
        var found = new List<(double Decay, double Turn)>();
        var (left, cost) = Remainder(found);
        var described = new List<RingMode>();
        while (found.Count < MostModes && times.Length > 40)
        {
            var turn = HighestTurn(left);
            if (Refine([.. found, (FirstDecay(found, turn), turn)]) is not { } next)
            {
                break;
            }

            var unknowns = 2 + rates.Length + (4 * next.Modes.Count);
            var freedom = Math.Max(1, times.Length - unknowns);
            var isSignificant = (cost - next.Cost) / 4 > Significance * next.Cost / freedom;
            var added = next.Described[^1];
            if (!isSignificant || !next.Described.TrueForAll(Rings) || added.Amplitude < 0.5 * noise)
            {
                break;
            }

            found = next.Modes;
            described = next.Described;
            (left, cost) = Remainder(found);
        }

        return [.. described.OrderByDescending(m => m.Amplitude)];
    }

    private bool Rings(RingMode mode)
    {
        var lasting = mode.Decay > 0 ? Math.Min(span, 3 / mode.Decay) : span;
        return mode.Frequency * lasting >= LeastPeriods && mode.Decay * span > -1
            && mode.Frequency < 0.4 * times.Length / span && mode.Frequency * span > LeastPeriods;
    }

    /// <summary>The best amplitudes for given modes: what is left and its squares.</summary>
    private (double[] Left, double Cost) Remainder(List<(double Decay, double Turn)> modes)
    {
        var width = 2 + rates.Length + (2 * modes.Count);
        var triangle = new RowTriangle(width);
        var row = new double[width];
        for (var k = 0; k < times.Length; k++)
        {
            Fill(row, modes, times[k]);
            triangle.Add(row, values[k]);
        }

        var best = TriangleSolver.Solve(triangle.Reduced(), []) ?? new double[width];
        var left = new double[times.Length];
        double cost = 0;
        for (var k = 0; k < times.Length; k++)
        {
            Fill(row, modes, times[k]);
            left[k] = values[k] - DotProduct.Of(row, best);
            cost += left[k] * left[k];
        }

        return (left, cost);
    }

    private void Fill(double[] row, List<(double Decay, double Turn)> modes, double t)
    {
        row[0] = 1;
        row[1] = t / span;
        for (var r = 0; r < rates.Length; r++)
        {
            row[2 + r] = Math.Exp(-rates[r] * t);
        }

        for (var m = 0; m < modes.Count; m++)
        {
            var (sin, cos) = Math.SinCos(modes[m].Turn * t);
            var size = Math.Exp(-modes[m].Decay * t);
            row[2 + rates.Length + (2 * m)] = size * cos;
            row[3 + rates.Length + (2 * m)] = size * sin;
        }
    }

    /// <summary>The angular frequency at which the spectrum of what is left is highest.</summary>
    private double HighestTurn(double[] left)
    {
        var size = (int)BitOperations.RoundUpToPowerOf2((uint)(4 * left.Length));
        var x = new Complex[size];
        for (int k = 0, at = 0; k < left.Length; k++)
        {
            // On an even grid: where the samples are not, the straight line between neighbours.
            var time = span * k / (left.Length - 1);
            while (at + 2 < times.Length && times[at + 1] < time)
            {
                at++;
            }

            var gap = times[at + 1] - times[at];
            var share = gap > 0 ? (time - times[at]) / gap : 0;
            x[k] = left[at] + (share * (left[at + 1] - left[at]));
        }

        FourierTransform.Transform(x);
        var step = span / (times.Length - 1);
        var from = Math.Max(1, (int)(LeastPeriods * size / left.Length));
        var best = from;
        for (var k = from; k <= size / 2; k++)
        {
            best = x[k].Magnitude > x[best].Magnitude ? k : best;
        }

        return 2 * Math.PI * best / (size * step);
    }

    private double FirstDecay(List<(double Decay, double Turn)> found, double turn)
    {
        var (best, least) = (0.0, double.PositiveInfinity);
        foreach (var factor in (double[])[0, 1, 3, 10, 30, 100, 300])
        {
            var decay = factor / span;
            var cost = decay < turn ? Remainder([.. found, (decay, turn)]).Cost : double.PositiveInfinity;
            (best, least) = cost < least ? (decay, cost) : (best, least);
        }

        return best;
    }

    /// <summary>All modes and amplitudes together, by least squares.</summary>
    private (List<(double Decay, double Turn)> Modes, double Cost, List<RingMode> Described)? Refine(
        List<(double Decay, double Turn)> modes)
    {
        var linear = 2 + rates.Length;
        var start = new double[linear + (4 * modes.Count)];
        for (var m = 0; m < modes.Count; m++)
        {
            start[linear + (4 * m)] = modes[m].Decay * span;
            start[linear + (4 * m) + 1] = modes[m].Turn * span;
        }

        StartAmplitudes(start, modes);
        var fit = LeastSquares.Minimise(
            start, x => Linearise(x, linear), radius: 0.1, mostSteps: 100, tolerance: 1e-12);
        if (fit is null || TriangleSolver.InverseProduct(fit.Triangle) is not { } inverse)
        {
            return null;
        }

        var variance = fit.Cost / Math.Max(1, times.Length - start.Length);
        var described = new List<RingMode>();
        var refined = new List<(double Decay, double Turn)>();
        for (var m = 0; m < modes.Count; m++)
        {
            var place = linear + (4 * m);
            refined.Add((fit.X[place] / span, Math.Abs(fit.X[place + 1]) / span));
            described.Add(new RingMode(
                Math.Abs(fit.X[place + 1]) / (2 * Math.PI * span),
                Math.Sqrt(variance * inverse[place + 1, place + 1]) / (2 * Math.PI * span),
                fit.X[place] / span,
                Math.Sqrt(variance * inverse[place, place]) / span,
                double.Hypot(fit.X[place + 2], fit.X[place + 3])));
        }

        return (refined, fit.Cost, described);
    }

    private void StartAmplitudes(double[] start, List<(double Decay, double Turn)> modes)
    {
        var linear = 2 + rates.Length;
        var triangle = new RowTriangle(linear + (2 * modes.Count));
        var row = new double[triangle.Columns];
        for (var k = 0; k < times.Length; k++)
        {
            Fill(row, modes, times[k]);
            triangle.Add(row, values[k]);
        }

        var best = TriangleSolver.Solve(triangle.Reduced(), []) ?? new double[row.Length];
        best.AsSpan(0, linear).CopyTo(start);
        for (var m = 0; m < modes.Count; m++)
        {
            start[linear + (4 * m) + 2] = best[linear + (2 * m)];
            start[linear + (4 * m) + 3] = best[linear + (2 * m) + 1];
        }
    }

    private RowTriangle? Linearise(double[] x, int linear)
    {
        var triangle = new RowTriangle(x.Length);
        var row = new double[x.Length];
        for (var k = 0; k < times.Length; k++)
        {
            var u = times[k] / span;
            (row[0], row[1]) = (1, u);
            var sum = x[0] + (x[1] * u);
            for (var r = 0; r < rates.Length; r++)
            {
                row[2 + r] = Math.Exp(-rates[r] * times[k]);
                sum += x[2 + r] * row[2 + r];
            }

            for (var p = linear; p < x.Length; p += 4)
            {
                var (sin, cos) = Math.SinCos(x[p + 1] * u);
                var size = Math.Exp(-x[p] * u);
                var value = size * ((x[p + 2] * cos) + (x[p + 3] * sin));
                row[p] = -u * value;
                row[p + 1] = u * size * ((x[p + 3] * cos) - (x[p + 2] * sin));
                row[p + 2] = size * cos;
                row[p + 3] = size * sin;
                sum += value;
            }

            if (!double.IsFinite(sum))
            {
                return null;
            }

            triangle.Add(row, sum - values[k]);
        }

        return triangle.Reduced();
    }
}
