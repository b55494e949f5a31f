using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;

namespace CircuitTransient.Reports.Pdf;

/// <summary>Adds an outline to a finished PDF, which the drawing library does not write: an incremental
/// update after its end, as ISO 32000-1 (7.5.6 and 12.3.3, from memory) provides.</summary>
internal static partial class PdfOutline
{
    /// <summary>The document with an outline of one level.</summary>
    /// <param name="document">A PDF with a plain cross-reference table.</param>
    /// <param name="entries">Titles and pages, counted from 0.</param>
    public static byte[] Append(byte[] document, IReadOnlyList<(string Title, int Page)> entries)
    {
        var text = Encoding.Latin1.GetString(document);
        var trailer = text[text.LastIndexOf("trailer", StringComparison.Ordinal)..];
        var previous = Number(StartOfTable().Match(trailer));
        var size = Number(Size().Match(trailer));
        var root = Number(Root().Match(trailer));
        var catalog = ObjectOf(text, root);
        var pages = PagesBelow(text, Number(Pages().Match(catalog)));
        var added = new StringBuilder("\n");
        var places = new List<(int Object, int Place)>();
        var inside = catalog.IndexOf("<<", StringComparison.Ordinal) + 2;
        Add(root, catalog.Insert(inside, $"/Outlines {size} 0 R "));
        Add(size, $"<</Type /Outlines /First {size + 1} 0 R /Last {size + entries.Count} 0 R "
            + $"/Count {entries.Count}>>");
        for (var i = 0; i < entries.Count; i++)
        {
            var (title, page) = entries[i];
            var before = i > 0 ? $" /Prev {size + i} 0 R" : "";
            var after = i + 1 < entries.Count ? $" /Next {size + i + 2} 0 R" : "";
            var letters = Convert.ToHexString(Encoding.BigEndianUnicode.GetBytes(title));
            Add(size + i + 1, $"<</Title <FEFF{letters}> "
                + $"/Parent {size} 0 R{before}{after} /Dest [{pages[page]} 0 R /Fit]>>");
        }

        var table = document.Length + added.Length;
        added.Append("xref\n");
        foreach (var (number, place) in places.OrderBy(p => p.Object))
        {
            added.Append(CultureInfo.InvariantCulture, $"{number} 1\n{place:D10} 00000 n \n");
        }

        var sizes = $"/Size {size + entries.Count + 1} /Prev {previous}";
        added.Append(trailer[..trailer.LastIndexOf("startxref", StringComparison.Ordinal)]
            .Replace($"/Size {size}", sizes, StringComparison.Ordinal));
        added.Append(CultureInfo.InvariantCulture, $"startxref\n{table}\n%%EOF\n");
        return [.. document, .. Encoding.Latin1.GetBytes(added.ToString())];

        void Add(int number, string body)
        {
            places.Add((number, document.Length + added.Length));
            added.Append(CultureInfo.InvariantCulture, $"{number} 0 obj\n{body}\nendobj\n");
        }
    }

    private static List<int> PagesBelow(string text, int node)
    {
        var body = ObjectOf(text, node);
        return Kids().Match(body) is { Success: true } kids
            ? [.. Reference().Matches(kids.Value).SelectMany(r => PagesBelow(text, Number(r)))]
            : [node];
    }

    private static string ObjectOf(string text, int number)
    {
        var head = $"\n{number} 0 obj\n";
        var start = text.IndexOf(head, StringComparison.Ordinal) + head.Length;
        return text[start..text.IndexOf("\nendobj", start, StringComparison.Ordinal)];
    }

    private static int Number(Match match) =>
        match.Success
            ? int.Parse(match.Groups["n"].ValueSpan, provider: CultureInfo.InvariantCulture)
            : throw new InvalidOperationException("the PDF is not laid out as this step reads it");

    [GeneratedRegex(@"startxref\s+(?<n>\d+)", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex StartOfTable();

    [GeneratedRegex(@"/Size (?<n>\d+)", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Size();

    [GeneratedRegex(@"/Root (?<n>\d+) 0 R", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Root();

    [GeneratedRegex(@"/Pages (?<n>\d+) 0 R", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Pages();

    [GeneratedRegex(@"/Kids \[[^\]]*\]", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Kids();

    [GeneratedRegex(@"(?<n>\d+) 0 R", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Reference();
}
