using System.Collections.Immutable;
using System.Text;

namespace CircuitTransient.Reports;

/// <summary>A text for the terminal as it grows: headings, paragraphs and tables within a width.</summary>
/// <param name="colour">Whether headings and bars carry terminal attributes.</param>
internal sealed class SummaryText(bool colour)
{
    /// <summary>Columns a line may take.</summary>
    public const int Width = 100;

    private const string Bold = "\u001b[1m";
    private const string Blue = "\u001b[34m";
    private const string Plain = "\u001b[0m";

    private readonly StringBuilder text = new();

    /// <summary>An empty line.</summary>
    public void Blank() => text.Append('\n');

    /// <summary>A heading after an empty line.</summary>
    public void Heading(string heading)
    {
        Blank();
        Title(heading);
    }

    /// <summary>A heading.</summary>
    public void Title(string heading)
    {
        foreach (var line in TextTable.Wrap(DisplayWidth.Printable(heading), Width))
        {
            text.Append(colour ? Bold + line + Plain : line).Append('\n');
        }
    }

    /// <summary>A paragraph; lines after the first stand further in.</summary>
    public void Paragraph(string paragraph, int indent = 2, int hanging = 0)
    {
        var lines = TextTable.Wrap(DisplayWidth.Printable(paragraph), Width - indent - hanging);
        for (var i = 0; i < lines.Length; i++)
        {
            text.Append(' ', i == 0 ? indent : indent + hanging).Append(lines[i]).Append('\n');
        }
    }

    /// <summary>A table.</summary>
    public void Table(
        ImmutableArray<TextColumn> columns, IEnumerable<ImmutableArray<string>> rows, int indent = 2)
    {
        foreach (var line in TextTable.Lines(columns, [.. rows], indent, Width))
        {
            text.Append(colour ? WithBlueBars(line) : line).Append('\n');
        }
    }

    /// <summary>Where the files are, what is to be said of them, and the sentence every summary ends
    /// with.</summary>
    public void End(ImmutableArray<string> files, string? remark = null)
    {
        if (!files.IsEmpty)
        {
            Heading("Files");
            foreach (var file in files)
            {
                Paragraph(file);
            }

            if (remark is not null)
            {
                Paragraph(remark, hanging: 2);
            }
        }

        Blank();
        Paragraph(TerminalSummary.Closing, indent: 0);
    }

    /// <inheritdoc/>
    public override string ToString() => text.ToString();

    private static string WithBlueBars(string line)
    {
        var first = line.AsSpan().IndexOfAny('█', '▌', '▐');
        var last = line.AsSpan().LastIndexOfAny('█', '▌', '▐');
        return first < 0 ? line : line[..first] + Blue + line[first..(last + 1)] + Plain + line[(last + 1)..];
    }
}
