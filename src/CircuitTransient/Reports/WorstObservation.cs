using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>The observation a reader should look at first, and which of its extremes.</summary>
/// <param name="Observation">The observation; or the quantity as measured within a requirement's
/// window.</param>
/// <param name="AtMax">Whether its maximum matters (else its minimum).</param>
/// <param name="Why">Why it was chosen, in words.</param>
public sealed record WorstObservation(ObservationResult Observation, bool AtMax, string Why)
{
    private const string FirstObserved = "the first observed";

    /// <summary>The observation whose waveform shows it; null where none does.</summary>
    public ObservationResult? Shown { get; init; } = Observation;

    /// <summary>Whether a requirement's window has it apart from what is observed.</summary>
    public bool IsWithin => !ReferenceEquals(Shown, Observation);

    /// <summary>The extreme that matters.</summary>
    public Extreme Extreme => AtMax ? Observation.Max : Observation.Min;

    /// <summary>The breakdown since an event at that extreme; null where there is none.</summary>
    public SinceEvent? Since => AtMax ? Observation.After?.AtMax : Observation.After?.AtMin;

    /// <summary>What a cause has in the extreme.</summary>
    public double? Share(Contribution contribution) => AtMax ? contribution.AtMax : contribution.AtMin;

    /// <summary>The one whose requirement or rating is exceeded or used most; else the first.</summary>
    public static WorstObservation? Find(TransientResult result) => Find(result, _ => true);

    /// <summary>The worst of those whose extreme follows an event, and is broken down since it.</summary>
    public static WorstObservation? FindSinceEvent(TransientResult result) =>
        Find(result, worst => worst.Since is not null) is { Since: not null } found
            ? found with
            {
                Why = (found.Why == FirstObserved ? "the first" : "the worst") + " that follows the event",
            }
            : null;

    private static WorstObservation? Find(TransientResult result, Func<WorstObservation, bool> isMeant)
    {
        if (result.Observations.IsEmpty)
        {
            return null;
        }

        WorstObservation? worst = null;
        var greatest = 0.0;
        foreach (var (candidate, used) in Required(result).Concat(Rated(result)))
        {
            if (used > greatest && isMeant(candidate))
            {
                (worst, greatest) = (candidate, used);
            }
        }

        var observed = result.Observations
            .Select(o => new WorstObservation(o, o.Greatest == o.Max, FirstObserved));
        return worst ?? observed.FirstOrDefault(isMeant);
    }

    private static IEnumerable<(WorstObservation Worst, double Used)> Required(TransientResult result)
    {
        var required = result.Circuit.Requirements;
        for (var i = 0; i < Math.Min(required.Length, result.Requirements.Length); i++)
        {
            if (required[i].Bound is SettlesTo)
            {
                continue; // when it settles is no extreme that causes could be asked for
            }

            var used = Used(required[i].Bound, result.Requirements[i]);
            var why = WhyOf(used, "requirement");
            var worst = required[i].Quantity is Figure figure
                ? ReadOff(result, figure, $"{why} is read off it")
                : Judged(result, required[i].Quantity, result.Requirements[i], why);
            if (worst is not null && (worst.Shown is not null || used > 1))
            {
                yield return (worst, used); // what is not observed comes up only where it is broken
            }
        }
    }

    private static string WhyOf(double used, string what) =>
        used > 1 ? $"the {what} exceeded most" : $"nearest to its {what}";

    /// <summary>The worst value itself: an extreme that is observed, or the one within the requirement's
    /// window; never another figure.</summary>
    private static WorstObservation? Judged(
        TransientResult result, Measurand quantity, RequirementResult verdict, string why)
    {
        var observed = ObservedQuantity.All(result, quantity).ToArray();
        foreach (var (observation, sign) in observed)
        {
            if (JudgedExtreme.IsMax(observation, verdict.Worst, sign, result.Until) is { } atMax)
            {
                return new WorstObservation(observation, atMax, why);
            }
        }

        return verdict.Within is { } within
            && JudgedExtreme.IsMax(within, verdict.Worst, 1, result.Until) is { } isMax
            ? new WorstObservation(within, isMax, why)
            {
                Shown = observed.Select(o => o.Observation).FirstOrDefault(),
            }
            : null;
    }

    private static WorstObservation? ReadOff(TransientResult result, Figure figure, string why) =>
        ObservedQuantity.Find(result, figure) is { } observation && IsFinite(observation)
            ? new WorstObservation(observation, observation.Greatest == observation.Max, why)
            : null;

    private static IEnumerable<(WorstObservation Worst, double Used)> Rated(TransientResult result)
    {
        foreach (var part in result.Parts)
        {
            var index = result.Circuit.Parts.ToList().FindIndex(p => p.Name == part.Name);
            foreach (var rating in part.Ratings)
            {
                if (index >= 0 && RatedQuantity(index, rating.Unit) is { } quantity
                    && ObservedQuantity.Find(result, quantity) is { } observation && IsFinite(observation))
                {
                    var used = rating.Used ?? (rating.Holds ? 0 : double.PositiveInfinity);
                    yield return (new WorstObservation(
                        observation, observation.Greatest == observation.Max, WhyOf(used, "rating")), used);
                }
            }
        }
    }

    // The worst value as a fraction of its bound; only the order of these figures is used.
    private static double Used(Bound bound, RequirementResult verdict)
    {
        var limit = bound switch
        {
            Limits { Lower: { } lower, Upper: { } upper } => Math.Max(Math.Abs(lower), Math.Abs(upper)),
            Limits { Lower: { } lower } => Math.Abs(lower),
            Limits { Upper: { } upper } => Math.Abs(upper),
            _ => 0,
        };
        if (verdict.Margin is not { } margin || limit == 0)
        {
            return verdict.Holds ? 0 : double.PositiveInfinity;
        }

        return 1 - (margin / limit);
    }

    private static Measurand? RatedQuantity(int part, string unit) => unit switch
    {
        "V" => new VoltageAcross(part),
        "A" => new CurrentThrough(part),
        "W" => new PowerIn(part),
        "J" => new EnergyIn(part),
        "A²s" => new JouleIntegral(part),
        "V/s" => new RateOfChange(new VoltageAcross(part)),
        "A/s" => new RateOfChange(new CurrentThrough(part)),
        _ => null,
    };

    // An impulse is infinite and stands among the impulses; the other extreme would explain the wrong thing.
    private static bool IsFinite(ObservationResult observation) =>
        observation.Max.Value is not null && observation.Min.Value is not null;
}
