using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Compares two results documents.</summary>
public static class DocumentComparison
{
    /// <summary>Differences up to this fraction are rounding: the solver promises no more.</summary>
    public const double Rounding = 1e-9;

    // An instant of a flat extreme is known no better, as a fraction of the study.
    private const double RoundingOfTimes = 1e-6;

    /// <summary>Compares.</summary>
    /// <param name="before">The one that was.</param>
    /// <param name="after">The one that is.</param>
    /// <param name="within">Differences up to this fraction of a quantity's own size are overlooked; a turned
    /// verdict never is.</param>
    public static Comparison Compare(ResultsDocument before, ResultsDocument after, double within = Rounding)
    {
        within = Math.Max(within, Rounding);
        var sizes = new ChangeSizes(within, Math.Max(within, RoundingOfTimes)
            * Math.Max(before.Study.Until, after.Study.Until));
        var observations = NamedPairs<DocumentObservation>.Of(
            before.Observations, after.Observations, o => $"{o.Name} [{o.Unit}]");
        var figures = NamedPairs<DocumentFigure>.Of(
            before.Figures, after.Figures, f => $"{f.Name} [{f.Unit}]");
        var parts = NamedPairs<DocumentPart>.Of(before.Parts, after.Parts, p => $"{p.Kind} {p.Name}");
        var (observationsLeft, renamedObservations) = Renamings.Find(observations);
        var (partsLeft, renamedParts) = Renamings.Find(parts);
        return new Comparison(
            before,
            after,
            within,
            InputsOf(before, after),
            ValuesOf(parts),
            Names("cause", before.Causes, after.Causes),
            EventsOf(before, after, sizes),
            [.. observations.Pairs.Select(pair => Observation(pair.Before, pair.After, sizes))],
            [
                .. figures.Pairs.Select(pair => new FigureChange(
                    pair.Before.Name, pair.Before.Unit, sizes.Of(pair.Before.Value, pair.After.Value))),
            ],
            RequirementsOf(before, after, sizes),
            RatingsOf(parts, sizes),
            StressesOf(parts, before, after, sizes),
            [.. renamedObservations, .. renamedParts],
            [
                observationsLeft.Left("observation", o => o.Name),
                figures.Left("figure", f => f.Name),
                partsLeft.Left("part", p => $"{p.Kind} {p.Name}"),
            ],
            ChecksOf(before, after),
            [
                ChangedWords.Of("doubt", Doubts(before), Doubts(after)),
                ChangedWords.Of("warning", before.Warnings, after.Warnings),
                ChangedWords.Of("caution", before.Cautions, after.Cautions),
                ChangedWords.Of("check without judgement", before.NotJudged, after.NotJudged),
            ]);
    }

    private static NameChange Names(
        string kind, ImmutableArray<string> before, ImmutableArray<string> after) =>
        NamedPairs<string>.Of(before, after, name => name).Left(kind, name => name);

    private static ImmutableArray<string> Doubts(ResultsDocument document) =>
    [
        .. document.Parts.Where(part => part.LinearUpTo is { Holds: false })
            .Select(part => $"{part.Name} leaves the range its value is good for"),
    ];

    private static ImmutableArray<InputChange> InputsOf(ResultsDocument before, ResultsDocument after)
    {
        var (a, b) = (before.Circuit, after.Circuit);
        InputChange[] all =
        [
            new("title", a.Title ?? "none", b.Title ?? "none", IsOfFile: true),
            new("file", a.File, b.File, IsOfFile: true),
            new("SHA-256", a.Sha256, b.Sha256, IsOfFile: true),
            new("parts", $"{a.Parts}", $"{b.Parts}", IsOfFile: false),
            new("nodes", $"{a.Nodes}", $"{b.Nodes}", IsOfFile: false),
            new("stored quantities", $"{a.StoredQuantities}", $"{b.StoredQuantities}", IsOfFile: false),
            new("end", Time(before.Study.Until), Time(after.Study.Until), IsOfFile: false),
            new("start", before.Study.Start, after.Study.Start, IsOfFile: false),
        ];
        return [.. all.Where(input => input.Before != input.After)];
    }

