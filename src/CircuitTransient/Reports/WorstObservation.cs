using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>The observation a reader should look at first, and which of its extremes.</summary>
/// <param name="Observation">The observation.</param>
/// <param name="AtMax">Whether its maximum matters (else its minimum).</param>
/// <param name="Why">Why it was chosen, in words.</param>
public sealed record WorstObservation(ObservationResult Observation, bool AtMax, string Why)
{
    private const string FirstObserved = "the first observed";

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
        foreach (var (quantity, used, value, what) in Uses(result))
        {
            if (used > greatest && ObservedQuantity.Find(result, quantity) is { } observation
                && IsFinite(observation))
            {
                var why = used > 1 ? $"the {what} exceeded most" : $"nearest to its {what}";
                var candidate = new WorstObservation(observation, IsAtMax(observation, value), why);
                (worst, greatest) = isMeant(candidate) ? (candidate, used) : (worst, greatest);
            }
        }

        var observed = result.Observations
            .Select(o => new WorstObservation(o, o.Greatest == o.Max, FirstObserved));
        return worst ?? observed.FirstOrDefault(isMeant);
    }

    private static IEnumerable<(Measurand Quantity, double Used, double? Value, string What)> Uses(
        TransientResult result)
    {
        var required = result.Circuit.Requirements;
        for (var i = 0; i < Math.Min(required.Length, result.Requirements.Length); i++)
        {
            if (required[i].Bound is SettlesTo)
            {
                continue; // when it settles is no extreme that causes could be asked for
            }

            var verdict = result.Requirements[i];
            var used = Used(required[i].Bound, verdict);
            yield return (required[i].Quantity, used, verdict.Worst.Value, "requirement");
        }

        foreach (var part in result.Parts)
        {
            var index = result.Circuit.Parts.ToList().FindIndex(p => p.Name == part.Name);
            foreach (var rating in part.Ratings)
            {
                if (index >= 0 && RatedQuantity(index, rating.Unit) is { } quantity)
                {
                    var used = rating.Used ?? (rating.Holds ? 0 : double.PositiveInfinity);
                    yield return (quantity, used, null, "rating");
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

    private static bool IsAtMax(ObservationResult observation, double? value)
    {
        return (value, observation.Max.Value, observation.Min.Value) switch
        {
            ({ } worst, { } max, { } min) => Math.Abs(worst - max) <= Math.Abs(worst - min),
            _ => observation.Greatest == observation.Max,
        };
    }
}
