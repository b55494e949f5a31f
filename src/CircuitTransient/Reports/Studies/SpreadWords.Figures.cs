using CircuitTransient.Circuits;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <content>Single figures, and what drives them.</content>
internal static partial class SpreadWords
{
    /// <summary>What a judged quantity reaches; a figure's own value in its unit.</summary>
    public static string Reached(SpreadResult spread, StudyFigure figure, double? value, double? reached)
    {
        switch (figure.Kind)
        {
            case StudyFigureKind.Margin when value is { } margin && double.IsInfinity(margin):
                return "no finite value";
            case StudyFigureKind.Margin:
                return reached is { } quantity ? Number(quantity, figure.Unit)
                    : value is { } known && AtMargin(spread, figure, known, null) is { } told
                    ? Number(told, figure.Unit)
                    : $"a margin of {Number(value, figure.Unit)}";
            case StudyFigureKind.RatingUsed:
                var rating = Rating(spread, figure);
                return value is { } used ? Number(used * rating.Rated, rating.Unit) : "no finite value";
            default:
                return value is { } plain && double.IsFinite(plain) ? Number(plain, figure.Unit) : "none";
        }
    }

    /// <summary>What is reached where a figure has some value: of a margin the quantity itself, where its
    /// bound tells that.</summary>
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

        return AtMargin(spread, range.Figure, value, Math.Sign(range.Worst?.Reached ?? 1)) is { } quantity
            ? Number(quantity, range.Figure.Unit)
            : $"{Number(value, range.Figure.Unit)} to spare";
    }

    /// <summary>The quantity at a margin; null where its bound does not tell that.</summary>
    private static double? AtMargin(SpreadResult spread, StudyFigure figure, double margin, int? sign) =>
        spread.Varied.Circuit.Requirements[figure.Index].Bound switch
        {
            Limits { Lower: null, Upper: { } upper } => upper - margin,
            Limits { Lower: { } lower, Upper: null } => lower + margin,
            Limits { Lower: { } lower, Upper: { } upper } when lower == -upper => sign * (upper - margin),
            _ => null,
        };

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
                : double.IsFinite(worst) && worst > 1
                ? $"exceeded by {Number((worst - 1) * rating.Rated, rating.Unit)}"
                : "exceeded without limit";
        }

        return range.Holds == true ? $"held, {Number(worst, range.Figure.Unit)} to spare"
            : range.Missing > 0 && !(worst < 0)
            ? $"broken: nothing to judge at {Count(range.Missing, "point")}"
            : double.IsInfinity(worst) ? "broken without limit"
            : $"broken by {Number(-worst, range.Figure.Unit)}";
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
            yield return Jump(spread, range, jump, "that point");
        }
    }

    /// <summary>What the derivatives at the worst case prove; null where they prove nothing.</summary>
    public static string? Steepness(WorstCase worst) => worst.IsSteepest == true
        ? "there every value's own derivative points out of its tolerance: no small change within makes it "
            + "worse"
        : null;

    /// <summary>Which value drives an extreme most: the one whose return to nominal changes it
    /// most.</summary>
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

        if (point.Causes is [_])
        {
            return $"{largest.Cause} makes all of it";
        }

        var words = $"{largest.Cause} makes {Signed(largest.Value, unit)} of the {Number(reached, unit)}";
        var grown = point.Causes
            .Select(c => (c.Cause, Growth: c.Value
                - range.NominalCauses.FirstOrDefault(n => n.Cause == c.Cause)?.Value))
            .Where(c => c.Growth is not null)
            .MaxBy(c => Math.Abs(c.Growth!.Value));
        return range.NominalReached is { } nominal && grown.Growth is { } growth
            && Math.Abs(reached - nominal) > 1e-9 * Math.Abs(reached)
            ? $"{words}; of the change of {Signed(reached - nominal, unit)} from nominal, {grown.Cause} "
                + $"brings {Signed(growth, unit)}"
            : words;
    }

    /// <summary>A jump in words.</summary>
    /// <param name="spread">The study.</param>
    /// <param name="range">What jumps.</param>
    /// <param name="jump">How.</param>
    /// <param name="to">What lies at the end of the way.</param>
    public static string Jump(SpreadResult spread, FigureRange range, FigureJump jump, string to)
    {
        var where = $"{Percent(jump.Place)} of the way from nominal to {to}";
        return jump.IsOfValue
            ? $"it jumps from {Quantity(spread, range, jump.ValueBefore)} to "
                + $"{Quantity(spread, range, jump.ValueAfter)} at {where}"
            : $"its instant jumps from {Number(jump.TimeBefore, "s")} to {Number(jump.TimeAfter, "s")} at "
                + $"{where}: another crest takes over";
    }

    /// <summary>What is judged or observed, by which a requirement on an observed figure is the same as that
    /// figure.</summary>
    public static string Measured(SpreadResult spread, FigureRange range) =>
        range.Figure.Kind != StudyFigureKind.Margin ? range.Figure.Name
        : spread.Figures.Select(f => f.Figure)
            .Where(f => f.Kind == StudyFigureKind.Reading && f.Unit == range.Figure.Unit
                && Name(spread, range.Figure).StartsWith(f.Name + " ", StringComparison.Ordinal))
            .MaxBy(f => f.Name.Length)?.Name ?? range.Figure.Name;

    /// <summary>How much of what is allowed the worst case takes, to follow its value; empty where that has
    /// no meaning: a lower bound allows no share.</summary>
    public static string Used(SpreadResult spread, WorstCase worst)
    {
        var figure = spread.Figures[worst.Figure].Figure;
        var isMeant = double.IsFinite(worst.Used) && (figure.Kind != StudyFigureKind.Margin
            || spread.Varied.Circuit.Requirements[figure.Index].Bound is SettlesTo
                or Limits { Lower: null, Upper: > 0 } or Limits { Lower: < 0, Upper: > 0 });
        return isMeant ? $", {Percent(worst.Used)} of what is allowed" : "";
    }

    private static double Step(ExtremePoint point, int value) => double.IsFinite(point.Returns[value])
        ? Math.Abs(point.Value - point.Returns[value])
        : double.PositiveInfinity;
}
