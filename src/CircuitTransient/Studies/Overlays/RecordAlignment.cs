using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A record laid over the model.</summary>
/// <param name="Compared">The samples within the study.</param>
/// <param name="Model">The model's values there, gain and level applied.</param>
/// <param name="Inverse">Of the product of the slopes by what was estimated; null where nothing was.</param>
internal sealed record Aligned(
    double Offset, double Gain, double Level, RecordSamples Compared, double[] Model, double[,]? Inverse)
{
    /// <summary>Mean square of the differences, by the degrees of freedom left.</summary>
    public double Variance(int estimated)
    {
        double sum = 0;
        for (var k = 0; k < Compared.Count; k++)
        {
            var r = Compared.Values[k] - Model[k];
            sum += r * r;
        }

        return sum / Math.Max(1, Compared.Count - estimated);
    }
}

/// <summary>Lays a record over the model by least squares: level and gain enter linearly, the offset through
/// the model's exact slope.</summary>
internal sealed class RecordAlignment(ModelCurve model, AlignmentGiven given)
{
    private const int Trial = 2048; // samples while candidates are tried
    private const int Usual = 20_000; // samples while the offset is refined

    private const double AsGood = 1.1; // in squares

    /// <summary>The fewest samples that are laid over the model.</summary>
    public const int FewestCompared = 8;

    /// <summary>Another offset at which the record fits as well; null where there is none.</summary>
    public double? Other { get; private set; }

    /// <summary>How many of offset, gain and level are estimated.</summary>
    public int Estimated =>
        (given.Offset is null ? 1 : 0) + (given.Gain is null ? 1 : 0) + (given.Level is null ? 1 : 0);

    /// <summary>Aligns; null where no part of the record lies within the study.</summary>
    public Aligned? Find(RecordSamples samples)
    {
        var candidates = given.Offset is { } offset
            ? [offset]
            : OffsetSearch.Candidates(samples, model, given);
        var few = samples.Thinned(Trial);
        var tried = new List<(double[] X, double Cost)>();
        foreach (var candidate in candidates)
        {
            if (Refine(few, Start(few, candidate)) is { } found)
            {
                tried.Add((found, Cost(few, found)));
            }
        }

        if (tried.Count == 0)
        {
            return null;
        }

        // A ring repeats itself: of places that fit alike the one whose gain is nearest to one is likeliest.
        var least = tried.Min(t => t.Cost);
        var alike = tried.Where(t => t.Cost <= AsGood * least)
            .OrderBy(t => Math.Abs(Math.Log(Math.Abs(t.X[1])))).ToArray();
        var best = alike[0].X;
        var step = (samples.Times[^1] - samples.Times[0]) / samples.Count;
        Other = alike.Select(t => (double?)t.X[0])
            .FirstOrDefault(o => Math.Abs(o!.Value - best[0]) > 2 * step);
        return Finish(samples, best);
    }

    /// <summary>Refines an alignment that is known nearly.</summary>
    public Aligned? Near(RecordSamples samples, double offset)
    {
        var few = samples.Thinned(Usual);
        return Refine(few, Start(few, offset)) is { } found ? Finish(samples, found) : null;
    }

    /// <summary>Offset, gain and level at a first offset, by the straight line through the values.</summary>
    private double[] Start(RecordSamples samples, double offset)
    {
        var inside = Inside(samples, offset);
        var values = Values(inside, offset, null);
        double r = 0, rr = 0, m = 0, mm = 0, rm = 0;
        for (var k = 0; k < inside.Count; k++)
        {
            r += inside.Values[k];
            rr += inside.Values[k] * inside.Values[k];
            m += values[k];
            mm += values[k] * values[k];
            rm += values[k] * inside.Values[k];
        }

        var (gain, level, _) = new LineSums(Math.Max(1, inside.Count), r, rr, m, mm, rm)
            .Best(given.Gain, given.Level);
        return [offset, gain > 0 ? gain : 1, level];
    }

