using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;

namespace CircuitTransient.Reports.Html;

/// <summary>A waveform as the page carries it: terms that grow with the scales of causes.</summary>
/// <param name="Terms">The terms; one without causes where nothing can be scaled.</param>
/// <param name="IsQuadratic">Whether its causes have joint terms.</param>
/// <param name="Peaks">Instants that the page must hold exactly.</param>
internal sealed record PageWave(
    ImmutableArray<PageTerm> Terms, bool IsQuadratic, ImmutableArray<double> Peaks)
{
    /// <summary>What a product is multiplied by, whose terms are those of its factors; else null.</summary>
    public double? Factor { get; init; }

    /// <summary>The terms of other breakdowns, by their place in the result's list; empty where there are
    /// none.</summary>
    public ImmutableArray<(int Breakdown, ImmutableArray<BreakdownTerm> Terms)> Others { get; init; } = [];

    /// <summary>How many waveforms it carries.</summary>
    public int Count => Terms.Length + Others.Sum(o => o.Terms.Length);

    /// <summary>The waveform of an observation.</summary>
    public static PageWave Of(TransientResult result, ObservationResult observed, Observation? declared)
    {
        ImmutableArray<double> peaks = [observed.Max.Time, observed.Min.Time];
        var isQuadratic = observed.Contributions.Length > result.Causes.Length;
        if (!isQuadratic)
        {
            var own = observed.ByCause.Select((samples, cause) => new PageTerm(cause, null, samples));
            var index = result.Observations.IndexOf(observed);
            return new([.. own], false, peaks)
            {
                Others =
                [
                    .. result.OtherBreakdowns.Select((b, n) => (n, b.Observations[index]))
                        .Where(o => !o.Item2.IsEmpty),
                ],
            };
        }

        var followed = declared is null ? null : Followed(result, declared.Quantity, declared.Window);
        return followed is null
            ? new([new(null, null, observed.Total)], true, peaks)
            : Of(followed, isQuadratic, peaks);
    }

    /// <summary>The waveform of what is judged but not observed.</summary>
    public static PageWave Of(FollowedWave followed, bool isQuadratic, ImmutableArray<double> peaks) => new(
        [.. followed.Terms.Select(t => new PageTerm(t.Cause, t.WithCause, t.Samples))], isQuadratic, peaks)
    {
        Factor = followed.Factor,
    };

    /// <summary>The waveform kept for a quantity; null where there is none.</summary>
    public static FollowedWave? Followed(TransientResult result, Measurand quantity, Window window)
    {
        var from = window.From is null ? 0 : DeclaredInstant.Seconds(result, window.From) ?? 0;
        return result.Followed.Where(f => f.Quantity == quantity && (f.From == 0 || f.From == from))
            .OrderByDescending(f => f.From == from).FirstOrDefault();
    }
}

/// <summary>A term of a waveform; its causes are null where nothing scales it.</summary>
internal sealed record PageTerm(int? Cause, int? WithCause, ImmutableArray<double> Samples);