    // A value is what was written: any difference is meant.
    private static ImmutableArray<StressChange> ValuesOf(NamedPairs<DocumentPart> parts) =>
    [
        .. parts.Pairs.Where(pair => pair.Before.Value is not null && pair.After.Value is not null
                && pair.Before.Value != pair.After.Value)
            .Select(pair => new StressChange(pair.Before.Name, "value", pair.Before.ValueUnit,
                new NumberChange(pair.Before.Value, pair.After.Value, Differs: true))),
    ];

    // Ten digits, so that a difference that counts is seen.
    private static string Time(double seconds) => EngineeringNumber.Format(seconds, "s", 10);

    private static ImmutableArray<EventChange> EventsOf(
        ResultsDocument before, ResultsDocument after, ChangeSizes sizes)
    {
        var events = NamedPairs<DocumentEvent>.Of(before.Events, after.Events, e => e.Name);
        return
        [
            .. events.Pairs.Where(pair => sizes.OfTimes(pair.Before.Time, pair.After.Time).Differs)
                .Select(pair => new EventChange(pair.Before.Name, pair.Before.Time, pair.After.Time)),
            .. events.Gone.Select(e => new EventChange(e.Name, e.Time, null)),
            .. events.New.Select(e => new EventChange(e.Name, null, e.Time)),
        ];
    }

    private static ObservationChange Observation(
        DocumentObservation before, DocumentObservation after, ChangeSizes sizes)
    {
        var size = Math.Max(before.Magnitude, after.Magnitude);
        var shares = NamedPairs<DocumentContribution>.Of(
            before.Contributions, after.Contributions, c => c.Cause);
        return new ObservationChange(
            before.Name,
            before.Unit,
            sizes.Of(before.Max.Value, after.Max.Value, size),
            sizes.OfTimes(before.Max.Time, after.Max.Time),
            sizes.Of(before.Min.Value, after.Min.Value, size),
            sizes.OfTimes(before.Min.Time, after.Min.Time),
            sizes.Of(before.Final, after.Final, size),
            Shares(shares, c => c.AtMax, sizes, size),
            Shares(shares, c => c.AtMin, sizes, size));
    }

    private static ImmutableArray<ContributionChange> Shares(
        NamedPairs<DocumentContribution> shares,
        Func<DocumentContribution, double?> read,
        ChangeSizes sizes,
        double size)
    {
        var all = shares.Pairs
            .Select(pair => (pair.Before.Cause, From: read(pair.Before), To: read(pair.After)))
            .Concat(shares.Gone.Select(c => (c.Cause, From: read(c), To: (double?)null)))
            .Concat(shares.New.Select(c => (c.Cause, From: (double?)null, To: read(c))));
        return
        [
            .. all.Select(s => new ContributionChange(s.Cause, sizes.Of(s.From, s.To, size)))
                .Where(share => share.Value.Differs)
                .OrderByDescending(s => Math.Abs((s.Value.After ?? 0) - (s.Value.Before ?? 0))),
        ];
    }

    private static ImmutableArray<RequirementChange> RequirementsOf(
        ResultsDocument before, ResultsDocument after, ChangeSizes sizes)
    {
        var pairs = NamedPairs<DocumentRequirement>
            .Of(before.Requirements, after.Requirements, r => r.Statement)
            .ThenBy(r => $"{r.Quantity} [{r.Unit}]"); // with another bound still the same one
        return
        [
            .. pairs.Pairs.Select(pair => new RequirementChange(
                pair.Before, pair.After, Margin(pair.Before, pair.After, sizes))),
            .. pairs.Gone.Select(r => new RequirementChange(r, null, sizes.Of(r.Margin, null))),
            .. pairs.New.Select(r => new RequirementChange(null, r, sizes.Of(null, r.Margin))),
        ];
    }

