using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What the tolerances come to in sentences, alike on the terminal and on the page.</summary>
internal static class SpreadWords
{
    private const int MostValuesNamed = 16;

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
        if (required.Length + rated.Length == 0)
        {
            return "Nothing was required or rated, so there is no verdict"
                + (unsolvable.Length > 0 ? $"; {unsolvable}." : ".");
        }

        string[] said =
        [
            .. new[]
            {
                Tally(required, "requirement", "is broken", "are broken"),
                Tally(rated, "rating", "is exceeded", "are exceeded"),
                unsolvable,
            }.Where(words => words.Length > 0),
        ];
        var opening = spread.AllHold ? "Holds with every tolerance"
            : !spread.Nominal.AllHold ? "Does not hold even with every value nominal"
            : "Does not hold with every tolerance";
        return $"{opening}: {string.Join("; ", said)}.";
    }

    /// <summary>What was solved, and what of it is proven.</summary>
    public static string Account(SpreadResult spread)
    {
        var account = spread.Account;
        var values = spread.Varied.Values.Length;
        var inside = $"{account.InteriorPoints:N0} points between them";
        var corners = account.AllCorners
            ? $"All {account.Corners:N0} corners of the {Count(values, "value")} that have a tolerance were solved"
            : $"{account.CornerPoints:N0} of some {account.Corners.ToString("0.#e0", CultureInfo.InvariantCulture)}"
                + $" corners of the {values} values that have a tolerance were solved, chosen by each value's own "
                + "effect, at random, and by exchanging single values for as long as that helped";
        return account.WorseInside == 0
            ? $"{corners}; {inside} gave nothing worse: searched there, not proven."
            : $"{corners}, and {inside}; {Count(account.WorseInside, "extreme")} lie"
                + $"{(account.WorseInside == 1 ? "s" : "")} between the corners: searched there, not proven.";
    }

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
            .Select(i => $"{values[i].Name} {Number(point.Point[i], values[i].Unit)}{Off(values[i], point.Point[i])}");
        return string.Join(", ", named)
            + (moved.Length > MostValuesNamed ? $" and {moved.Length - MostValuesNamed} more" : "")
            + rest switch
            {
                0 => "",
                1 => "; one value does not matter",
                _ => $"; {rest} values do not matter",
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
            $"{Rated(Rating(spread, figure).Unit)} of {spread.Varied.Circuit.Parts[figure.Index].Name} at most "
            + Number(Rating(spread, figure).Rated, Rating(spread, figure).Unit),
        _ => figure.Name,
    };

    /// <summary>The rating a figure is of.</summary>
    public static RatingResult Rating(SpreadResult spread, StudyFigure figure) =>
        spread.Nominal.Parts[figure.Index].Ratings[figure.Rating];

    /// <summary>What a judged quantity reaches; a figure's own value in its unit.</summary>
    public static string Reached(SpreadResult spread, StudyFigure figure, double? value, double? reached)
    {
        switch (figure.Kind)
        {
            case StudyFigureKind.Margin when value is { } margin && double.IsInfinity(margin):
                return "no finite value";
            case StudyFigureKind.Margin:
                return reached is { } quantity
                    ? Number(quantity, figure.Unit)
                    : $"a margin of {Number(value, figure.Unit)}";
            case StudyFigureKind.RatingUsed:
                var rating = Rating(spread, figure);
                return value is { } used ? Number(used * rating.Rated, rating.Unit) : "no finite value";
            default:
                return value is { } plain && double.IsFinite(plain) ? Number(plain, figure.Unit) : "none";
        }
    }

    /// <summary>The verdict on a judged figure over all tolerances.</summary>
    public static string Held(SpreadResult spread, FigureRange range)
    {
        if (range.Missing > 0 && range.Holds == false && range.Worst is null)
        {
            return "broken: nothing to judge";
        }

        var worst = range.Worst?.Value ?? double.NaN;
        if (range.Figure.Kind == StudyFigureKind.RatingUsed)
        {
            var rating = Rating(spread, range.Figure);
            return range.Holds == true ? $"held, {Percent(Math.Max(0, worst))} used"
                : double.IsFinite(worst) && worst > 1 ? $"exceeded by {Number((worst - 1) * rating.Rated, rating.Unit)}"
                : "exceeded without limit";
        }

        return range.Holds == true ? $"held, {Number(worst, range.Figure.Unit)} to spare"
            : range.Missing > 0 && !(worst < 0) ? $"broken: nothing to judge at {Count(range.Missing, "point")}"
            : double.IsInfinity(worst) ? "broken without limit"
            : $"broken by {Number(-worst, range.Figure.Unit)}";
    }

    /// <summary>Which value drives an extreme most: the one whose return to nominal changes it most.</summary>
    public static string? Driver(SpreadResult spread, FigureRange range, ExtremePoint point)
    {
        var leader = Drivers(point).FirstOrDefault(-1);
        if (leader < 0 || range.Nominal is null)
        {
            return null;
        }

        var value = spread.Varied.Values[leader];
        var without = point.Returns[leader];
        return $"{value.Name} drives it most: with {value.Name} alone back at its nominal "
            + $"{Number(value.Nominal, value.Unit)} it would be {Quantity(spread, range, without)}";
    }

    /// <summary>What is reached where a figure has some value: of a margin the quantity itself, where its bound
    /// tells that.</summary>
    public static string Quantity(SpreadResult spread, FigureRange range, double value)
    {
        if (!double.IsFinite(value))
        {
            return "without a finite value";
        }

        if (range.Figure.Kind != StudyFigureKind.Margin)
        {
            return Reached(spread, range.Figure, value, null);
        }

        var sign = Math.Sign(range.Worst?.Reached ?? 1);
        double? reached = spread.Varied.Circuit.Requirements[range.Figure.Index].Bound switch
        {
            Limits { Lower: null, Upper: { } upper } => upper - value,
            Limits { Lower: { } lower, Upper: null } => lower + value,
            Limits { Lower: { } lower, Upper: { } upper } when lower == -upper => sign * (upper - value),
            _ => null,
        };
        return reached is { } quantity
            ? Number(quantity, range.Figure.Unit)
            : $"{Number(value, range.Figure.Unit)} to spare";
    }

    /// <summary>The values that matter, the one whose return changes most first.</summary>
    public static IEnumerable<int> Drivers(ExtremePoint point) =>
        Enumerable.Range(0, point.Returns.Length).Where(i => point.Matters[i])
            .OrderByDescending(i => Step(point, i));

    /// <summary>Which cause dominates an extreme, and which one grows most on the way there; null where it is
    /// not split.</summary>
    public static string? Causes(FigureRange range, ExtremePoint point, string unit)
    {
        var largest = point.Causes.Where(c => c.Value is not null).MaxBy(c => Math.Abs(c.Value!.Value));
        if (largest is null || point.Reached is not { } reached)
        {
            return null;
        }

        var words = $"{largest.Cause} makes {Signed(largest.Value, unit)} of the {Number(reached, unit)}";
        var grown = point.Causes
            .Select(c => (c.Cause, Growth: c.Value - range.NominalCauses.FirstOrDefault(n => n.Cause == c.Cause)?.Value))
            .Where(c => c.Growth is not null)
            .MaxBy(c => Math.Abs(c.Growth!.Value));
        return range.NominalReached is { } nominal && grown.Growth is { } growth
            && Math.Abs(reached - nominal) > 1e-9 * Math.Abs(reached)
            ? $"{words}; of the change of {Signed(reached - nominal, unit)} from nominal, {grown.Cause} brings "
                + Signed(growth, unit)
            : words;
    }

    /// <summary>A jump in words.</summary>
    public static string Jump(StudyFigure figure, FigureJump jump)
    {
        var unit = figure.Kind == StudyFigureKind.RatingUsed ? "" : figure.Unit;
        var where = $"{Percent(jump.Place)} of the way from nominal to that point";
        return jump.IsOfValue
            ? $"it jumps from {Number(jump.ValueBefore, unit)} to {Number(jump.ValueAfter, unit)} at {where}"
            : $"its instant jumps from {Number(jump.TimeBefore, "s")} to {Number(jump.TimeAfter, "s")} at {where}: "
                + "another crest takes over";
    }

    /// <summary>What drives an extreme: the value, the causes, the jumps on the way.</summary>
    public static IEnumerable<string> Why(SpreadResult spread, FigureRange range, ExtremePoint point)
    {
        var unit = range.Figure.Kind == StudyFigureKind.RatingUsed
            ? Rating(spread, range.Figure).Unit
            : range.Figure.Unit;
        if (Driver(spread, range, point) is { } driver)
        {
            yield return driver;
        }

        if (Causes(range, point, unit) is { } causes)
        {
            yield return $"by cause, from the start: {causes}";
        }

        foreach (var jump in point.Jumps)
        {
            yield return Jump(range.Figure, jump);
        }
    }

    /// <summary>How the draws were made, and what their intervals mean.</summary>
    public static string Method(SpreadResult spread) =>
        $"{Design(spread.Draws!.Draws)}, seed {spread.Options.Seed}; each value evenly within its limits, or normal "
            + "and cut at them, three standard deviations from the middle. The intervals are those of independent "
            + "draws, and cautious for these, which are spread more evenly.";

    /// <summary>A probability in per cent, with more digits near 0 and 1.</summary>
    public static string Share(double fraction) =>
        (100 * fraction).ToString(fraction is (> 0.99 and < 1) or (> 0 and < 0.01) ? "0.###" : "0.#",
            CultureInfo.InvariantCulture) + " %";

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

    /// <summary>How the draws are spread.</summary>
    public static string Design(long draws) => draws <= LatinHypercube.MostInCube
        ? "Latin hypercube"
        : $"Latin hypercubes of {LatinHypercube.MostInCube:N0} draws each";

    /// <summary>A number and its noun.</summary>
    public static string Count(long count, string noun) => count == 1 ? $"one {noun}" : $"{count:N0} {noun}s";

    private static double Step(ExtremePoint point, int value) => double.IsFinite(point.Returns[value])
        ? Math.Abs(point.Value - point.Returns[value])
        : double.PositiveInfinity;

    private static string Tally(ImmutableArray<FigureRange> figures, string noun, string one, string many)
    {
        var broken = figures.Count(f => f.Holds == false);
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
