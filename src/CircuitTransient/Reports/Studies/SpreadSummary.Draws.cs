using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Studies.Statistics;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <content>Random draws, and what drives the spread.</content>
public static partial class SpreadSummary
{
    private const int MostDrivers = 12;
    private const int MostPoles = 6;
    private const int BarCells = 16;

    private static void WriteDraws(SummaryText text, SpreadResult spread)
    {
        if (spread.Draws is not { } draws)
        {
            return;
        }

        text.Heading($"{draws.Draws:N0} random draws (seed {spread.Options.Seed}), apart from the extremes");
        var judged = spread.Figures.Zip(draws.Figures)
            .Where(pair => pair.Second.Holding is not null).ToArray();
        if (judged.Length > 0)
        {
            var rows = judged.Take(MostFigures).Select(pair =>
                Probability(SpreadWords.Name(spread, pair.First.Figure), pair.Second.Holding!));
            text.Table(
                [Prose, Right, Right, Left], rows.Prepend(["", "held in", "probability", "95 % sure"]));
            text.Blank();
        }

        var observed = Enumerable.Range(0, spread.Figures.Length)
            .Where(i => spread.Figures[i].Holds is null && draws.Figures[i].Count > 0).ToArray();
        if (observed.Length > 0)
        {
            var figures = observed.Take(MostFigures)
                .Select(i => Row(spread.Figures[i].Figure, draws.Figures[i]));
            text.Table(
                [Prose, Right, Right, Right, Right, Right],
                figures.Prepend(["", "mean", "deviation", "5 %", "median", "95 %"]));
        }

        if (draws.Unsolvable > 0)
        {
            text.Paragraph(SpreadWords.Unsolvable(draws).Trim(), hanging: 2);
        }
    }

    /// <summary>How often it held, with the exact interval of that probability.</summary>
    private static ImmutableArray<string> Probability(string name, HoldingEstimate held)
    {
        var (probability, interval) = SpreadWords.Shares(held);
        return [name, $"{held.Holding:N0}", probability, interval];
    }

    private static ImmutableArray<string> Row(StudyFigure figure, FigureStatistics statistics) =>
    [
        figure.Name,
        Number(statistics.Mean, figure.Unit),
        Number(statistics.Deviation, figure.Unit),
        Number(Quantile(statistics, 0.05), figure.Unit),
        Number(Quantile(statistics, 0.5), figure.Unit),
        Number(Quantile(statistics, 0.95), figure.Unit),
    ];

    private static double? Quantile(FigureStatistics statistics, double fraction) =>
        statistics.Quantiles.FirstOrDefault(q => q.Fraction == fraction)?.Value;

    private static void WriteDrivers(SummaryText text, SpreadResult spread)
    {
        if (spread.Worst is not { } worst)
        {
            return;
        }

        var range = spread.Figures[worst.Figure];
        var order = Enumerable.Range(0, range.Alone.Length)
            .OrderByDescending(i => Width(range.Alone[i]))
            .Take(MostDrivers).ToArray();
        if (!order.Any(i => Width(range.Alone[i]) > 0))
        {
            return;
        }

        text.Heading("What each value alone does to it, at the ends of its tolerance; then the exact slope");
        var largest = order.Max(i => Width(range.Alone[i]));
        var shares = spread.Sensitivities.Figures.ElementAtOrDefault(worst.Figure) is { } slopes
            ? SensitivityFindings.Shares(slopes, spread.Varied.Values)
            : [];
        var rows = order.Select(i => ImmutableArray.Create(
            spread.Varied.Values[i].Name,
            SpreadWords.Quantity(spread, range, range.Alone[i].AtLowest),
            $"to {SpreadWords.Quantity(spread, range, range.Alone[i].AtHighest)}",
            largest > 0 ? new string('█', (int)Math.Round(BarCells * Width(range.Alone[i]) / largest)) : "",
            SensitivityWords.Signed(SensitivityWords.Relative(spread, worst.Figure, i)),
            shares.ElementAtOrDefault(i) is { } share ? Percent(share) : ""));
        text.Table(
            [Prose, Right, Right, Left, Right, Right],
            rows.Prepend(["", "at lowest", "at highest", "", "% per %", "of the variance"]));
        text.Paragraph("the share of the variance is that of first order, from the slopes", hanging: 2);
        WritePoles(text, spread, worst);
    }

    /// <summary>The poles of the interval in which the worst value stands.</summary>
    private static void WritePoles(SummaryText text, SpreadResult spread, WorstCase worst)
    {
        var time = worst.Point.Time ?? 0;
        var interval = spread.Nominal.Intervals.Count(i => i.From <= time) - 1;
        var found = spread.Sensitivities.Poles.ElementAtOrDefault(interval);
        var poles = (found.IsDefault ? [] : found)
            .Where(p => SensitivityWords.Moves(spread, p)).Take(MostPoles).ToArray();
        if (poles.Length == 0)
        {
            return;
        }

        text.Heading("Poles at that instant with every value nominal, and what moves them, in % per %");
        text.Table([Prose, Left, Prose], poles.SelectMany(pole => pole.Pole.Imaginary == 0
            ? new ImmutableArray<string>[]
            {
                [SensitivityWords.Pole(pole), "rate", SensitivityWords.RankedMagnitude(spread, pole)],
            }
            :
            [
                [SensitivityWords.Pole(pole), "frequency", SensitivityWords.RankedMagnitude(spread, pole)],
                ["", "damping", SensitivityWords.RankedDamping(spread, pole)],
            ]));
    }

    private static double Width(ValueEffect effect) =>
        double.IsFinite(effect.AtHighest - effect.AtLowest)
            ? Math.Abs(effect.AtHighest - effect.AtLowest)
            : 0;
}
