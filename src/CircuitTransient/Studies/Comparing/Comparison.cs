using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>What differs between two results documents.</summary>
/// <param name="Within">Differences up to this fraction of a quantity's own size are none.</param>
/// <param name="Inputs">What differs in the circuit and the study.</param>
/// <param name="Values">The values of parts that differ.</param>
/// <param name="Causes">Causes by name.</param>
/// <param name="Events">Switchings whose instant differs, or that only one has.</param>
/// <param name="Observations">Every observation that both have.</param>
/// <param name="Figures">Every figure that both have.</param>
/// <param name="Requirements">Every requirement of either.</param>
/// <param name="Ratings">Every rating of either.</param>
/// <param name="Stresses">The stresses of parts that differ.</param>
/// <param name="Renamed">What bears another name and has the same figures.</param>
/// <param name="Missing">Observations, figures and parts that only one has.</param>
/// <param name="Checks">Self-checks whose verdict differs, or that only one has.</param>
/// <param name="Notes">Warnings, cautions and checks without judgement, as words.</param>
public sealed record Comparison(
    ResultsDocument Before,
    ResultsDocument After,
    double Within,
    ImmutableArray<InputChange> Inputs,
    ImmutableArray<StressChange> Values,
    NameChange Causes,
    ImmutableArray<EventChange> Events,
    ImmutableArray<ObservationChange> Observations,
    ImmutableArray<FigureChange> Figures,
    ImmutableArray<RequirementChange> Requirements,
    ImmutableArray<RatingChange> Ratings,
    ImmutableArray<StressChange> Stresses,
    ImmutableArray<Renaming> Renamed,
    ImmutableArray<NameChange> Missing,
    ImmutableArray<CheckChange> Checks,
    ImmutableArray<NameChange> Notes)
{
    /// <summary>How many verdicts turned that way.</summary>
    public int Turned(VerdictTurn turn) =>
        Requirements.Count(r => r.Turn == turn) + Ratings.Count(r => r.Turn == turn)
        + Checks.Count(c => c.Turn == turn);

    /// <summary>The requirements that are judged no longer.</summary>
    public int RequirementsGone => Requirements.Count(r => r.After is null);

    /// <summary>The ratings that are judged no longer; a part that now bears another name may still
    /// be.</summary>
    public int RatingsGone => Ratings.Count(gone => gone.After is null && !Renamed.Any(part =>
        part.Before == gone.Part
        && Ratings.Any(r => r.Before is null && r.Part == part.After && r.Unit == gone.Unit)));

    /// <summary>Whether the two are of different circuits: neither the file nor the title is the same, and
    /// fewer than half of the parts of the smaller one are in the other.</summary>
    public bool IsOfDifferentCircuits
    {
        get
        {
            var (one, other) = (Before.Circuit, After.Circuit);
            if (one.File == other.File || (one.Title is { } title && title == other.Title))
            {
                return false;
            }

            var common = Before.Parts.Select(part => part.Name)
                .Intersect(After.Parts.Select(part => part.Name), StringComparer.Ordinal).Count()
                + Renamed.Count(renaming => renaming.Kind == "part");
            return 2 * common < Math.Min(Before.Parts.Length, After.Parts.Length);
        }
    }

    /// <summary>Whether a verdict turned for the worse, or one is missing because the circuits are
    /// different ones.</summary>
    public bool IsWorse => Turned(VerdictTurn.Worse) > 0
        || (IsOfDifferentCircuits && RequirementsGone + RatingsGone > 0);

    /// <summary>Whether nothing at all differs but the names and contents of the files.</summary>
    public bool IsSame =>
        Causes.IsEmpty && Events.IsEmpty && Stresses.IsEmpty && Renamed.IsEmpty && Checks.IsEmpty
        && Missing.All(m => m.IsEmpty) && Notes.All(n => n.IsEmpty)
        && Inputs.All(i => i.IsOfFile) && Values.IsEmpty
        && !Observations.Any(o => o.Differs) && !Figures.Any(f => f.Value.Differs)
        && !Requirements.Any(r => r.Differs) && !Ratings.Any(r => r.Differs);
}

/// <summary>Which way a verdict turned.</summary>
public enum VerdictTurn
{
    /// <summary>It did not, or there was none before.</summary>
    None,

    /// <summary>Held before, or was not there, and is broken.</summary>
    Worse,

    /// <summary>Was broken before and holds.</summary>
    Better,
}

/// <summary>A number before and after.</summary>
/// <param name="Before">Null where infinite, open or missing.</param>
/// <param name="After">Likewise.</param>
/// <param name="Differs">Whether the difference is more than is to be overlooked.</param>
public sealed record NumberChange(double? Before, double? After, bool Differs)
{
    /// <summary>After less before.</summary>
    public double? Difference => After - Before;

