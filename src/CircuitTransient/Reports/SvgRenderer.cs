using System.Collections.Immutable;
using System.Globalization;
using System.Text;

namespace CircuitTransient.Reports;

/// <summary>Writes a drawing as SVG 1.1; text stays text.</summary>
public static class SvgRenderer
{
    /// <summary>The document.</summary>
    public static string Write(Drawing drawing)
    {
        var svg = new StringBuilder();
        var (width, height) = (Number(drawing.Width), Number(drawing.Height));
        svg.Append($"<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{width}\" height=\"{height}\"");
        svg.Append(" stroke-linejoin=\"round\"");
        svg.Append($" viewBox=\"0 0 {width} {height}\" role=\"img\"");
        svg.Append(" font-family=\"Inter, 'Segoe UI', 'Helvetica Neue', Arial, sans-serif\">\n");
        svg.Append($"<title>{Escaped(drawing.Title)}</title>\n");
        svg.Append($"<rect width=\"{width}\" height=\"{height}\" fill=\"{PlotStyle.Paper}\"/>\n");
        foreach (var shape in drawing.Shapes)
        {
            svg.Append(Element(shape)).Append('\n');
        }

        return svg.Append("</svg>\n").ToString();
    }

    private static string Element(Shape shape) =>
        shape switch
        {
            PolylineShape line =>
                $"<polyline points=\"{Points(line.Points)}\" fill=\"none\"{Of(line.Stroke)}/>",
            LineShape line =>
                $"<line x1=\"{Number(line.X1)}\" y1=\"{Number(line.Y1)}\" x2=\"{Number(line.X2)}\""
                    + $" y2=\"{Number(line.Y2)}\"{Of(line.Stroke)}/>",
            RectangleShape box =>
                $"<rect x=\"{Number(box.X)}\" y=\"{Number(box.Y)}\" width=\"{Number(box.Width)}\""
                    + $" height=\"{Number(box.Height)}\" fill=\"{box.Fill}\"/>",
            AreaShape area => $"<polygon points=\"{Points(area.Points)}\" fill=\"{area.Fill}\"/>",
            DiscShape disc =>
                $"<circle cx=\"{Number(disc.X)}\" cy=\"{Number(disc.Y)}\" r=\"{Number(disc.Radius)}\""
                    + $" fill=\"{disc.Fill}\" stroke=\"{PlotStyle.Paper}\"/>",
            TextShape text => Element(text),
            _ => throw new System.Diagnostics.UnreachableException($"no element for {shape}"),
        };

    private static string Element(TextShape text)
    {
        var anchor = text.Anchor switch
        {
            TextAnchor.Middle => " text-anchor=\"middle\"",
            TextAnchor.End => " text-anchor=\"end\"",
            _ => "",
        };
        var weight = text.IsStrong ? " font-weight=\"600\"" : "";
        var halo = text.HasHalo
            ? $" stroke=\"{PlotStyle.Paper}\" stroke-width=\"3\" paint-order=\"stroke\""
            : "";
        return $"<text x=\"{Number(text.X)}\" y=\"{Number(text.Y)}\" font-size=\"{Number(text.Size)}\""
            + $" fill=\"{text.Fill}\"{anchor}{weight}{halo}>{Escaped(text.Text)}</text>";
    }

    private static string Of(Stroke stroke)
    {
        var dash = stroke.Dash.IsEmpty
            ? ""
            : $" stroke-dasharray=\"{string.Join(' ', stroke.Dash.Select(Number))}\"";
        return $" stroke=\"{stroke.Colour}\" stroke-width=\"{Number(stroke.Width)}\"{dash}";
    }

    private static string Points(ImmutableArray<PlotPoint> points) =>
        string.Join(' ', points.Select(point => $"{Number(point.X)},{Number(point.Y)}"));

    private static string Number(double value) =>
        (Math.Round(value, 2) + 0.0).ToString("0.##", CultureInfo.InvariantCulture);

    // XML 1.0 forbids control characters and lone surrogates even when escaped.
    private static string Escaped(string text)
    {
        var escaped = new StringBuilder(text.Length);
        foreach (var rune in text.EnumerateRunes())
        {
            escaped.Append(
                rune.Value switch
                {
                    '&' => "&amp;",
                    '<' => "&lt;",
                    '>' => "&gt;",
                    '"' => "&quot;",
                    < 0x20 or (>= 0x7F and <= 0x9F) or 0xFFFE or 0xFFFF => "\uFFFD",
                    _ => rune.ToString(),
                }
            );
        }

        return escaped.ToString();
    }
}
