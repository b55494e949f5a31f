using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Samples by numerical inversion of X(s) straight from (sE + G): no poles, no
/// exponential.</summary>
/// <remarks>A contour that leaves out a lightly damped pole converges all the same, to a wrong value. So
/// beside each sample a probe is inverted, generic stored quantities whose response the second solve knows;
/// only where the probe comes out right is the sample believed, else an earlier instant is tried.</remarks>
public static class ContourInversion
{
    private const int Fewer = 20;
    private const int More = 24;
    private const int MostAttempts = 5;
    private const double ProbeTolerance = 1e-9; // of the probe's largest quantity, in roots of energy
    private const double LatestPart = 0.4; // of the span that holds the sample
    private const string Name = "samples against inversion of X(s)";

    /// <summary>One sample a set of switch positions, in the longest span with them, as many as the budget
    /// allows.</summary>
    /// <param name="budget">Complex multiply-adds that may be spent; some 3e8 take a second.</param>
    public static (ImmutableArray<ContourSample> Samples, ImmutableArray<NotJudged> NotJudged) Samples(
        AllAtOnceSolution solution, double budget = 1e8)
    {
        var longest = new Dictionary<Propagator, Segment>();
        foreach (var segment in solution.Segments)
        {
            if (!longest.TryGetValue(segment.Propagator, out var other)
                || segment.End - segment.Start > other.End - other.Start)
            {
                longest[segment.Propagator] = segment;
            }
        }

        var samples = ImmutableArray.CreateBuilder<ContourSample>();
        var notJudged = ImmutableArray.CreateBuilder<NotJudged>();
        foreach (var segment in longest.Values.OrderBy(segment => segment.Start))
        {
            if (budget <= 0)
            {
                notJudged.Add(new NotJudged(
                    Name, $"the budget ends before the span from {segment.Start:R} s"));
                break;
            }

            var (sample, cost) = Sample(solution, segment);
            budget -= cost;
            if (sample is not null)
            {
                samples.Add(sample);
            }
            else
            {
                notJudged.Add(new NotJudged(
                    Name, $"modes from {segment.Start:R} s on are too lightly damped for the contour"));
            }
        }

        return (samples.ToImmutable(), notJudged.ToImmutable());
    }

    private static (ContourSample? Sample, double Cost) Sample(AllAtOnceSolution solution, Segment segment)
    {
        var (circuit, storage, inputs) = (solution.Circuit, solution.Storage, solution.Inputs);
        var equations = DescriptorEquations.Of(
            circuit, storage, segment.Equations.Unknowns.IsClosed, resistorsAsBranches: true);
        var system = new ContourSystem(equations, inputs);
        var states = AsDoubles(segment.Propagator.Stored(segment.Before, storage.Count + inputs.StateCount));
        var probe = new Probe(storage);
        var latest = LatestPart * (segment.End - segment.Start);
        var earliest = Math.Min(latest, 1 / segment.Propagator.Radius);
        var points = 0;
        for (var attempt = 0; attempt < MostAttempts && latest > 0; attempt++)
        {
            // as long as the instant that is told says: far from zero it is rounded
            var elapsed = segment.Start
                + (latest * Math.Pow(earliest / latest, attempt / (MostAttempts - 1.0))) - segment.Start;
            if (elapsed <= 0 || !EnclosesSources(inputs, states.AsSpan(storage.Count), elapsed))
            {
                continue;
            }

            points += Fewer;
            var known = probe.After(segment.Propagator, elapsed, inputs.StateCount);
            if (Invert(system, equations, states, probe.Quantities, elapsed, Fewer) is not var (fewer, probed)
                || !(probe.Error(segment.Propagator, probed.Stored, known) <= ProbeTolerance))
            {
                continue;
            }

            points += More;
            if (Invert(system, equations, states, probe.Quantities, elapsed, More)
                is not var (more, probedAgain))
            {
                continue;
            }

            var sources = SourceValues(inputs, states, storage, elapsed);
            ContourReading Read(Inverted of, double[] values) =>
                new(circuit, equations.Unknowns, storage, of, values);
            var silent = new double[circuit.Parts.Length];
            var sample = new ContourSample(
                segment.Start + elapsed, Read(more, sources), Read(fewer, sources), Read(probedAgain, silent),
                solution.Reading(segment, known), probe.Strength(states, more.Stored));
            return (sample, (double)points * system.Cost);
        }

        return (null, (double)points * system.Cost);
    }

    private static (Inverted Own, Inverted Probe)? Invert(
        ContourSystem system, DescriptorEquations equations, double[] states, double[] probe, double elapsed,
        int count)
    {
        var m = equations.Storage.Count;
        var own = new Inverted(new double[system.Size], new double[m], new double[m]);
        var probed = new Inverted(new double[system.Size], new double[m], new double[m]);
        var quantities = new Complex[m];
        foreach (var (point, weight) in HyperbolicContour.For(elapsed, count))
        {
            var x = system.At(point, states, probe);
            if (x.IsEmpty)
            {
                return null;
            }

            foreach (var (sum, part) in new[] { (own, 0), (probed, system.Size) })
            {
                var unknowns = x.Slice(part, system.Size);
                for (var i = 0; i < unknowns.Length; i++)
                {
                    sum.Unknowns[i] += (weight * unknowns[i]).Imaginary;
                }

                StoredQuantities(equations, unknowns, quantities);
                for (var k = 0; k < m; k++)
                {
                    sum.Stored[k] += (weight * quantities[k]).Imaginary;
                    sum.StorageRates[k] += (weight * point * quantities[k]).Imaginary;
                }
            }
        }

        return (own, probed);
    }

    // q = D Rᵀ x.
    private static void StoredQuantities(
        DescriptorEquations equations, ReadOnlySpan<Complex> x, Complex[] quantities)
    {
        var voltages = new Complex[quantities.Length];
        foreach (var column in equations.StorageColumns)
        {
            voltages[column.Index] += column.Sign * x[column.Place];
        }

        Array.Clear(quantities);
        foreach (var element in equations.Storage.Values)
        {
            quantities[element.Row] += element.Value.Hi * voltages[element.Column];
        }
    }

    // A sine's own poles are known: they must lie within the contour, or its states be none.
    private static bool EnclosesSources(InputModel inputs, ReadOnlySpan<double> sources, double elapsed)
    {
        const double Forgotten = 35; // e^−35 is below rounding
        foreach (var group in inputs.Groups)
        {
            var isSilent = sources.Slice(group.First, group.StateCount).IndexOfAnyExcept(0.0) < 0;
            if (!isSilent && group.DecayRate * elapsed < Forgotten
                && group.AngularFrequency * elapsed > HyperbolicContour.WidestEnclosed(Fewer))
            {
                return false;
            }
        }

        return true;
    }

    private static double[] SourceValues(
        InputModel inputs, double[] states, StorageLayout storage, double elapsed)
    {
        var values = new double[storage.IndexOf.Length];
        foreach (var group in inputs.Groups)
        {
            var of = states.AsSpan(storage.Count + group.First, group.StateCount);
            var half = group.StateCount / 2;
            var (sin, cos) = Math.SinCos(group.AngularFrequency * elapsed);
            var cosine = of[0] + (group.HasSlope ? of[half] * elapsed : 0);
            var sine = !group.Oscillates ? 0 : of[1] + (group.HasSlope ? of[half + 1] * elapsed : 0);
            values[group.Part] += Math.Exp(-group.DecayRate * elapsed) * ((cosine * cos) - (sine * sin));
        }

        return values;
    }

    private static double[] AsDoubles(DoubleDouble[] values) => [.. values.Select(value => (double)value)];
}
