using CircuitTransient.Circuits;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>A figure on the scale a reader knows: of a margin the quantity that is bounded, where one bound
/// decides; of a rating what is reached; of all else the figure itself.</summary>
/// <param name="Unit">Its unit.</param>
/// <param name="Name">What the scale shows.</param>
/// <param name="Limit">The bound on this scale; null where there is none.</param>
/// <param name="LimitWords">The bound in words.</param>
internal sealed record JudgedScale(string Unit, string Name, double? Limit, string LimitWords)
{
    /// <summary>By what the figure is multiplied on the way to this scale.</summary>
    public double Factor { get; private init; } = 1;

    private double Shift { get; init; }

    /// <summary>The scale of a figure.</summary>
    public static JudgedScale Of(SpreadResult spread, FigureRange range)
    {
        var figure = range.Figure;
        if (figure.Kind == StudyFigureKind.RatingUsed)
        {
            var rating = SpreadWords.Rating(spread, figure);
            var part = spread.Varied.Circuit.Parts[figure.Index].Name;
            return new JudgedScale(
                rating.Unit, $"{Rated(rating.Unit)} of {part}", rating.Rated,
                $"rated {Number(rating.Rated, rating.Unit)}")
            { Factor = rating.Rated };
        }

        if (figure.Kind != StudyFigureKind.Margin)
        {
            return new JudgedScale(figure.Unit, figure.Name, null, "");
        }

        var requirement = spread.Varied.Circuit.Requirements[figure.Index];
        var isNegative = range.Worst?.Reached < 0;
        return requirement.Bound switch
        {
            Limits { Lower: null, Upper: { } upper } => Upper(upper),
            Limits { Lower: { } lower, Upper: null } => Lower(lower),
            Limits { Lower: { } lower, Upper: { } upper } when lower == -upper =>
                isNegative ? Lower(lower) : Upper(upper),
            _ => new JudgedScale(figure.Unit, figure.Name, 0, "no margin left"),
        };

        JudgedScale Upper(double limit) =>
            new(figure.Unit, requirement.Name, limit, $"at most {Number(limit, figure.Unit)}")
            {
                Factor = -1,
                Shift = limit,
            };

        JudgedScale Lower(double limit) =>
            new(figure.Unit, requirement.Name, limit, $"at least {Number(limit, figure.Unit)}")
            {
                Shift = limit,
            };
    }

    /// <summary>A figure's value on this scale.</summary>
    public double At(double value) => Shift + (Factor * value);
}
