using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Initial and final values by the limit theorems: x(0⁺) = lim s X(s) for s → ∞, impulses apart, and
/// lim x(t) = lim s X(s) for s → 0, each extrapolated from a few solves of (sE + G) at real s.</summary>
public static class LimitTheorems
{
    private const int Ratio = 256; // of one s to the next
    private const int Nodes = 6;

    /// <summary>Values just after an instant at which a switching interval or a source corner begins; null
    /// where no span begins there or the theorem gives nothing.</summary>
    public static LimitValues? InitialAt(AllAtOnceSolution solution, double time)
    {
        var segment = solution.Segments.FirstOrDefault(segment => segment.Start == time);
        if (segment is null || Expansion(solution, segment) is not { } samples)
        {
            return null;
        }

        // X = impulse + x(0⁺)/s + …, Q = q(0⁺)/s + q′(0⁺)/s² + …: coefficients of a polynomial in 1/s.
        var better = Coefficients(samples);
        var worse = Coefficients(samples[1..]);
        var sources = SourceValuesAt(solution, segment);
        return new LimitValues(
            Reading(solution, segment, better[1].Unknowns, better[2].Stored, sources),
            Reading(solution, segment, worse[1].Unknowns, worse[2].Stored, sources));
    }

    /// <summary>Values for t → ∞ with the last switch positions and the sources as they stand. They mean
    /// something only where every mode dies away or rests; null where the limit does not converge.</summary>
    public static LimitValues? Final(AllAtOnceSolution solution)
    {
        const int MostSteps = 24;
        const double Converged = 1e-13;
        const int Steady = 3; // steps in a row: between fast and slow poles the extrapolation rests too
        const double Slow = 1e-3; // of the span's own rate, below which it has seen what the span sees
        if (solution.Segments.IsEmpty || solution.Rest is not null)
        {
            return null;
        }

        var segment = solution.Segments[^1];
        var sources = FinalSources(solution, segment);
        var pencil = new SparsePencil(segment.Equations, solution.Inputs);
        var nodes = new List<Sample>();
        Sample? last = null;
        var stands = 0;
        for (var k = 1; k <= MostSteps; k++)
        {
            var s = Math.ScaleB(segment.Propagator.Radius, -8 * k);
            if (SampleAt(solution, segment, pencil, s) is not { } sample)
            {
                return null;
            }

            nodes.Add(new Sample(s, Times(sample.Unknowns, s), Times(sample.Stored, (DoubleDouble)s * s)));
            var limit = AtZero(nodes.TakeLast(Nodes - 2).ToArray());
            stands = last is not null && Distance(limit, last) <= Converged * Size(limit) ? stands + 1 : 0;
            if (last is not null && stands >= Steady && s * (segment.End - segment.Start) < Slow)
            {
                return new LimitValues(
                    Reading(solution, segment, limit.Unknowns, limit.Stored, sources),
                    Reading(solution, segment, last.Unknowns, last.Stored, sources));
            }

            last = limit;
        }

        return null;
    }

    private static Sample[]? Expansion(AllAtOnceSolution solution, Segment segment)
    {
        var pencil = new SparsePencil(segment.Equations, solution.Inputs);
        var samples = new Sample[Nodes];
        for (var k = 0; k < Nodes; k++)
        {
            var s = segment.Propagator.Radius * Math.Pow(Ratio, Nodes - k);
            if (SampleAt(solution, segment, pencil, s) is not { } sample)
            {
                return null;
            }

            samples[k] = sample with { Place = 1 / (DoubleDouble)s };
        }

        return samples;
    }

    // X(s) and Q(s) with the quantities stored just before the span; by dense elimination where factors in
    // double gain nothing on a nearly singular pencil.
    private static Sample? SampleAt(
        AllAtOnceSolution solution, Segment segment, SparsePencil pencil, double s)
    {
        var count = solution.Storage.Count + solution.Inputs.StateCount;
        var states = segment.Propagator.Stored(segment.Before, count);
        return (pencil.At(s, states) ?? ShiftedSolve.Of(segment.Equations, solution.Inputs, s, states))
            is var (unknowns, stored)
            ? new Sample(s, unknowns, stored)
            : null;
    }

