using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Measurements;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Studies.Statistics;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What the tolerances come to in sentences, alike on the terminal and on the page.</summary>
internal static partial class SpreadWords
{
    private const int MostValuesNamed = 16;
    private const int MostShareDigits = 12; // what a double of nearly 100 still tells apart

    /// <summary>The verdict in one sentence.</summary>
    public static string Verdict(SpreadResult spread)
    {
        if (!spread.Nominal.ChecksHold || spread.Worst?.Result.ChecksHold == false)
        {
            return "A self-check failed: do not use these figures.";
        }

        var required = Judged(spread, StudyFigureKind.Margin);
        var rated = Judged(spread, StudyFigureKind.RatingUsed);
        var unsolvable = spread.Account.Unsolvable switch
        {
            0 => "",
            1 => "at one of the points solved the circuit has no unique solution",
            var count => $"at {count} of the points solved the circuit has no unique solution",
        };
        var doubt = SpreadDoubts.Of(spread) ?? "";
        if (required.Length + rated.Length == 0)
        {
            string[] noted = [.. new[] { unsolvable, doubt }.Where(words => words.Length > 0)];
            return string.Join("; ", noted.Prepend("Nothing was required or rated, so there is no verdict"))
                + ".";
        }

        string[] tallies = [.. Tallies(required, rated, f => f.Holds == false)];
        var said = string.Join("; ", tallies.Concat([unsolvable, doubt]).Where(words => words.Length > 0));
        string[] nominally = [.. Tallies(required, rated, IsBrokenNominally)];
        var isBroken = required.Concat(rated).Any(IsBrokenNominally);
        return spread.AllHold ? $"Holds with every tolerance: {said}."
            : spread.Nominal.AllHold || !isBroken ? $"Does not hold with every tolerance: {said}."
            : nominally.SequenceEqual(tallies) ? $"Does not hold even with every value nominal: {said}."
            : $"Does not hold even with every value nominal, where {string.Join(" and ", nominally)}; over "
                + $"the tolerances {said}.";
    }

    /// <summary>What was solved, and what of it is proven.</summary>
    public static string Account(SpreadResult spread)
    {
        var account = spread.Account;
        var values = spread.Varied.Values.Length;
        var inside = $"{account.InteriorPoints:N0} points between them";
        var all = ReportWords.Count(account.Corners);
        var toleranced = values == 1 ? "the one value that has" : $"the {values} values that have";
        var corners = account.AllCorners
            ? $"All {account.Corners:N0} corners of {toleranced} a tolerance were solved"
            : $"{account.CornerPoints:N0} of the {all} corners of {toleranced} a tolerance were solved, "
                + "chosen by each value's own effect, at random, and by exchanging single values for as long "
                + "as that helped";
        var exact = account.WhyExact is { } why ? $" The exact engine solved every point ({why})." : "";
        var worse = spread.Figures.Sum(f =>
            (IsInside(spread, f, f.Least) ? 1 : 0) + (IsInside(spread, f, f.Greatest) ? 1 : 0));
        var shown = account.WorseInside > 0 ? " in the four digits shown" : "";
        return worse == 0
            ? $"{corners}; {inside} gave nothing worse{shown}: searched there, not proven.{exact}"
            : $"{corners}, and {inside}; {Count(worse, "extreme")} lie{(worse == 1 ? "s" : "")} between the "
                + $"corners: searched there, not proven.{exact}";
    }

    /// <summary>Whether an extreme stands between the corners and is worse than the worst corner in the
    /// digits shown, or turns a verdict that the corner does not.</summary>
    public static bool IsInside(SpreadResult spread, FigureRange range, ExtremePoint? extreme) =>
        extreme is { IsCorner: false }
        && (extreme.AtWorstCorner is not { } corner
            || Reached(spread, range.Figure, corner, null)
                != Reached(spread, range.Figure, extreme.Value, null)
            || (Judgement.IsJudged(range.Figure)
                && Judgement.Holds(range.Figure, corner) != Judgement.Holds(range.Figure, extreme.Value)));

