using System.Collections.Immutable;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>The verdict, and what is used of each limit on one common scale.</content>
public static partial class HtmlReport
{
    private static Markup Verdict(TransientResult result, ImmutableArray<StudySection> sections) =>
        Markup.Of($"""
        <section id="verdict" aria-labelledby="verdict-heading">
        <h2 id="verdict-heading">Verdict</h2>
        <p class="lead" id="verdict-words">{Shown(sections)}{TerminalSummary.Verdict(result)}</p>
        {Markup.Join(sections.Select(Headline))}{RequirementTable(result)}{RatingTable(result)}
        {Doubts(result)}{Warnings(result)}</section>
        """);

    private static string Shown(ImmutableArray<StudySection> sections) =>
        sections.FirstOrDefault(section => section.Headline is not null) is { } study
            ? $"{study.Shown}: "
            : "";

    private static Markup Headline(StudySection section) => section.Headline is { } words
        ? Markup.Of($"<p class=\"lead study-words\">{section.Title}: {Markup.Name(words)}</p>\n")
        : default;

    private static Markup RequirementTable(TransientResult result)
    {
        if (result.Requirements.IsEmpty)
        {
            return default;
        }

        // What is broken comes first.
        var order = Enumerable.Range(0, result.Requirements.Length)
            .OrderBy(i => result.Requirements[i].Holds);
        return Markup.Of($"""
            <div class="wide"><table class="limits" id="requirements">
            <caption>Requirements</caption>
            <thead><tr><th scope="col">Required</th><th scope="col">Verdict</th>
            <th scope="col">Worst value</th><th scope="col">Used of the limit</th></tr></thead>
            <tbody>
            {Markup.Join(order.Select(i => RequirementRow(result, i)))}</tbody>
            </table></div>

            """);
    }

    private static Markup RequirementRow(TransientResult result, int i)
    {
        var requirement = result.Requirements[i];
        var reason = requirement.Reason is { } words
            ? Markup.Of($"<br><span class=\"aside\">{Markup.Name(words)}, line {requirement.Line}</span>")
            : Markup.Of($"<br><span class=\"aside\">line {requirement.Line}</span>");
        var worst = requirement.Worst.Value is { } value
            ? Number(value, requirement.Unit)
            : "no finite value";
        var used = i < result.Circuit.Requirements.Length
            ? Used(result.Circuit.Requirements[i].Bound, requirement)
            : null;
        var doubt = requirement.Doubt is { } doubtful
            ? Markup.Of($"<br><span class=\"aside\">in doubt: {Markup.Name(doubtful)}</span>")
            : default;
        return Markup.Of($"""
            <tr data-requirement="{i}"{Broken(requirement.Holds)}>
            <th scope="row">{Markup.Name(requirement.Statement)}{reason}{doubt}</th>
            <td class="verdict">{Held(requirement)}</td>
            <td class="worst">{worst}<br><span
            class="aside">{InstantWords.At(result, requirement.Worst.Time)}</span></td>
            <td>{Mark(used)}</td></tr>

            """);
    }

    private static Markup Broken(bool holds) => holds ? default : Markup.Of($" class=\"broken\"");

    private static Markup RatingTable(TransientResult result)
    {
        var ratings = result.Parts
            .SelectMany(part => part.Ratings.Select(rating => (Part: part, Rating: rating)))
            .Select((pair, i) => (pair.Part, pair.Rating, Index: i))
            .OrderByDescending(r => r.Rating.Used ?? (r.Rating.Holds ? -1 : double.PositiveInfinity))
            .ToArray();
        if (ratings.Length == 0)
        {
            return Markup.Of($"<p>Ratings: no rating given for any part.</p>\n");
        }

        var rows = ratings.Select(r => Markup.Of($"""
            <tr data-rating="{r.Index}"{Broken(r.Rating.Holds)}>
            <th scope="row">{Markup.Name(r.Part.Name)}, {Rated(r.Rating.Unit)}</th>
            <td class="verdict">{Held(r.Rating)}</td>
            <td class="worst">{Reached(r.Rating)} <span class="aside">of
            {Number(r.Rating.Rated, r.Rating.Unit)}</span></td>
            <td>{Mark(r.Rating.Used ?? (r.Rating.Holds ? null : double.PositiveInfinity))}</td></tr>

            """));
        return Markup.Of($"""
            <div class="wide"><table class="limits" id="ratings">
            <caption>Ratings, the most used first</caption>
            <thead><tr><th scope="col">Rated</th><th scope="col">Verdict</th><th scope="col">Reached</th>
            <th scope="col">Used of the rating</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            {Unrated(result)}
            """);
    }

    private static Markup Unrated(TransientResult result)
    {
        var unrated = result.Parts.Where(part => part.Ratings.IsEmpty)
            .Select(part => Markup.Name(part.Name)).ToArray();
        if (unrated.Length == 0)
        {
            return default;
        }

        var names = unrated.Take(60).Select((name, i) => Markup.Of($"{(i == 0 ? "" : ", ")}{name}"));
        var rest = unrated.Length > 60 ? $" and {unrated.Length - 60} more" : "";
        return Markup.Of($"<p class=\"aside\">No rating given: {Markup.Join(names)}{rest}.</p>\n");
    }

    private static Markup Doubts(TransientResult result) => Markup.Join(
        from part in result.Parts
        let linear = part.LinearUpTo
        where linear is { Holds: false }
        let direction = linear.Direction is { } words ? $": {words}" : ""
        select Markup.Of($"""
            <p>{Markup.Name(part.Name)} is linear up to {Number(linear.Declared, linear.Unit)} but reaches
            {Number(linear.Reached, linear.Unit)}{direction}.</p>

            """));

    private static Markup Warnings(TransientResult result) => result.Warnings.IsEmpty
        ? default
        : Markup.Of($"""
            <h3>Warnings</h3>
            <ul>
            {Markup.Join(result.Warnings.Select(WarningItem))}</ul>

            """);

    private static Markup WarningItem(Notice warning)
    {
        var advice = warning.Diagnostic?.Advice is { } words
            ? Markup.Of($"<br><span class=\"aside\">{words}</span>")
            : default;
        var place = warning.Line > 0 ? $"line {warning.Line}: " : "";
        return Markup.Of($"<li>{place}{warning.Text}{advice}</li>\n");
    }

    private static Markup Cautions(TransientResult result) => result.Cautions.IsEmpty
        ? default
        : Markup.Of($"""
            <section id="cautions" aria-labelledby="cautions-heading">
            <h2 id="cautions-heading">Cautions</h2>
            <ul class="cautions">
            {Markup.Join(result.Cautions.OrderByDescending(c => c.Severity).Select(CautionItem))}</ul>
            </section>
            """);

    private static Markup CautionItem(Caution caution)
    {
        var word = caution.Severity switch
        {
            CautionSeverity.Danger => "Danger",
            CautionSeverity.Warning => "Warning",
            _ => "Note",
        };
        return Markup.Of($"""
            <li><strong>{word}.</strong> {caution.Text} <span class="aside">({caution.Standard})</span></li>

            """);
    }
}
