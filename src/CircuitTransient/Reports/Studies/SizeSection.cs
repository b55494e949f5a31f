using CircuitTransient.Reports.Html;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>A sizing's section of the report page.</summary>
public static class SizeSection
{
    /// <summary>The section.</summary>
    public static StudySection Of(SizeResult result)
    {
        using var fonts = new PlotFonts();
        var notes = SizeWords.Searched(result).Select(words => Markup.Of($"{words} "));
        var circuit = result.Chosen is null
            ? "What follows below is the circuit as it stands."
            : "What follows below is the circuit with the proposed values.";
        return new StudySection("Sizing", Markup.Of($"""
            <p class="lead">{SizeWords.Verdict(result)}</p>
            {Doubts(result)}{Aim(result)}<p>{SizeWords.AsItStands(result)}</p>
            {Margins(result)}{Conflict(result)}{Intervals(result)}
            <div class="wide"><figure
            class="picture">{HtmlReport.Themed(SizePlot.Draw(result, fonts))}</figure></div>
            <p class="aside">{Markup.Join(notes)}All points stand in size.csv and size.json. {circuit}</p>
            """))
        {
            Headline = SizeWords.Verdict(result),
            Shown = result.Chosen is null ? "As written" : "With the proposed values",
        };
    }

    private static Markup Doubts(SizeResult result) =>
        Markup.Join(SizeWords.Doubts(result).Select(doubt => Markup.Of($"<p>{doubt}</p>\n")));

    private static Markup Aim(SizeResult result)
    {
        if (result.Chosen is not { } chosen)
        {
            return default;
        }

        var value = SizeWords.HasOwnAim(result) ? $": {SizeWords.AimValue(result, chosen)}" : "";
        return Markup.Of($"""
            <p>Of the values that hold, these have the {SizeWords.Aim(result)}{value}. {Exact(result)}</p>

            """);
    }

    private static string Exact(SizeResult result) =>
        result is { Request.Series: { } series, Exact: { } exact }
        ? $"Not bound to {series}, it would be {SizeWords.Values(result, exact)}{SizeWords.Unproven(result)}."
        : "";

    private static Markup Margins(SizeResult result) => result.Chosen is { } chosen
        ? MarginTable(result, chosen, $"With {SizeWords.Values(result, chosen)}")
        : default;

    private static Markup MarginTable(SizeResult result, SizePoint point, string caption)
    {
        var rows = Enumerable.Range(0, result.Problem.Constraints.Length)
            .OrderBy(i => point.Shares[i])
            .Select(i => (Constraint: result.Problem.Constraints[i], Share: point.Shares[i]))
            .Select(pair => Markup.Of($"""
                <tr{Broken(pair.Share)}><th scope="row">{Markup.Name(pair.Constraint.Name)}</th>
                <td>{SizeWords.Margin(pair.Constraint, pair.Share)}</td></tr>

                """));
        return Markup.Of($"""
            <div class="wide"><table>
            <caption>{caption}</caption>
            <thead><tr><th scope="col">Required or rated</th><th scope="col">Margin</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody></table></div>

            """);
    }

    private static Markup Broken(double share) => share >= 0 ? default : Markup.Of($" class=\"broken\"");

    private static Markup Conflict(SizeResult result)
    {
        if (result.Conflict is not { } conflict)
        {
            return default;
        }

        var lines = SizeWords.Conflict(result).Select(words => Markup.Of($"<p>{Markup.Name(words)}</p>\n"));
        var caption = $"The least broken: {SizeWords.Values(result, conflict.Nearest)}";
        return Markup.Of($"{Markup.Join(lines)}{MarginTable(result, conflict.Nearest, caption)}");
    }

    private static Markup Intervals(SizeResult result)
    {
        if (result.Intervals.IsEmpty)
        {
            return default;
        }

        var part = result.Problem.Parts[0];
        var rows = result.Intervals.Select(interval => Markup.Of($"""
            <tr><th scope="row">{SizeWords.Value(interval.From.Values[0], part.Unit)} to
            {SizeWords.Value(interval.To.Values[0], part.Unit)}</th>
            <td>{Markup.Name(SizeWords.End(result, interval.Below))}</td>
            <td>{Markup.Name(SizeWords.End(result, interval.Above))}</td></tr>

            """));
        return Markup.Of($"""
            <div class="wide"><table>
            <caption>Every value of {Markup.Name(part.Name)} that holds{SizeWords.Unproven(result)}</caption>
            <thead><tr><th scope="col">Values</th><th scope="col">Below</th>
            <th scope="col">Above</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody></table></div>

            """);
    }
}
