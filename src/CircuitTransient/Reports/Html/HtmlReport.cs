using System.Collections.Immutable;
using System.Reflection;
using System.Security.Cryptography;
using System.Text;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Html;

/// <summary>The report people look at: one self-contained page that a review reads, an engineer explores and
/// a printer prints.</summary>
public static partial class HtmlReport
{
    private static readonly string[] Scripts =
        ["report-numbers.js", "report-waves.js", "report-plot.js", "report-explore.js", "report-page.js"];

    /// <summary>The page.</summary>
    /// <param name="result">What it reports.</param>
    /// <param name="command">The command that makes it again, as typed.</param>
    /// <param name="sections">What a study adds; shown right after the verdict.</param>
    public static string Write(
        TransientResult result, string command, params ImmutableArray<StudySection> sections)
    {
        using var fonts = new PlotFonts();
        var style = EmbeddedText.Of("report.css");
        var script = $"(() => {{\n\"use strict\";\n{string.Concat(Scripts.Select(EmbeddedText.Of))}}})();\n";
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        return Markup.Of($"""
            <!DOCTYPE html>
            <html lang="en">
            <head>
            <meta charset="utf-8">
            <meta name="viewport" content="width=device-width, initial-scale=1">
            <meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src
            '{Hash(style)}'; script-src '{Hash(script)}'">
            <meta name="color-scheme" content="light dark">
            <title>{title}</title>
            <style>{Markup.Raw(style, "style")}</style>
            </head>
            <body>
            <a class="skip" href="#observations">Skip to the waveforms</a>
            {Head(result, title)}
            <main>
            {Verdict(result, sections)}
            {Markup.Join(sections.Select((section, index) => Section(section, index)))}
            {Cautions(result)}
            {Events(result, fonts)}
            {Observations(result, fonts)}
            {Stresses(result)}
            {Poles(result, fonts)}
            {Impulses(result)}
            {Checks(result)}
            {Source(result, command)}
            </main>
            <footer><p>{TerminalSummary.Closing}</p></footer>
            <script type="application/json" id="data">{Markup.Raw(PageData.Write(result), "script")}</script>
            <script>{Markup.Raw(script, "script")}</script>
            </body>
            </html>

            """).ToString();
    }

    private static Markup Head(TransientResult result, string title)
    {
        var circuit = result.Circuit;
        var until = EngineeringNumber.Format(result.Until, "s");
        var start = circuit.StartsSettled
            ? "sources on for ever before the start"
            : "everything stored at the start as stated";
        var reason = result.UntilReason is { } words ? Markup.Of($" ({words})") : default;
        var notes = circuit.Notes.Select(note => Markup.Of($"<p>{Markup.Name(note)}</p>\n"));
        return Markup.Of($"""
            <header>
            <h1>{Markup.Name(title)}</h1>
            <p class="study">{Markup.Name(circuit.Source.Name)}: {circuit.Parts.Length} parts,
            {circuit.Nodes.Length} nodes; from 0 s to {until}{reason}; {start}.</p>
            {Markup.Join(notes)}</header>
            """);
    }

    private static Markup Section(StudySection section, int index) => Markup.Of($"""
        <section class="study-section" aria-labelledby="study-{index}">
        <h2 id="study-{index}">{Markup.Name(section.Title)}</h2>
        {section.Body}
        </section>

        """);

    private static string Hash(string content) =>
        $"sha256-{Convert.ToBase64String(SHA256.HashData(Encoding.UTF8.GetBytes(content)))}";

    /// <summary>The version of this library.</summary>
    internal static string Version =>
        typeof(HtmlReport).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()
            ?.InformationalVersion ?? "";
}
