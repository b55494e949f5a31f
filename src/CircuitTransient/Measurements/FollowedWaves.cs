using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>Takes apart by causes what is judged and what is quadratic.</summary>
public static class FollowedWaves
{
    private const int MostTerms = 210; // every pair of twenty causes
    private const int MostTermsInAll = 600; // some ten megabytes at two thousand samples

    /// <summary>The waveforms at chosen instants; what has too many terms or is undetermined is left
    /// out.</summary>
    internal static ImmutableArray<FollowedWave> Of(
        CurveBuilder curves, WindowTimes times, ImmutableArray<double> samples)
    {
        var found = new List<(Measurand Quantity, double From, (int, int?)[] Pairs, Curve[] Terms)>();
        var count = 0;
        foreach (var (quantity, from) in Quantities(curves, times).Distinct())
        {
            var (pairs, terms) = QuantityFactors.Of(curves.Solution.Circuit, quantity) is { } factors
                ? Factors(factors)
                : Terms(quantity, from);
            count += pairs.Length;
            if (pairs.Length <= MostTerms && count <= MostTermsInAll)
            {
                var all = terms.OfType<Curve>().ToArray();
                if (all.Length == pairs.Length && all.Length > 0)
                {
                    found.Add((quantity, from, pairs, all));
                }
            }
        }

        var waves = Waveform.Of([.. found.SelectMany(f => f.Terms)], curves.Solution, samples);
        var next = 0;
        return
        [
            .. found.Select(f => new FollowedWave(
                f.Quantity, f.From, [.. f.Pairs.Select(p => new WaveTerm(p.Item1, p.Item2, waves[next++]))])
            {
                Factor = QuantityFactors.Of(curves.Solution.Circuit, f.Quantity)?.Factor,
            }),
        ];

        // A product by its two factors, cause by cause: far fewer than its pairs.
        ((int, int?)[] Pairs, IEnumerable<Curve?> Terms) Factors(QuantityFactors factors)
        {
            Measurand[] sides =
                factors.First == factors.Second ? [factors.First] : [factors.First, factors.Second];
            var own = sides.SelectMany(side => Pairs(side, curves.Solution.Causes.Length)
                .Select(pair => (Side: side, Pair: pair))).ToArray();
            return ([.. own.Select(o => o.Pair)], own.Select(o => Term(curves, o.Side, o.Pair, 0)));
        }

        ((int, int?)[] Pairs, IEnumerable<Curve?> Terms) Terms(Measurand quantity, double from)
        {
            var pairs = Pairs(quantity, curves.Solution.Causes.Length).Take(MostTerms + 1).ToArray();
            return (pairs, pairs.Select(pair => Term(curves, quantity, pair, from)));
        }
    }

    private static Curve? Term(
        CurveBuilder curves, Measurand quantity, (int One, int? Other) pair, double from) =>
        pair.Other is { } other
            ? curves.OfPair(quantity, pair.One, other, from)
            : curves.Of(quantity, Share.Own, pair.One, from);

    private static IEnumerable<(int, int?)> Pairs(Measurand quantity, int causes)
    {
        for (var one = 0; one < causes; one++)
        {
            if (!QuantityFactors.IsQuadratic(quantity))
            {
                yield return (one, null);
                continue;
            }

            for (var other = one; other < causes; other++)
            {
                yield return (one, other);
            }
        }
    }

    private static IEnumerable<(Measurand Quantity, double From)> Quantities(
        CurveBuilder curves, WindowTimes times)
    {
        var circuit = curves.Solution.Circuit;
        foreach (var required in circuit.Requirements.Where(r => r.Quantity is not Figure))
        {
            yield return Since(required.Quantity, required.Window);
        }

        for (var part = 0; part < circuit.Parts.Length; part++)
        {
            foreach (var rating in circuit.Parts[part].Ratings)
            {
                if (Rated(circuit.Parts[part], part, rating.Kind) is { } quantity)
                {
                    yield return (quantity, 0);
                }
            }
        }

        for (var part = 0; part < circuit.Parts.Length; part++)
        {
            if (circuit.Parts[part].LinearUpTo is { } limit)
            {
                yield return (Limited(part, limit), 0);
            }
        }

        foreach (var observed in circuit.Observations.Where(o => QuantityFactors.IsQuadratic(o.Quantity)))
        {
            yield return Since(observed.Quantity, observed.Window);
        }

        (Measurand, double) Since(Measurand quantity, Window window) =>
            (quantity, CurveBuilder.GatheredFrom(quantity, times.Of(window)?.From ?? 0));
    }

    /// <summary>The quantity whose waveform tells how far a part's value may be believed.</summary>
    public static Measurand Limited(int part, LinearLimit limit) =>
        limit.IsVoltage ? new VoltageAcross(part) : new CurrentThrough(part);

    /// <summary>The quantity whose waveform tells what a rating is used for; null where none does.</summary>
    public static Measurand? Rated(Part part, int index, RatingKind kind) => kind switch
    {
        RatingKind.PeakVoltage => new VoltageAcross(index),
        RatingKind.PeakCurrent => new CurrentThrough(index),
        RatingKind.VoltageRate => new RateOfChange(new VoltageAcross(index)),
        RatingKind.CurrentRate => new RateOfChange(new CurrentThrough(index)),
        RatingKind.JouleIntegral => new JouleIntegral(index),
        RatingKind.Energy when part is Capacitor => new VoltageAcross(index),
        RatingKind.Energy when part is Inductor => new CurrentThrough(index),
        RatingKind.MeanPower when part is Capacitor or Inductor => null,
        _ => new EnergyIn(index),
    };
}
