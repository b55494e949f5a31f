using System.Runtime.CompilerServices;
using System.Text;

namespace CircuitTransient.Reports.Html;

/// <summary>A piece of HTML that is whole and safe; it can only be made from literals and escaped
/// text.</summary>
public readonly struct Markup
{
    private readonly string? html;

    private Markup(string html) => this.html = html;

    /// <summary>Markup of an interpolated string: its literal parts are taken as they stand, what is put into
    /// its holes becomes text.</summary>
    public static Markup Of(MarkupHandler handler) => new(handler.Written);

    /// <summary>Pieces one after another.</summary>
    public static Markup Join(IEnumerable<Markup> pieces) => new(string.Concat(pieces.Select(p => p.html)));

    /// <summary>A name or text of the user's, kept apart from the direction of the text around it.</summary>
    public static Markup Name(string text) => Of($"<bdi>{text}</bdi>");

    /// <summary>A picture written by <see cref="SvgRenderer"/>, which escapes its own texts.</summary>
    internal static Markup Picture(string svg) => new(svg);

    /// <summary>A script, style sheet or JSON of ours, which must not hold the end of its own
    /// element.</summary>
    internal static Markup Raw(string content, string element) =>
        content.Contains($"</{element}", StringComparison.OrdinalIgnoreCase)
            ? throw new ArgumentException($"the content would end its {element} element", nameof(content))
            : new(content);

    /// <inheritdoc/>
    public override string ToString() => html ?? "";
}

/// <summary>Collects an interpolated string and escapes everything in its holes.</summary>
[InterpolatedStringHandler]
public readonly ref struct MarkupHandler
{
    private const char Unknown = '\uFFFD';

    private readonly StringBuilder text;

    /// <summary>Begins a string.</summary>
    public MarkupHandler(int literalLength, int formattedCount) =>
        text = new StringBuilder(literalLength + (16 * formattedCount));

    /// <summary>What was collected.</summary>
    internal string Written => text.ToString();

    /// <summary>A part written in our own source.</summary>
    public void AppendLiteral(string value) => text.Append(value);

    /// <summary>Markup made before.</summary>
    public void AppendFormatted(Markup value) => text.Append(value.ToString());

    /// <summary>A whole number.</summary>
    public void AppendFormatted(int value) => text.Append(value);

    /// <summary>A text: every character with a meaning in HTML loses it, in elements and attributes
    /// alike.</summary>
    public void AppendFormatted(string? value)
    {
        foreach (var rune in (value ?? "").EnumerateRunes()) // a lone surrogate comes as U+FFFD
        {
            _ = rune.Value switch
            {
                '&' => text.Append("&amp;"),
                '<' => text.Append("&lt;"),
                '>' => text.Append("&gt;"),
                '"' => text.Append("&quot;"),
                '\'' => text.Append("&#39;"),
                '\t' or '\n' => text.Append((char)rune.Value),
                < 0x20 or (>= 0x7F and < 0xA0) => text.Append(Unknown),
                _ => text.Append(rune),
            };
        }
    }
}