    /// <summary>The values of a point that matter: <c>Supply 1.025 kV (+10 %)</c>.</summary>
    public static string Point(SpreadResult spread, ExtremePoint point)
    {
        var values = spread.Varied.Values;
        var moved = Enumerable.Range(0, values.Length).Where(i => point.Matters[i]).ToArray();
        if (moved.Length == 0)
        {
            return "every value nominal";
        }

        var rest = values.Length - moved.Length;
        var named = moved.OrderByDescending(i => Step(point, i)).Take(MostValuesNamed)
            .Select(i => (Value: values[i], Place: point.Point[i]))
            .Select(v => $"{v.Value.Name} {Number(v.Place, v.Value.Unit)}{Off(v.Value, v.Place)}");
        return string.Join(", ", named)
            + (moved.Length > MostValuesNamed ? $" and {moved.Length - MostValuesNamed} more" : "")
            + rest switch
            {
                0 => "",
                1 => "; the other one nominal",
                _ => $"; the other {rest} nominal",
            };
    }

    /// <summary>How far a value stands from its nominal one, in per cent; empty where that is zero.</summary>
    public static string Off(VariedValue value, double place)
    {
        if (value.Nominal == 0)
        {
            return "";
        }

        var percent = 100 * ((place / value.Nominal) - 1);
        return $" ({(percent > 0 ? "+" : "")}{percent.ToString("0.##", CultureInfo.InvariantCulture)} %)";
    }

    /// <summary>A figure's name as it is judged: the requirement's own words, or whose rating.</summary>
    public static string Name(SpreadResult spread, StudyFigure figure) => figure.Kind switch
    {
        StudyFigureKind.Margin => spread.Varied.Circuit.Requirements[figure.Index].Statement,
        StudyFigureKind.RatingUsed =>
            $"{Rated(Rating(spread, figure).Unit)} of "
            + $"{spread.Varied.Circuit.Parts[figure.Index].Name} at most "
            + Number(Rating(spread, figure).Rated, Rating(spread, figure).Unit),
        _ => figure.Name,
    };

    /// <summary>The rating a figure is of.</summary>
    public static RatingResult Rating(SpreadResult spread, StudyFigure figure) =>
        spread.Nominal.Parts[figure.Index].Ratings[figure.Rating];

    /// <summary>How the draws were made, and what their intervals mean.</summary>
    public static string Method(SpreadResult spread) =>
        $"{Design(spread.Draws!.Draws)}, seed {spread.Options.Seed}; each value evenly within its limits, or "
            + "normal and cut at them, three standard deviations from the middle. The intervals are those of "
            + "independent draws, and cautious for these, which are spread more evenly. "
            + "Draws are evaluated in double precision, good to a millionth; extremes by the exact engine.";

    /// <summary>What is said of draws without a solution; empty where there is none.</summary>
    public static string Unsolvable(DrawFindings draws) => draws.Unsolvable == 0 ? ""
        : $" {draws.Unsolvable:N0} of them had no unique solution (the first: "
            + $"{string.Join(", ", draws.UnsolvableDraws.Take(5))}); nothing is counted as holding in them.";

    /// <summary>What spread.csv holds.</summary>
    public static string Table(SpreadResult spread) => spread.Draws switch
    {
        null => "spread.csv has no draws, for none were made",
        { } draws when draws.RowCount < draws.Draws =>
            $"spread.csv holds the first {draws.RowCount:N0} of the {draws.Draws:N0} draws; the counts and "
            + "quantiles are of all of them",
        _ => "spread.csv holds the draws one by one",
    };

