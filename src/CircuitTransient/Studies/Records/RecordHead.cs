using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>A line of a record that is not blank: its number counted from 1, and where it begins.</summary>
internal readonly record struct RecordLine(int Number, int Start);

/// <summary>The first lines of a record, by which its form is known.</summary>
internal sealed class RecordHead
{
    private const int MostLines = 2000;

    private readonly RecordBytes bytes;

    public RecordHead(RecordBytes bytes)
    {
        this.bytes = bytes;
        var lines = new List<RecordLine>();
        var (start, number) = (0, 1);
        while (start < bytes.Span.Length && lines.Count < MostLines)
        {
            if (!bytes.LineAt(start, out var next).Trim(" \t"u8).IsEmpty)
            {
                lines.Add(new RecordLine(number, start));
            }

            (start, number) = (next, number + 1);
        }

        Lines = lines;
    }

    public IReadOnlyList<RecordLine> Lines { get; }

    /// <summary>The bytes of a line.</summary>
    public ReadOnlySpan<byte> Content(int index) => bytes.LineAt(Lines[index].Start, out _);

    /// <summary>The text of a line.</summary>
    public string Text(int index) => bytes.Text(Content(index));

    /// <summary>An error at a line, or at the file's beginning where it has none.</summary>
    public Diagnostic Fault(int index, string message, string? advice, string? cell = null) =>
        index < Lines.Count
            ? bytes.Fault(Lines[index].Number, Content(index), message, advice, cell)
            : bytes.Fault(1, [], message, advice);
}
