using System.Text.RegularExpressions;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>The observations: waveform, extremes, and what made the peak.</content>
public static partial class HtmlReport
{
    private const int MostSinceRows = 24; // of a large circuit; all stand in results.json with `--after`
    private const int MostStillLetters = 600_000; // of pictures for readers without scripts

    private static Markup Observations(TransientResult result, PlotFonts fonts)
    {
        var worst = WorstObservation.Find(result);
        var letters = 0;
        var sections = result.Observations.Select((observed, i) =>
        {
            var still = letters < MostStillLetters ? StillPicture(result, observed, fonts) : default;
            letters += still.ToString().Length;
            return Observed(result, observed, i, worst, still);
        });
        return Markup.Of($"""
            <section id="observations" aria-labelledby="observations-heading">
            <h2 id="observations-heading">Waveforms and their causes</h2>
            <p class="aside">Contributions are counted from the start: the sources, and what was stored at
            t = 0, carried through every switching. At every instant they add up to the total.</p>
            <div id="explorer"></div>
            {(worst is { Shown: null } ? Required(result, worst) : default)}
            {Markup.Join(sections)}
            {Figures(result)}</section>
            """);
    }

    private static Markup Observed(
        TransientResult result,
        ObservationResult observed,
        int index,
        WorstObservation? worst,
        Markup still)
    {
        var isWorst = ReferenceEquals(worst?.Observation, observed);
        var isHere = worst is { IsWithin: true } && ReferenceEquals(worst.Shown, observed);
        var atMax = isWorst ? worst!.AtMax : observed.Greatest == observed.Max;
        return Markup.Of($"""
            <section class="observation" id="observation-{index}"
            aria-labelledby="observation-{index}-heading">
            <h3 id="observation-{index}-heading">{Markup.Name(observed.Name)}</h3>
            <p class="extremes">{Extremes(result, observed)}</p>
            <figure>
            <div class="plots" data-observation="{index}"></div>
            {still}<figcaption class="aside">{Caption(observed)}</figcaption>
            </figure>
            {(isHere ? Required(result, worst!) : default)}
            {CauseTable(result, observed, atMax)}{Breakdowns(result, observed, atMax)}
            {SinceTable(observed, atMax)}</section>

            """);
    }

    private static Markup StillPicture(TransientResult result, ObservationResult observed, PlotFonts fonts)
    {
        var (shapes, height) = PlotPanel.Draw(result, observed, PlotWindow.Whole(result, observed), fonts, 0);
        var drawing = new Drawing(PlotPanel.Width, height, $"Waveform of {observed.Name}", shapes);
        return Markup.Of($"<noscript>{Themed(drawing)}</noscript>\n");
    }

    private static Markup Extremes(TransientResult result, ObservationResult observed)
    {
        var unit = observed.Unit;
        var rising = observed.EndsRising ? "; it is still growing at the end of the study" : "";
        var final = observed.Final is { } limit
            ? $"tends to {Whole(Number(limit, unit))}"
            : "goes on swinging or has no limit";
        return Markup.Of($"""
            Highest {Strong(observed.Max, observed)}{Whole(When(result, observed.Max))}; lowest
            {Strong(observed.Min, observed)}{Whole(When(result, observed.Min))};
            {Whole(Number(Cleaned(observed.End, observed), unit))} at the end, {final}{rising}.
            """);
    }

    private static Markup Strong(Extreme extreme, ObservationResult observed)
    {
        var words = Cleaned(extreme.Value, observed) is { } value
            ? Whole(Number(value, observed.Unit))
            : "no finite value";
        return Markup.Of($"<strong>{words}</strong>");
    }

    // A number and its unit stay in one line.
    private static string Whole(string words) => NumberBeforeUnit().Replace(words, "\u00a0");