    /// <summary>A probability and its interval in per cent, with as many digits as it takes to tell the ends
    /// apart, and what is less than certain from 100 %.</summary>
    public static (string Probability, string Interval) Shares(HoldingEstimate held)
    {
        var (low, high) = held.Interval;
        var digits = held.Fraction is (> 0.99 and < 1) or (> 0 and < 0.01) ? 3 : 1;
        while (digits < MostShareDigits
            && !(low == high || Share(low, digits) != Share(high, digits)
                && new[] { low, held.Fraction, high }.All(share => IsFair(share, digits))))
        {
            digits++;
        }

        return (Share(held.Fraction, digits), $"{Share(low, digits)} to {Share(high, digits)}");
    }

    private static bool IsFair(double share, int digits) => share is 0 or 1
        || (Share(share, digits) != Share(0, digits) && Share(share, digits) != Share(1, digits));

    private static string Share(double fraction, int digits) =>
        (100 * fraction).ToString($"0.{new string('#', digits)}", CultureInfo.InvariantCulture) + " %";

    /// <summary>The judged figures of a kind.</summary>
    public static ImmutableArray<FigureRange> Judged(SpreadResult spread, StudyFigureKind kind) =>
        spread.Figures.RemoveAll(f => f.Figure.Kind != kind);

    /// <summary>A figure's kind in one word.</summary>
    public static string Kind(StudyFigure figure) => figure.Kind switch
    {
        StudyFigureKind.Maximum => "maximum",
        StudyFigureKind.Minimum => "minimum",
        StudyFigureKind.Reading => "figure",
        StudyFigureKind.Margin => "margin",
        StudyFigureKind.RatingUsed => "rating",
        _ => throw new System.Diagnostics.UnreachableException($"no word for {figure.Kind}"),
    };

    /// <summary>That all self-checks hold, nominal and at the worst case.</summary>
    public static string Checks(SpreadResult spread)
    {
        var checks = spread.Nominal.SelfChecks.Concat(spread.Worst?.Result.SelfChecks ?? []).ToArray();
        var failed = checks.Count(check => !check.Holds);
        var where = "with every value nominal" + (spread.Worst is null ? "" : " and at the worst case");
        return failed == 0
            ? $"Self-checks: all {checks.Length} hold, {where}."
            : $"Self-checks: {failed} of {checks.Length} FAILED, {where}.";
    }

    /// <summary>How the draws are spread.</summary>
    public static string Design(long draws) => draws <= LatinHypercube.MostInCube
        ? "Latin hypercube"
        : $"Latin hypercubes of {LatinHypercube.MostInCube:N0} draws each";

    /// <summary>A number and its noun.</summary>
    public static string Count(long count, string noun) => count == 1 ? $"one {noun}" : $"{count:N0} {noun}s";

    private static bool IsBrokenNominally(FigureRange range) =>
        !Judgement.Holds(range.Figure, range.Nominal ?? double.NaN);

    private static IEnumerable<string> Tallies(
        ImmutableArray<FigureRange> required, ImmutableArray<FigureRange> rated,
        Func<FigureRange, bool> isBroken) => new[]
        {
            Tally(required, isBroken, "requirement", "is broken", "are broken"),
            Tally(rated, isBroken, "rating", "is exceeded", "are exceeded"),
        }.Where(words => words.Length > 0);

    private static string Tally(
        ImmutableArray<FigureRange> figures, Func<FigureRange, bool> isBroken, string noun, string one,
        string many)
    {
        var broken = figures.Count(isBroken);
        return (broken, figures.Length) switch
        {
            (_, 0) => "",
            (0, 1) => $"the {noun} holds",
            (0, 2) => $"both {noun}s hold",
            (0, var all) => $"all {all} {noun}s hold",
            (1, 1) => $"the {noun} {one}",
            (1, var all) => $"one of {all} {noun}s {one}",
            (2, 2) => $"both {noun}s {many}",
            var (some, all) => some == all ? $"all {all} {noun}s {many}" : $"{some} of {all} {noun}s {many}",
        };
    }
}
