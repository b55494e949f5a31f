using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>An extreme in words, by switching and by mode.</content>
public static partial class HtmlReport
{
    private const int MostModeRows = 12;
    private const int MostModeCauses = 6; // columns that fit a page

    private static Markup Words(TransientResult result, ObservationResult observed, bool atMax)
    {
        string?[] lines = [PeakWords.Of(result, observed, atMax), PhaseWords.Of(result, observed, atMax)];
        return Markup.Join(lines.OfType<string>()
            .Select(line => Markup.Of($"<p class=\"words\">{Whole(line)}</p>\n")));
    }

    private static Markup Breakdowns(TransientResult result, ObservationResult observed, bool atMax)
    {
        var total = (atMax ? observed.Max : observed.Min).Value;
        if (total is not { } value)
        {
            return default;
        }

        if ((atMax ? observed.BySwitching?.AtMax : observed.BySwitching?.AtMin) is { } switchings)
        {
            return SwitchingTable(observed, switchings, value);
        }

        return result.By == Breakdown.Mode
            && (atMax ? observed.ByMode?.AtMax : observed.ByMode?.AtMin) is { } modes
            ? ModeTable(observed, modes, value)
            : default;
    }

    private static Markup SwitchingTable(
        ObservationResult observed, SwitchingBreakdown breakdown, double total)
    {
        var rows = breakdown.Effects.Select(e => SwitchingRow(
            observed, e.Event, $"at {Number(e.Time, "s")}", e.Value, total, e.Reason));
        return Markup.Of($"""
            <div class="wide"><table class="breakdown">
            <caption>The same value by switching: the answer with each switching and those before it, less
            that without it; instants of the full answer kept</caption>
            <thead><tr><th scope="col">Switching</th><th scope="col">When</th>
            <th scope="col" class="number">Effect</th><th scope="col" class="number">Of the total</th></tr>
            </thead>
            <tbody>
            {SwitchingRow(observed, breakdown.BaseWords, "", breakdown.Base, total, null)}
            {Markup.Join(rows)}</tbody>
            </table></div>

            """);
    }

    private static Markup SwitchingRow(
        ObservationResult observed, string name, string when, double? value, double total, string? reason)
    {
        var shown = Cleaned(value, observed);
        var share = shown is { } part && total != 0 ? Percent(part / total) : "";
        return Markup.Of($"""
            <tr><th scope="row">{Markup.Name(name)}</th><td>{when}</td>
            <td class="number">{(shown is null ? reason : Signed(shown, observed.Unit))}</td>
            <td class="number">{share}</td></tr>

            """);
    }

    private static Markup ModeTable(ObservationResult observed, ModeBreakdown breakdown, double total)
    {
        var causes = Enumerable.Range(0, breakdown.Causes.Length)
            .Where(c => breakdown.Causes[c].Values.Any(v => Cleaned(v, observed) != 0))
            .OrderByDescending(c => breakdown.Causes[c].Values.Max(Math.Abs))
            .Take(MostModeCauses).Order().ToArray();
        var heads = causes.Select(c => Markup.Of(
            $"<th scope=\"col\" class=\"number\">{Markup.Name(breakdown.Causes[c].Cause)}</th>"));
        var rows = Enumerable.Range(0, Math.Min(MostModeRows, breakdown.Modes.Length))
            .Select(m => ModeRow(observed, breakdown, causes, m, total));
        var joint = breakdown.Joint == 0
            ? default
            : Markup.Of($"Of no single cause and mode: {Number(breakdown.Joint, observed.Unit)}. ");
        var stored = breakdown.Energies is { } energies ? $"Stored then: {Stored(energies)}." : "";
        return Markup.Of($"""
            <div class="wide"><table class="breakdown">
            <caption>The same value by cause and mode, in the interval it stands in; a mode is named by the
            parts that hold its energy</caption>
            <thead><tr><th scope="col">Mode</th><th scope="col" class="number">All causes</th>
            <th scope="col" class="number">Of the total</th>{Markup.Join(heads)}
            <th scope="col" class="number">Its energy then</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            <p class="aside breakdown">{joint}{stored}</p>

            """);
    }

    private static Markup ModeRow(
        ObservationResult observed, ModeBreakdown breakdown, int[] causes, int m, double total)
    {
        var mode = breakdown.Modes[m];
        var cells = causes.Select(c => Markup.Of($"""
            <td class="number">{Signed(Cleaned(breakdown.Causes[c].Values[m], observed), observed.Unit)}</td>
            """));
        var driven = mode.IsDriven ? ", with the sources that follow it too closely to be told apart" : "";
        return Markup.Of($"""
            <tr><th scope="row">{Markup.Name(mode.Name)}{driven}</th>
            <td class="number">{Signed(Cleaned(mode.Value, observed), observed.Unit)}</td>
            <td class="number">{(total != 0 ? Percent(mode.Value / total) : "")}</td>{Markup.Join(cells)}
            <td class="number">{Number(breakdown.Energies?.Own[m], "J")}</td></tr>

            """);
    }
}