    /// <summary>The difference as a fraction of the magnitude before.</summary>
    public double? Relative => Before is 0 ? null : Difference / Math.Abs(Before ?? 0);
}

/// <summary>Something of the circuit or study, in words.</summary>
/// <param name="IsOfFile">Whether it is of the file (its name, title, digest) and not of what is
/// computed.</param>
public sealed record InputChange(string What, string Before, string After, bool IsOfFile);

/// <summary>Names that only one document has.</summary>
/// <param name="Kind">Of what: <c>cause</c>, <c>part</c>, <c>warning</c>.</param>
/// <param name="Gone">Only before.</param>
/// <param name="New">Only after.</param>
public sealed record NameChange(string Kind, ImmutableArray<string> Gone, ImmutableArray<string> New)
{
    /// <summary>What both have, with other figures in it.</summary>
    public ImmutableArray<WordsChange> Changed { get; init; } = [];

    /// <summary>Whether there are none.</summary>
    public bool IsEmpty => Gone.IsEmpty && New.IsEmpty && Changed.IsEmpty;
}

/// <summary>Words before and after, alike but for the figures in them.</summary>
public sealed record WordsChange(string Before, string After);

/// <summary>A switching; an instant is null where it is in one document only.</summary>
public sealed record EventChange(string Name, double? Before, double? After);

/// <summary>An observation in both.</summary>
/// <param name="MaxTime">The instant of its maximum, in seconds.</param>
/// <param name="MinTime">The instant of its minimum, in seconds.</param>
/// <param name="AtMax">Contributions at the maximum that differ, the most changed first.</param>
/// <param name="AtMin">The same at the minimum.</param>
public sealed record ObservationChange(
    string Name,
    string Unit,
    NumberChange Max,
    NumberChange MaxTime,
    NumberChange Min,
    NumberChange MinTime,
    NumberChange Final,
    ImmutableArray<ContributionChange> AtMax,
    ImmutableArray<ContributionChange> AtMin)
{
    /// <summary>Whether anything of it differs.</summary>
    public bool Differs =>
        Max.Differs || Min.Differs || Final.Differs || MaxTime.Differs || MinTime.Differs
        || !AtMax.IsEmpty || !AtMin.IsEmpty;
}

/// <summary>A cause's share in an extreme; null where the cause is in one document only.</summary>
public sealed record ContributionChange(string Cause, NumberChange Value);

/// <summary>A figure read off a waveform, in both.</summary>
public sealed record FigureChange(string Name, string Unit, NumberChange Value);

/// <summary>A requirement; null where only one document has it.</summary>
/// <param name="Before">As it was.</param>
/// <param name="After">As it is; of another bound where that was changed.</param>
public sealed record RequirementChange(
    DocumentRequirement? Before, DocumentRequirement? After, NumberChange Margin)
{
    /// <summary>Which way the verdict turned.</summary>
    public VerdictTurn Turn => Verdicts.Turn(Before?.Holds, After?.Holds);

    /// <summary>Whether the margin, the bound or the verdict differs.</summary>
    public bool Differs =>
        Margin.Differs || Before is null || After is null || Before.Holds != After.Holds
        || Before.Statement != After.Statement;
}

/// <summary>A rating of a part; null where only one document has it.</summary>
public sealed record RatingChange(
    string Part, string Unit, DocumentRating? Before, DocumentRating? After, NumberChange Reached)
{
    /// <summary>Which way the verdict turned.</summary>
    public VerdictTurn Turn => Verdicts.Turn(Before?.Holds, After?.Holds);

    /// <summary>Whether what is reached, the rating or the verdict differs.</summary>
    public bool Differs =>
        Reached.Differs || Before is null || After is null || Before.Holds != After.Holds
        || Before.Rated != After.Rated;
}

/// <summary>A stress of a part, or its value.</summary>
public sealed record StressChange(string Part, string Stress, string Unit, NumberChange Value);

/// <summary>Something with the same figures under another name.</summary>
public sealed record Renaming(string Kind, string Before, string After);

/// <summary>A self-check; null where only one document has it.</summary>
public sealed record CheckChange(string Name, bool? Before, bool? After)
{
    /// <summary>Which way the verdict turned.</summary>
    public VerdictTurn Turn => Verdicts.Turn(Before, After);
}

/// <summary>Verdicts before and after.</summary>
internal static class Verdicts
{
    /// <summary>A broken one that was not there before is worse; one that was taken away is no
    /// verdict.</summary>
    public static VerdictTurn Turn(bool? before, bool? after) => (before, after) switch
    {
        (not false, false) => VerdictTurn.Worse,
        (false, true) => VerdictTurn.Better,
        _ => VerdictTurn.None,
    };
}
