using CircuitTransient.Reports.Html;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Studies.Statistics;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What the tolerances come to, as a section of the report page.</summary>
public static class SpreadSection
{
    /// <summary>The section.</summary>
    public static StudySection Of(SpreadResult spread)
    {
        using var fonts = new PlotFonts();
        return new StudySection("Tolerances", Markup.Of($"""
            <p class="lead">{SpreadWords.Verdict(spread)}</p>
            {Judged(spread)}{Doubts(spread)}{Worst(spread)}
            <p>{SpreadWords.Account(spread)} {SpreadJumps.Account(spread)}</p>
            {SpreadJumps.Section(spread)}
            <div class="wide"><figure class="picture">{HtmlReport.Themed(SpreadPlot.Draw(spread, fonts))}
            </figure></div>
            {Draws(spread)}{Extremes(spread)}{SensitivitySection.Of(spread)}
            <p>{SpreadWords.Checks(spread)}</p>
            <p class="aside">Everything stands in spread.json; {SpreadWords.Table(spread)}.</p>
            """))
        {
            Headline = SpreadWords.Verdict(spread),
        };
    }

    private static Markup Doubts(SpreadResult spread) => Markup.Join(
        SpreadDoubts.Words(spread).Select(words => Markup.Of($"<p>{Markup.Name(words)}.</p>\n")));

    private static Markup Judged(SpreadResult spread)
    {
        var judged = spread.Figures.Where(f => f.Holds is not null).OrderBy(f => f.Holds).ToArray();
        if (judged.Length == 0)
        {
            return default;
        }

        var doubt = SpreadDoubts.Of(spread) is { } words ? $"; in doubt: {words}" : "";
        var rows = judged.Select(f => Markup.Of($"""
            <tr{(f.Holds == false ? Markup.Of($" class=\"broken\"") : default)}>
            <th scope="row">{Markup.Name(SpreadWords.Name(spread, f.Figure))}</th>
            <td class="verdict">{SpreadWords.Held(spread, f)}{doubt}</td>
            <td>{SpreadWords.Reached(spread, f.Figure, f.Nominal, f.NominalReached)}</td>
            <td>{Reached(spread, f)}</td></tr>

            """));
        return Markup.Of($"""
            <div class="wide"><table class="limits">
            <caption>Requirements and ratings with every tolerance</caption>
            <thead><tr><th scope="col">Required or rated</th><th scope="col">Verdict</th>
            <th scope="col">Nominal</th><th scope="col">Worst</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody></table></div>

            """);
    }

    private static string Reached(SpreadResult spread, FigureRange range) => range.Worst is { } worst
        ? SpreadWords.Reached(spread, range.Figure, worst.Value, worst.Reached)
        : "";

    private static Markup Worst(SpreadResult spread)
    {
        if (spread.Worst is not { } worst)
        {
            return default;
        }

        var range = spread.Figures[worst.Figure];
        var when = worst.Point.Time is { } time ? $" {InstantWords.At(worst.Result, time)}" : "";
        var used = SpreadWords.Used(spread, worst);
        var reached =
            SpreadWords.Reached(spread, range.Figure, worst.Point.Value, worst.Point.Reached);
        var why = SpreadWords.Why(spread, range, worst.Point)
            .Append(SpreadWords.Steepness(worst)).OfType<string>()
            .Select(words => Markup.Of($"<li>{Markup.Name(words)}</li>\n"));
        return Markup.Of($"""
            <h3>The worst case</h3>
            <p>{Markup.Name(SpreadWords.Name(spread, range.Figure))}:
            {reached}{when}{used}.</p>
            <ul>
            <li>at {Markup.Name(SpreadWords.Point(spread, worst.Point))}</li>
            {Markup.Join(why)}</ul>

            """);
    }

    private static Markup Draws(SpreadResult spread)
    {
        if (spread.Draws is not { } draws)
        {
            return default;
        }

        var rows = spread.Figures.Zip(draws.Figures)
            .Where(pair => pair.Second.Holding is not null)
            .Select(pair => Probability(SpreadWords.Name(spread, pair.First.Figure), pair.Second.Holding!))
            .ToArray();
        var table = rows.Length == 0 ? default : Markup.Of($"""
            <div class="wide"><table>
            <caption>How often it holds</caption>
            <thead><tr><th scope="col">Required or rated</th><th scope="col">Held in</th>
            <th scope="col">Probability</th><th scope="col">With 95 % confidence</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody></table></div>

            """);
        return Markup.Of($"""
            <h3>{SpreadWords.Count(draws.Draws, "random draw")}</h3>
            <p>{SpreadWords.Method(spread)}{SpreadWords.Unsolvable(draws)}</p>
            {table}
            """);
    }

    private static Markup Probability(string name, HoldingEstimate held)
    {
        var (probability, interval) = SpreadWords.Shares(held);
        return Markup.Of($"""
            <tr><th scope="row">{Markup.Name(name)}</th><td>{$"{held.Holding:N0} of {held.All:N0}"}</td>
            <td>{probability}</td><td>{interval}</td></tr>

            """);
    }

    private static Markup Extremes(SpreadResult spread)
    {
        var rows = Enumerable.Range(0, spread.Figures.Length)
            .Where(i => spread.Figures[i].Holds is null)
            .Select(i => Row(spread.Figures[i], spread.Draws?.Figures[i]))
            .ToArray();
        return rows.Length == 0 ? default : Markup.Of($"""
            <div class="wide"><table>
            <caption>What is observed: hard extremes, and the random draws</caption>
            <thead><tr><th scope="col">Figure</th><th scope="col">Nominal</th><th scope="col">Least</th>
            <th scope="col">Greatest</th><th scope="col">Mean of the draws</th><th scope="col">Standard
            deviation</th><th scope="col">5 % below</th><th scope="col">5 % above</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody></table></div>

            """);
    }

    private static Markup Row(FigureRange range, FigureStatistics? statistics)
    {
        double?[] cells =
        [
            range.Nominal, range.Least?.Value, range.Greatest?.Value, statistics?.Mean, statistics?.Deviation,
            Quantile(statistics, 0.05), Quantile(statistics, 0.95),
        ];
        var written = cells.Select(cell =>
            cell is { } number && double.IsFinite(number) ? Number(number, range.Figure.Unit) : "")
            .Select(words => Markup.Of($"<td class=\"number\">{words}</td>"));
        return Markup.Of(
            $"<tr><th scope=\"row\">{Markup.Name(range.Figure.Name)}</th>{Markup.Join(written)}</tr>\n");
    }

    private static double? Quantile(FigureStatistics? statistics, double fraction) =>
        statistics?.Quantiles.FirstOrDefault(q => q.Fraction == fraction)?.Value;
}
