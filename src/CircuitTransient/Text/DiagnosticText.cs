using System.Text;

namespace CircuitTransient.Text;

/// <summary>Diagnostics written for reading: place and headline, the line with the
/// fault underlined, the way out.</summary>
public static class DiagnosticText
{
    /// <summary>The most errors shown, and the most warnings; what is behind them is counted.</summary>
    public const int MostShown = 20;

    /// <summary>Writes one diagnostic, two to four lines, without a final line break.</summary>
    public static string Render(Diagnostic diagnostic)
    {
        var (source, span) = (diagnostic.Source, diagnostic.Span);
        var line = source.LineOf(span.Start);
        var text = new StringBuilder();
        Excerpt.AppendPrintable(text, source.Name);
        text.Append(null, $":{line}:{source.ColumnOf(span.Start)}: ");
        text.Append(diagnostic.Severity == Severity.Error ? "error: " : "warning: ");
        Excerpt.AppendPrintable(text, diagnostic.Message);
        if (Excerpt.Around(source, span) is { } excerpt)
        {
            text.Append("\n  ").Append(excerpt.Line).Append("\n  ").Append(excerpt.Underline);
        }

        if (diagnostic.Advice is { } advice)
        {
            Excerpt.AppendPrintable(text.Append("\n  → "), advice);
        }

        return text.ToString();
    }

    /// <summary>Writes many in the order of their places, errors and warnings together,
    /// with a final line break.</summary>
    public static string Render(IEnumerable<Diagnostic> diagnostics)
    {
        var text = new StringBuilder();
        var shown = new int[2];
        var hidden = new int[2];
        foreach (var diagnostic in InOrder(diagnostics))
        {
            var kind = (int)diagnostic.Severity;
            if (shown[kind] == MostShown)
            {
                hidden[kind]++;
                continue;
            }

            shown[kind]++;
            text.Append(Render(diagnostic)).Append('\n');
        }

        AppendHidden(text, hidden[(int)Severity.Error], "error");
        AppendHidden(text, hidden[(int)Severity.Warning], "warning");
        return text.ToString();
    }

    private static void AppendHidden(StringBuilder text, int count, string noun)
    {
        if (count > 0)
        {
            text.Append(null, $"and {count} more {noun}{(count == 1 ? "" : "s")}\n");
        }
    }

    private static IEnumerable<Diagnostic> InOrder(IEnumerable<Diagnostic> diagnostics)
    {
        var all = diagnostics.ToList();
        var sources = all.Select(d => d.Source).Distinct().ToList();
        return all.OrderBy(d => sources.IndexOf(d.Source)).ThenBy(d => d.Span.Start);
    }
}