    /// <summary>The best offset, gain and level near a start; the samples within the study are chosen anew as
    /// the offset moves.</summary>
    private double[]? Refine(RecordSamples samples, double[] start)
    {
        var now = start;
        for (var round = 0; round < 3; round++)
        {
            var inside = Inside(samples, now[0]);
            if (inside.Count < FewestCompared)
            {
                return null;
            }

            if (Estimated == 0)
            {
                return now;
            }

            var fit = LeastSquares.Minimise(
                Free(now), x => Linearise(inside, Full(x, start)).Reduced(), radius: 1, mostSteps: 60,
                tolerance: 1e-12);
            if (fit is null)
            {
                return null;
            }

            var before = now;
            now = Full(fit.X, start);
            if (Inside(samples, now[0]).Count == inside.Count && now[0] == before[0])
            {
                break;
            }
        }

        return now;
    }

    private Aligned? Finish(RecordSamples samples, double[] found)
    {
        if (samples.Count > Trial)
        {
            found = Refine(samples.Thinned(Usual), found) ?? found;
        }

        var inside = Inside(samples, found[0]);
        if (inside.Count < FewestCompared)
        {
            return null;
        }

        var system = Linearise(inside, found).Reduced();
        if (samples.Count > Usual && Estimated > 0 && TriangleSolver.Solve(system, []) is { } step)
        {
            var refined = Full([.. Free(found).Zip(step, (a, b) => a - b)], found);
            var further = Inside(samples, refined[0]);
            if (further.Count == inside.Count)
            {
                found = refined;
            }
        }

        var values = Values(inside, found[0], null);
        for (var k = 0; k < values.Length; k++)
        {
            values[k] = found[2] + (found[1] * values[k]);
        }

        return new Aligned(found[0], found[1], found[2], inside, values,
            Estimated == 0 ? null : TriangleSolver.HeldInverseProduct(system));
    }

    /// <summary>The standard errors of what was estimated.</summary>
    public Alignment Describe(Aligned aligned, double variance) =>
        Alignment.Of(aligned.Offset, aligned.Gain, aligned.Level, given, aligned.Inverse, variance);

    private RecordSamples Inside(RecordSamples samples, double offset) =>
        samples.Between(offset, offset + model.Until);

    /// <summary>Residuals model − record and their slopes by what is estimated.</summary>
    private RowTriangle Linearise(RecordSamples samples, double[] x)
    {
        var rates = new double[samples.Count];
        var values = Values(samples, x[0], rates);
        var triangle = new RowTriangle(Estimated);
        Span<double> row = stackalloc double[3];
        for (var k = 0; k < samples.Count; k++)
        {
            var n = 0;
            if (given.Offset is null)
            {
                row[n++] = -x[1] * rates[k];
            }

            if (given.Gain is null)
            {
                row[n++] = values[k];
            }

            if (given.Level is null)
            {
                row[n++] = 1;
            }

            triangle.Add(row[..n], x[2] + (x[1] * values[k]) - samples.Values[k]);
        }

        return triangle;
    }

    private double[] Values(RecordSamples samples, double offset, double[]? rates)
    {
        var values = new double[samples.Count];
        model.Evaluate(Array.ConvertAll(samples.Times, t => t - offset), values, rates);
        return values;
    }

    /// <summary>The squares left per sample, those outside the study counted by the model's ends.</summary>
    private double Cost(RecordSamples samples, double[] x)
    {
        var values = Values(samples, x[0], null);
        double sum = 0;
        for (var k = 0; k < samples.Count; k++)
        {
            var r = x[2] + (x[1] * values[k]) - samples.Values[k];
            sum += r * r;
        }

        return sum / samples.Count;
    }

    private double[] Free(double[] x)
    {
        var free = new List<double>();
        if (given.Offset is null)
        {
            free.Add(x[0]);
        }

        if (given.Gain is null)
        {
            free.Add(x[1]);
        }

        if (given.Level is null)
        {
            free.Add(x[2]);
        }

        return [.. free];
    }

    private double[] Full(double[] free, double[] known)
    {
        var n = 0;
        return
        [
            given.Offset ?? free[n++],
            given.Gain ?? free[n++],
            given.Level ?? (n < free.Length ? free[n] : known[2]),
        ];
    }
}