    // A margin is the small difference of the worst value and its bound: it is as exact as that value.
    private static NumberChange Margin(
        DocumentRequirement before, DocumentRequirement after, ChangeSizes sizes) =>
        sizes.Of(before.Margin, after.Margin, Math.Max(
            Math.Max(Math.Abs(before.Worst.Value ?? 0), Math.Abs(after.Worst.Value ?? 0)),
            Math.Max(Math.Abs(before.Margin ?? 0), Math.Abs(after.Margin ?? 0))));

    private static ImmutableArray<RatingChange> RatingsOf(NamedPairs<DocumentPart> parts, ChangeSizes sizes)
    {
        var changes = ImmutableArray.CreateBuilder<RatingChange>();
        foreach (var (before, after) in parts.Pairs)
        {
            Add(before.Name, before.Ratings, after.Ratings);
        }

        foreach (var part in parts.Gone)
        {
            Add(part.Name, part.Ratings, []);
        }

        foreach (var part in parts.New)
        {
            Add(part.Name, [], part.Ratings);
        }

        return changes.ToImmutable();

        void Add(string part, ImmutableArray<DocumentRating> before, ImmutableArray<DocumentRating> after)
        {
            var pairs = NamedPairs<DocumentRating>.Of(before, after, r => r.Unit);
            changes.AddRange(pairs.Pairs.Select(p => new RatingChange(
                part, p.Before.Unit, p.Before, p.After, sizes.Of(p.Before.Reached, p.After.Reached))));
            changes.AddRange(pairs.Gone.Select(r =>
                new RatingChange(part, r.Unit, r, null, sizes.Of(r.Reached, null))));
            changes.AddRange(pairs.New.Select(r =>
                new RatingChange(part, r.Unit, null, r, sizes.Of(null, r.Reached))));
        }
    }

    private static ImmutableArray<StressChange> StressesOf(
        NamedPairs<DocumentPart> parts, ResultsDocument before, ResultsDocument after, ChangeSizes sizes)
    {
        // What rounding left of nothing differs by any fraction: it is measured by the greatest of its kind.
        var floors = before.Parts.Concat(after.Parts).SelectMany(part => part.Stresses)
            .GroupBy(stress => stress.Name, StringComparer.Ordinal)
            .ToDictionary(kind => kind.Key, kind => kind.Max(s => Math.Abs(s.Value ?? 0)) * Rounding);
        var changes = parts.Pairs.SelectMany(pair => pair.Before.Stresses.Zip(pair.After.Stresses, (b, a) =>
            new StressChange(
                pair.Before.Name, b.Name, b.Unit,
                sizes.Of(Stress(b), Stress(a), floor: floors[b.Name]))));
        return
        [
            .. changes.Where(change => change.Value.Differs)
                .OrderByDescending(change => Math.Abs(change.Value.Relative ?? double.MaxValue)),
        ];
    }

    // A part is stressed by a peak's magnitude; energy has a direction, taken up or given off.
    private static double? Stress(DocumentStress stress) =>
        stress.Value is { } value && stress.Name != "energy" ? Math.Abs(value) : stress.Value;

    private static ImmutableArray<CheckChange> ChecksOf(ResultsDocument before, ResultsDocument after)
    {
        var checks = NamedPairs<DocumentCheck>.Of(before.SelfChecks, after.SelfChecks, c => c.Name);
        return
        [
            .. checks.Pairs.Where(pair => pair.Before.Holds != pair.After.Holds)
                .Select(pair => new CheckChange(pair.Before.Name, pair.Before.Holds, pair.After.Holds)),
            .. checks.Gone.Select(c => new CheckChange(c.Name, c.Holds, null)),
            .. checks.New.Select(c => new CheckChange(c.Name, null, c.Holds)),
        ];
    }
}
