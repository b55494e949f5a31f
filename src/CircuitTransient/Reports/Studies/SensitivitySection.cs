using CircuitTransient.Reports.Html;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Reports.Studies;

/// <summary>Exact sensitivities on the report page: of every figure, its instant and every pole.</summary>
internal static class SensitivitySection
{
    private const int MostPoles = 40;

    /// <summary>The tables.</summary>
    public static Markup Of(SpreadResult spread)
    {
        var found = spread.Sensitivities;
        if (found.WhyNone is { } why)
        {
            return Markup.Of($"<p>No sensitivities: {why}.</p>\n");
        }

        var figures = Enumerable.Range(0, found.Figures.Length)
            .Select(f => (Figure: spread.Figures[f], Words: SensitivityWords.Ranked(spread, f), Place: f))
            .Where(row => row.Words.Length > 0)
            .Select(row => Markup.Of($"""
                <tr><th scope="row">{Markup.Name(JudgedScale.Of(spread, row.Figure).Name)}</th>
                <td>{Markup.Name(row.Words)}</td>
                <td>{Markup.Name(SensitivityWords.RankedTime(spread, row.Place))}</td></tr>

                """));
        return Markup.Of($"""
            <div class="wide"><table>
            <caption>Exact sensitivities with every value nominal, in % for 1 %, the strongest first</caption>
            <thead><tr><th scope="col">Figure</th><th scope="col">It goes with</th>
            <th scope="col">Its instant goes with</th></tr></thead>
            <tbody>
            {Markup.Join(figures)}</tbody></table></div>
            <div class="wide"><table>
            <caption>Exact sensitivities of the poles, likewise</caption>
            <thead><tr><th scope="col">Interval from</th><th scope="col">Pole</th>
            <th scope="col">Rate or frequency goes with</th>
            <th scope="col">Damping goes with</th></tr></thead>
            <tbody>
            {Markup.Join(Poles(spread).Take(MostPoles))}</tbody></table></div>

            """);
    }

    private static IEnumerable<Markup> Poles(SpreadResult spread) =>
        from interval in Enumerable.Range(0, spread.Sensitivities.Poles.Length)
        let start = ReportWords.Number(spread.Nominal.Intervals[interval].From, "s")
        from pole in spread.Sensitivities.Poles[interval]
        where SensitivityWords.Moves(spread, pole)
        let damping = pole.Pole.Imaginary == 0 ? "" : SensitivityWords.RankedDamping(spread, pole)
        select Markup.Of($"""
            <tr><th scope="row">{start}</th><td>{SensitivityWords.Pole(pole)}</td>
            <td>{Markup.Name(SensitivityWords.RankedMagnitude(spread, pole))}</td>
            <td>{Markup.Name(damping)}</td></tr>

            """);
}