    // The first three coefficients of the polynomial through the samples, lowest power first (Newton's form).
    private static Sample[] Coefficients(Sample[] samples)
    {
        var differences = samples.ToArray();
        for (var order = 1; order < samples.Length; order++)
        {
            for (var k = samples.Length - 1; k >= order; k--)
            {
                var width = samples[k].Place - samples[k - order].Place;
                differences[k] = Combine(differences[k], 1 / width, differences[k - 1], -1 / width);
            }
        }

        Sample[] coefficients = [Zero(samples[0]), Zero(samples[0]), Zero(samples[0])];
        for (var k = samples.Length - 1; k >= 0; k--)
        {
            var place = -samples[k].Place;
            for (var power = 2; power >= 0; power--)
            {
                var below = power == 0 ? differences[k] : coefficients[power - 1];
                coefficients[power] = Combine(coefficients[power], place, below, 1);
            }
        }

        return coefficients;
    }

    private static Sample AtZero(Sample[] samples) => Coefficients(samples)[0];

    private static Sample Zero(Sample like) =>
        new(0, new DoubleDouble[like.Unknowns.Length], new DoubleDouble[like.Stored.Length]);

    private static Sample Combine(Sample a, DoubleDouble p, Sample b, DoubleDouble q) => new(
        a.Place,
        [.. a.Unknowns.Zip(b.Unknowns, (x, y) => (x * p) + (y * q))],
        [.. a.Stored.Zip(b.Stored, (x, y) => (x * p) + (y * q))]);

    private static DoubleDouble[] Times(DoubleDouble[] values, DoubleDouble factor) =>
        [.. values.Select(value => value * factor)];

    private static double Distance(Sample a, Sample b) => Size(Combine(a, 1, b, -DoubleDouble.One));

    private static double Size(Sample a) => a.Unknowns.Select(x => Math.Abs(x.Hi)).DefaultIfEmpty().Max();

    private static CircuitReading Reading(
        AllAtOnceSolution solution, Segment segment, DoubleDouble[] unknowns, DoubleDouble[] storageRates,
        double[] sources) =>
        new(solution.Circuit, segment.Equations.Unknowns, solution.Storage, i => unknowns[i], [],
            [.. storageRates], part => sources[part]);

    private static double[] SourceValuesAt(AllAtOnceSolution solution, Segment segment)
    {
        var values = new double[solution.Circuit.Parts.Length];
        var count = solution.Storage.Count + solution.Inputs.StateCount;
        var states = segment.Propagator.Stored(segment.Before, count);
        foreach (var group in solution.Inputs.Groups)
        {
            values[group.Part] += (double)states[solution.Storage.Count + group.First];
        }

        return values;
    }

    // A decay dies, a constant stays, a ramp and a sine have no limit.
    private static double[] FinalSources(AllAtOnceSolution solution, Segment segment)
    {
        var values = new double[solution.Circuit.Parts.Length];
        var count = solution.Storage.Count + solution.Inputs.StateCount;
        var states = segment.Propagator.Stored(segment.Before, count);
        foreach (var group in solution.Inputs.Groups)
        {
            var of = states.AsSpan(solution.Storage.Count + group.First, group.StateCount);
            if (group.DecayRate == 0)
            {
                values[group.Part] += of[1..].IndexOfAnyExcept(DoubleDouble.Zero) < 0 && !group.Oscillates
                    ? (double)of[0]
                    : double.NaN;
            }
        }

        return values;
    }

    private sealed record Sample(DoubleDouble Place, DoubleDouble[] Unknowns, DoubleDouble[] Stored);
}

/// <summary>Limits of all quantities of a circuit.</summary>
public sealed class LimitValues
{
    private readonly CircuitReading better;
    private readonly CircuitReading worse;

    internal LimitValues(CircuitReading better, CircuitReading worse) =>
        (this.better, this.worse) = (better, worse);

    // As for inversions: a difference of two approximations tells the size of an error, not its bound. Of an
    // initial value after a large impulse it is a difference of two roundings.
    private const double Doubt = 10;

    /// <summary>A voltage, current or power, and tenfold by how much two extrapolations differ. NaN where the
    /// equations leave it open, null for quantities that are not of one instant.</summary>
    public (double Value, double EstimatedError)? ValueOf(Measurand measurand) =>
        better.Value(measurand) is { } value && worse.Value(measurand) is { } other
            ? (value, Doubt * Math.Abs(value - other))
            : null;
}