    [GeneratedRegex(@"(?<=\d) (?=[fpnµmkMGT]?[VAWJCsH])", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex NumberBeforeUnit();

    private static Markup Caption(ObservationResult observed)
    {
        if (observed.Contributions is [var only])
        {
            return Markup.Of($"""
                The line is the total, in {observed.Unit} over time; its one cause is
                {Markup.Name(only.Cause)}.
                """);
        }

        var largest = observed.Contributions
            .OrderByDescending(c => Math.Abs((observed.Greatest == observed.Max ? c.AtMax : c.AtMin) ?? 0))
            .Take(3)
            .Select((c, i) => Markup.Of($"{(i == 0 ? "" : ", ")}{Markup.Name(c.Cause)}"));
        return Markup.Of($"""
            The thick line is the total, in {observed.Unit} over time; thin lines are contributions. The
            largest at its greatest value: {Markup.Join(largest)}.
            """);
    }

    /// <summary>What makes a requirement's worst value, where that is no extreme of the
    /// waveform.</summary>
    private static Markup Required(TransientResult result, WorstObservation worst)
    {
        var (observed, atMax) = (worst.Observation, worst.AtMax);
        return Markup.Of($"""
            <div class="required breakdown">
            <p class="words">{Whole(Number(worst.Extreme.Value, observed.Unit))} of
            {Markup.Name(observed.Name)}: {worst.Why}. {Whole(WithinWords.Of(result, worst))}</p>
            {CauseTable(result, observed, atMax, "causes since")}{Breakdowns(result, observed, atMax)}
            {SinceTable(observed, atMax)}</div>
            """);
    }

    private static Markup CauseTable(
        TransientResult result, ObservationResult observed, bool atMax, string kind = "causes")
    {
        var extreme = atMax ? observed.Max : observed.Min;
        if (observed.Contributions.IsEmpty || extreme.Value is not { } total)
        {
            return default;
        }

        var (word, without) = atMax ? ("highest", "Highest without it") : ("lowest", "Lowest without it");
        var largest = observed.Contributions.Max(c => Math.Abs((atMax ? c.AtMax : c.AtMin) ?? 0));
        var rows = Enumerable.Range(0, observed.Contributions.Length)
            .OrderByDescending(i => Math.Abs(At(i) ?? 0))
            .Select(i => CauseRow(observed, i, atMax, total, largest));
        return Markup.Of($"""
            {Words(result, observed, atMax)}
            <div class="wide"><table class="{kind}" data-at="{(atMax ? "max" : "min")}">
            <caption>What made the {word} value, <span
            class="peak">{Number(total, observed.Unit)}{When(result, extreme)}</span></caption>
            <thead><tr><th scope="col">Cause</th><th scope="col" class="number">Then</th>
            <th scope="col" class="number">Of the total</th>
            <th scope="col"><span class="hidden">Bar</span></th>
            <th scope="col" class="number">Its own peak</th><th scope="col" class="number">{without}</th>
            </tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            {Cancelling(observed, atMax, total)}
            """);

        double? At(int i) => atMax ? observed.Contributions[i].AtMax : observed.Contributions[i].AtMin;
    }

    private static Markup CauseRow(
        ObservationResult observed, int i, bool atMax, double total, double largest)
    {
        var (contribution, unit) = (observed.Contributions[i], observed.Unit);
        var value = Cleaned(atMax ? contribution.AtMax : contribution.AtMin, observed);
        var own = Math.Abs(contribution.OwnMin?.Value ?? 0) > Math.Abs(contribution.OwnMax?.Value ?? 0)
            ? contribution.OwnMin
            : contribution.OwnMax;
        var without = atMax ? contribution.MaxWithout : contribution.MinWithout;
        var share = value is { } part && total != 0 ? Percent(part / total) : "";
        var rest = without is null ? "" : Number(Cleaned(without.Value, observed), unit);
        var time = Cleaned(own?.Value, observed) is not (null or 0)
            ? Markup.Of($" <span class=\"aside\">at {Number(own!.Time, "s")}</span>")
            : default;
        return Markup.Of($"""
            <tr data-cause="{i}"><th scope="row">{Markup.Name(contribution.Cause)}</th>
            <td class="number then">{Signed(value, unit)}</td><td class="number share">{share}</td>
            <td class="bars">{Bar(value, largest)}</td>
            <td class="number own">{Number(Cleaned(own?.Value, observed), unit)}{time}</td>
            <td class="number without">{rest}</td></tr>

            """);
    }

    // The accounting of causes: magnitudes that sum to over three times the total cancel.
    private static Markup Cancelling(ObservationResult observed, bool atMax, double total)
    {
        var shares = observed.Contributions
            .Select(c => (c.Cause, Value: (atMax ? c.AtMax : c.AtMin) ?? 0)).ToArray();
        if (shares.Sum(s => Math.Abs(s.Value)) <= 3 * Math.Abs(total))
        {
            return default;
        }

        var sign = total < 0 ? -1 : 1;
        var with = shares.Where(s => s.Value * sign > 0).ToArray();
        var against = shares.Where(s => s.Value * sign < 0).ToArray();
        return Markup.Of($"""
            <p class="aside cancelling">Large causes cancel: {Group(with, observed.Unit)} against
            {Group(against, observed.Unit)}: {Number(total, observed.Unit)}.</p>

            """);
    }

    private static Markup Group((string Cause, double Value)[] shares, string unit)
    {
        var largest = shares.OrderByDescending(s => Math.Abs(s.Value)).Take(3)
            .Select((s, i) => Markup.Of($"{(i == 0 ? "" : ", ")}{Markup.Name(s.Cause)}"));
        var rest = shares.Length > 3 ? $" and {shares.Length - 3} more" : "";
        return Markup.Of($"{Markup.Join(largest)}{rest} {Number(Math.Abs(shares.Sum(s => s.Value)), unit)}");
    }

    private static Markup SinceTable(ObservationResult observed, bool atMax)
    {
        var since = atMax ? observed.After?.AtMax : observed.After?.AtMin;
        var total = (atMax ? observed.Max : observed.Min).Value;
        if (since is null || since.Parts.IsEmpty || total is null)
        {
            return default;
        }

        var largest = since.Parts.Max(p => Math.Abs(p.Value ?? 0));
        var parts = since.Parts.OrderByDescending(p => Math.Abs(p.Value ?? 0)).ToArray();
        if (parts.Length > MostSinceRows)
        {
            var rest = parts[(MostSinceRows - 1)..];
            parts =
            [
                .. parts[..(MostSinceRows - 1)],
                new CauseValue($"{rest.Length} smaller ones together", rest.Sum(p => p.Value)),
            ];
        }

        var rows = parts.Select(p => Markup.Of($"""
            <tr><th scope="row">{Markup.Name(p.Cause)}</th>
            <td class="number">{Signed(p.Value, observed.Unit)}</td>
            <td class="number">{(p.Value is { } v && total != 0 ? Percent(v / total.Value) : "")}</td>
            <td class="bars">{Bar(p.Value, largest)}</td></tr>

            """));
        return Markup.Of($"""
            <div class="wide"><table class="causes since">
            <caption>The same value counted since {Markup.Name(since.Event)}: what each part held just
            before it, and the sources from then on</caption>
            <thead><tr><th scope="col">Cause</th><th scope="col" class="number">Then</th>
            <th scope="col" class="number">Of the total</th>
            <th scope="col"><span class="hidden">Bar</span></th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            {Driving(since)}
            """);
    }

    private static Markup Driving(SinceEvent since) => DrivingDifference.Of(since) is not { } difference
        ? default
        : Markup.Of($"""
            <p class="aside cancelling">Two large causes cancel. What they are at that instant, and their
            difference: {Markup.Name(difference.With.Cause)}
            {Number(Math.Abs(difference.With.Strength ?? 0), difference.Unit)} against
            {Markup.Name(difference.Against.Cause)}
            {Number(Math.Abs(difference.Against.Strength ?? 0), difference.Unit)}:
            {Number(difference.Value, difference.Unit)}.</p>

            """);

    private static Markup Figures(TransientResult result) => result.Figures.IsEmpty
        ? default
        : Markup.Of($"""
            <div class="wide"><table id="figures">
            <caption>Read off the waveforms</caption>
            <thead><tr><th scope="col">Figure</th><th scope="col" class="number">Value</th>
            <th scope="col">Definition</th></tr></thead>
            <tbody>
            {Markup.Join(result.Figures.Select(FigureRow))}</tbody>
            </table></div>
            """);

    private static Markup FigureRow(FigureResult figure) => Markup.Of($"""
        <tr><th scope="row">{Markup.Name(figure.Name)}</th>
        <td class="number">{Number(figure.Value, figure.Unit)}</td><td>{figure.Definition}</td></tr>

        """);
}
