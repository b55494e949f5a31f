using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Searches single stray parts that would make the model ring as a record does: at each place the
/// values that bring a pole to the record's frequency, judged by what is then left of the record.</summary>
internal sealed class StraySearch(PlacedRecord placed, Aligned aligned, double noise, Segment segment)
{
    private const int StepsADecade = 2;
    private const int Halvings = 14; // of half a decade: to 1e-4
    private const int MostSamples = 2048;
    private const int MostNamed = 3;
    private const double WorthNaming = 0.8; // of the difference that is left without it

    // The impedance of a stray at the ring frequency, ohms: less or more changes nothing that rings.
    private const double LeastImpedance = 1e-2;
    private const double MostImpedance = 1e6;

    /// <summary>The likeliest few.</summary>
    public ImmutableArray<Stray> Find(RingMode mode, double ratio, CancellationToken cancellation)
    {
        var circuit = placed.Circuit;
        var places = StrayCandidates.Of(circuit);
        var found = new List<Stray>[places.Count];
        Parallel.For(0, places.Count, new ParallelOptions { CancellationToken = cancellation }, i =>
            found[i] = [.. Values(places[i], mode).Select(value => new Stray(
                places[i].Statement(circuit, value), places[i].Words(circuit, value),
                RatioWith(places[i].Put(circuit, value), cancellation)))]);
        return
        [
            .. found.SelectMany(f => f).Where(s => s.Ratio < WorthNaming * ratio).OrderBy(s => s.Ratio)
                .DistinctBy(s => s.Words).Take(MostNamed),
        ];
    }

    /// <summary>The values at which a pole passes the frequency.</summary>
    private IEnumerable<double> Values(StrayPlace place, RingMode mode)
    {
        var turn = 2 * Math.PI * mode.Frequency;
        var (low, high) = place.Series < 0
            ? (1 / (turn * MostImpedance), 1 / (turn * LeastImpedance))
            : (LeastImpedance / turn, MostImpedance / turn);
        var steps = (int)Math.Ceiling(StepsADecade * Math.Log10(high / low));
        var ratio = Math.Pow(high / low, 1.0 / steps);
        var before = CountAbove(place, low, turn);
        for (var k = 1; k <= steps; k++)
        {
            var value = low * Math.Pow(ratio, k);
            var now = CountAbove(place, value, turn);
            if (before is { } a && now is { } b && a != b
                && Bisect(place, value / ratio, value, a, turn) is { } at)
            {
                yield return at;
            }

            before = now;
        }
    }

    private double? Bisect(StrayPlace place, double low, double high, int atLow, double turn)
    {
        for (var k = 0; k < Halvings; k++)
        {
            var middle = Math.Sqrt(low * high);
            if (CountAbove(place, middle, turn) is not { } count)
            {
                return null;
            }

            (low, high) = count == atLow ? (middle, high) : (low, middle);
        }

        var value = Math.Sqrt(low * high);
        var nearest = Turns(place, value)?.Select(t => Math.Abs((t / turn) - 1)).DefaultIfEmpty(1).Min();
        return nearest < 0.01 ? value : null;
    }

    private int? CountAbove(StrayPlace place, double value, double turn) =>
        Turns(place, value)?.Count(t => t > turn);

    /// <summary>The angular frequencies of the network's poles with the stray, its switches as in the stretch
    /// looked at; null where it has no solution.</summary>
    private List<double>? Turns(StrayPlace place, double value)
    {
        var circuit = place.Put(placed.Circuit, value);
        var layout = new NetworkLayout(circuit);
        var isClosed = segment.Model.IsClosed.AddRange(
            new bool[circuit.Parts.Length - segment.Model.IsClosed.Length]);
        var form = DescriptorReduction.Reduce(layout, NetworkEquations.Assemble(layout, isClosed), out _);
        return form is null ? null
            : [.. PoleGroups.Of(SpectralBlocks.Of(form.A).Blocks)
                .Where(p => p.Value.Imaginary > 0)
                .SelectMany(p => Enumerable.Repeat(p.Value.Imaginary, p.Multiplicity))];
    }

    private double RatioWith(Circuit circuit, CancellationToken cancellation)
    {
        var solved = ModelCurve.Solve(circuit, placed.Observation, cancellation);
        if (!solved.Succeeded)
        {
            return double.PositiveInfinity;
        }

        var alignment = new RecordAlignment(solved.Value, placed.Given);
        var few = aligned.Compared.Thinned(MostSamples);
        return alignment.Near(few, aligned.Offset) is { } near
            ? Math.Sqrt(near.Variance(alignment.Estimated)) / noise
            : double.PositiveInfinity;
    }
}
