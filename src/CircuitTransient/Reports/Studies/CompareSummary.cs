using System.Collections.Immutable;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Reports.Studies;

/// <summary>A comparison for the terminal: verdict first, then what turned, then what moved.</summary>
public static partial class CompareSummary
{
    private const int MostRows = 20;
    private const int DigestShown = 12;
    private const int DigestLength = 64;

    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary.</summary>
    /// <param name="comparison">What differs.</param>
    /// <param name="before">The first file, as the user named it.</param>
    /// <param name="after">The second file.</param>
    /// <param name="colour">Whether headings are bold.</param>
    public static string Write(Comparison comparison, string before, string after, bool colour = false)
    {
        var text = new SummaryText(colour);
        var title = comparison.After.Circuit.Title ?? comparison.After.Circuit.File;
        text.Title($"{title}: before {before}, after {after}");
        text.Paragraph(Verdict(comparison), indent: 0);
        WriteRequirements(text, comparison);
        WriteRatings(text, comparison);
        WriteInputs(text, comparison);
        WriteObservations(text, comparison);
        WriteFigures(text, comparison);
        WriteStresses(text, comparison);
        WriteNotes(text, comparison);
        text.Blank();
        text.Paragraph(
            $"Overlooked are differences up to {Fraction(comparison.Within)} of a quantity's own size (an " +
            "observation's is its greatest magnitude); a turned verdict never is.",
            indent: 0);
        text.End([]);
        return text.ToString();
    }

    private static void WriteRequirements(SummaryText text, Comparison comparison)
    {
        var shown = comparison.Requirements.Where(r => r.Differs)
            .OrderByDescending(r => r.Turn == VerdictTurn.Worse)
            .ThenByDescending(r => r.Turn == VerdictTurn.Better).ToArray();
        if (shown.Length == 0)
        {
            return;
        }

        text.Blank();
        text.Table([Left, Prose, Prose], shown.Take(MostRows).Select(r => ImmutableArray.Create(
            Turned(r.Before?.Holds, r.After?.Holds),
            Statement(r),
            $"{Spare(r.Before)} → {Spare(r.After)}")));
        WriteRest(text, shown.Length);
        var same = comparison.Requirements.Length - shown.Length;
        if (same > 0)
        {
            text.Paragraph(same == 1
                ? "one more requirement is as it was"
                : $"{same} more requirements are as they were");
        }
    }

    private static string Statement(RequirementChange change) =>
        change is { Before: { } before, After: { } after } && before.Statement != after.Statement
            ? $"{after.Statement} (it was: {before.Statement})"
            : (change.After ?? change.Before)!.Statement;

    private static string Spare(DocumentRequirement? requirement) => requirement switch
    {
        null => "not required",
        { Margin: { } margin } when margin >= 0 =>
            $"{ReportWords.Number(margin, requirement.Unit)} to spare",
        { Margin: { } margin } => $"broken by {ReportWords.Number(-margin, requirement.Unit)}",
        { Holds: true } => "held",
        _ => "broken without limit, or nothing to judge",
    };

    private static string Turned(bool? before, bool? after) => (before, after) switch
    {
        (true, true) => "held",
        (false, false) => "still broken",
        _ => $"{Word(before)} → {Word(after)}",
    };

    private static string Word(bool? holds) => holds switch
    {
        true => "held",
        false => "broken",
        null => "none",
    };

    private static void WriteRatings(SummaryText text, Comparison comparison)
    {
        var shown = comparison.Ratings.Where(r => r.Differs)
            .OrderByDescending(r => r.Turn == VerdictTurn.Worse)
            .ThenByDescending(r => r.After?.Used ?? 0).ToArray();
        if (shown.Length > 0)
        {
            text.Heading("Ratings");
            text.Table(
                [Left, Prose, Left, Right, Left],
                shown.Take(MostRows).Select(r => ImmutableArray.Create(
                    Turned(r.Before?.Holds, r.After?.Holds),
                    r.Part,
                    ReportWords.Rated(r.Unit),
                    Used(r.Before, r.Unit),
                    $"→ {Used(r.After, r.Unit)}")));
            WriteRest(text, shown.Length);
        }
    }

    private static string Used(DocumentRating? rating, string unit) => rating is null
        ? "not rated"
        : $"{ReportWords.Number(rating.Reached, unit)} of {ReportWords.Number(rating.Rated, unit)}";

    private static void WriteInputs(SummaryText text, Comparison comparison)
    {
        var names = comparison.Missing.Prepend(comparison.Causes).Where(change => !change.IsEmpty).ToArray();
        if (names.Length == 0 && comparison is
            {
                Inputs.IsEmpty: true, Values.IsEmpty: true, Renamed.IsEmpty: true, Events.IsEmpty: true,
            })
        {
            return;
        }

        text.Heading("What went in");
        text.Table([Left, Prose, Prose], comparison.Inputs.Select(input => ImmutableArray.Create(
            input.What, Short(input.Before), $"→ {Short(input.After)}")));
        text.Table([Prose, Right, Left, Right], comparison.Values.Select(value => ImmutableArray.Create(
            value.Part,
            ReportWords.Number(value.Value.Before, value.Unit),
            $"→ {ReportWords.Number(value.Value.After, value.Unit)}",
            Relative(value.Value))));
        foreach (var renaming in comparison.Renamed)
        {
            text.Paragraph(
                $"{renaming.Kind} {renaming.Before} now bears the name {renaming.After}: the same figures",
                hanging: 2);
        }

        foreach (var change in names)
        {
            WriteNames(text, change);
        }

        foreach (var change in comparison.Events)
        {
            text.Paragraph($"{change.Name}: {Instant(change.Before)} → {Instant(change.After)}");
        }
    }

    private static string Short(string value) =>
        value.Length == DigestLength && !value.Contains(' ', StringComparison.Ordinal)
            ? value[..DigestShown] + "…"
            : value;

    private static string Instant(double? time) =>
        time is { } at ? $"at {ReportWords.Number(at, "s")}" : "never";

    private static void WriteNames(SummaryText text, NameChange change)
    {
        if (!change.Gone.IsEmpty)
        {
            text.Paragraph($"{change.Kind} gone: {string.Join("; ", change.Gone)}", hanging: 2);
        }

        if (!change.New.IsEmpty)
        {
            text.Paragraph($"{change.Kind} new: {string.Join("; ", change.New)}", hanging: 2);
        }

        foreach (var words in change.Changed)
        {
            text.Paragraph($"{change.Kind} changed: {words.Before} → {words.After}", hanging: 2);
        }
    }

    private static void WriteNotes(SummaryText text, Comparison comparison)
    {
        var notes = comparison.Notes.Where(change => !change.IsEmpty).ToArray();
        if (notes.Length == 0 && comparison.Checks.IsEmpty)
        {
            return;
        }

        text.Heading("Checks, warnings and cautions");
        foreach (var check in comparison.Checks)
        {
            text.Paragraph($"self-check {check.Name}: {Turned(check.Before, check.After)}", hanging: 2);
        }

        foreach (var change in notes)
        {
            WriteNames(text, change);
        }
    }

    private static void WriteRest(SummaryText text, int count, int most = MostRows)
    {
        if (count > most)
        {
            text.Paragraph($"and {count - most} more, with --json");
        }
    }
}
