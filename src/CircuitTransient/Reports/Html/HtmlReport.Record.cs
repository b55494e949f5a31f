using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Html;

/// <content>Stresses, impulses, self-checks and the circuit file.</content>
public static partial class HtmlReport
{
    private const int MostLines = 5000;

    private static Markup Stresses(TransientResult result)
    {
        if (result.Parts.IsEmpty)
        {
            return default;
        }

        var rows = result.Parts.Select(part => Markup.Of($"""
            <tr><th scope="row">{Markup.Name(part.Name)}</th><td>{part.Kind}</td>
            <td class="number">{Peak(part.PeakVoltage, "V")}</td>
            <td class="number">{Peak(part.PeakCurrent, "A")}</td>
            <td class="number">{Peak(part.PeakPower, "W")}</td>
            <td class="number">{Number(part.Energy, "J")}</td>
            <td class="number">{Number(part.JouleIntegral, "A²s")}</td></tr>

            """));
        return Markup.Of($"""
            <section id="stresses" aria-labelledby="stresses-heading">
            <h2 id="stresses-heading">What every part bears</h2>
            <div class="wide"><table>
            <caption>Values of greatest magnitude over the study; energy absorbed, of capacitors and
            inductors the greatest stored</caption>
            <thead><tr><th scope="col">Part</th><th scope="col">Kind</th>
            <th scope="col" class="number">Voltage</th><th scope="col" class="number">Current</th>
            <th scope="col" class="number">Power</th><th scope="col" class="number">Energy</th>
            <th scope="col" class="number">I²t</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}</tbody>
            </table></div>
            </section>
            """);
    }

    private static Markup Impulses(TransientResult result)
    {
        var intervals = result.Intervals.Where(i => !i.Impulses.IsEmpty).ToArray();
        if (intervals.Length == 0)
        {
            return default;
        }

        var items = intervals.Select(interval => Markup.Of($"""
            {Markup.Join(interval.Impulses.Select(i => Impulse(result, i)))}<li>Energy lost in them:
            {Number(interval.EnergyLost, "J")}.</li>

            """));
        return Markup.Of($"""
            <section id="impulses" aria-labelledby="impulses-heading">
            <h2 id="impulses-heading">Impulses and lost energy</h2>
            <p>Ideal parts were joined or parted with more than they could hold.</p>
            <ul>
            {Markup.Join(items)}</ul>
            </section>
            """);
    }

    private static Markup Impulse(TransientResult result, ImpulseResult impulse)
    {
        var remedy = impulse.Remedy is { } words ? $"; {words}" : "";
        var size = impulse.Charge is { } charge
            ? $"{Number(charge, "C")} through "
            : $"{Number(impulse.VoltSeconds, "Vs")} across ";
        var when = InstantWords.At(result, impulse.Time);
        return Markup.Of($"<li>{when}: {size}{Markup.Name(impulse.Part)}{remedy}.</li>\n");
    }

    private static Markup Checks(TransientResult result)
    {
        var rows = result.SelfChecks.Select(c => Markup.Of($"""
            <tr{Broken(c.Holds)}><th scope="row">{c.Name}</th><td class="number">{Small(c.Worst)}</td>
            <td class="number">{Small(c.Allowed)}</td>
            <td>{(c.Holds ? "holds" : "FAILED: do not use these figures")}</td></tr>

            """));
        var open = result.NotJudged.Select(n => Markup.Of($"""
            <tr><th scope="row">{n.Name}</th><td colspan="3">not judged: {n.Reason}</td></tr>

            """));
        return Markup.Of($"""
            <section id="checks" aria-labelledby="checks-heading">
            <h2 id="checks-heading">Self-checks</h2>
            <div class="wide"><table>
            <caption>Checks that every solve runs on its own answer, as parts of the largest value</caption>
            <thead><tr><th scope="col">Check</th><th scope="col" class="number">Worst</th>
            <th scope="col" class="number">Allowed</th><th scope="col">Verdict</th></tr></thead>
            <tbody>
            {Markup.Join(rows)}{Markup.Join(open)}</tbody>
            </table></div>
            </section>
            """);
    }

    private static Markup Source(TransientResult result, string command)
    {
        var source = result.Circuit.Source;
        var count = Math.Min(source.LineCount, MostLines);
        count -= count > 1 && source.Line(count).Length == 0 ? 1 : 0;
        var lines = Enumerable.Range(1, count)
            .Select(n => Markup.Of($"<li id=\"line-{n}\"><code>{source.Line(n)}</code></li>\n"));
        var rest = source.LineCount > MostLines
            ? Markup.Of($"<p>{source.LineCount - MostLines} more lines are in the file.</p>\n")
            : default;
        return Markup.Of($"""
            <section id="source" aria-labelledby="source-heading">
            <h2 id="source-heading">The circuit file</h2>
            <ol class="source">
            {Markup.Join(lines)}</ol>
            {rest}<dl>
            <dt>File</dt><dd>{Markup.Name(source.Name)}</dd>
            <dt>SHA-256</dt><dd><code>{source.Sha256}</code></dd>
            <dt>Version</dt><dd>Circuit Transient {Version}</dd>
            <dt>To make this again</dt><dd><code>{command}</code></dd>
            </dl>
            </section>
            """);
    }
}
