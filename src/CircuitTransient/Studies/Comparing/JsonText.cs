using System.Collections.Immutable;
using System.Text;
using System.Text.Json;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Comparing;

/// <summary>A text that is JSON without doubt: no name twice in one object, no number past a double, no half
/// characters, no deep nesting.</summary>
internal sealed class JsonText : IDisposable
{
    private const int MostFaults = 20;
    private const int Deepest = 64; // a results document is seven deep

    private readonly SourceText source;
    private readonly byte[] content;

    private JsonText(SourceText source, byte[] content, JsonDocument document)
    {
        this.source = source;
        this.content = content;
        Document = document;
    }

    /// <summary>The tree.</summary>
    public JsonDocument Document { get; }

    /// <summary>Reads a text.</summary>
    public static Outcome<JsonText> Read(SourceText source)
    {
        var bytes = Encoding.UTF8.GetBytes(source.Content);
        var faults = new List<(long Start, long Length, string Message)>();
        Walk(bytes, faults);
        return faults.Count > 0
            ? new(null, [.. faults.Select(f => Error(source, bytes, f.Start, f.Length, f.Message))])
            : new(new(source, bytes, JsonDocument.Parse(bytes, new() { MaxDepth = Deepest })), []);
    }

    /// <summary>Errors at the values with those paths.</summary>
    public ImmutableArray<Diagnostic> Errors(IReadOnlyList<(string Path, string Message)> faults)
    {
        var places = new Dictionary<string, (long Start, long Length)>(StringComparer.Ordinal);
        var wanted = faults.Select(f => f.Path).ToHashSet(StringComparer.Ordinal);
        var path = new JsonPath();
        var reader = new Utf8JsonReader(content, new() { MaxDepth = Deepest });
        while (reader.Read())
        {
            if (path.Enter(ref reader) is { } at && wanted.Contains(at))
            {
                places[at] = (reader.TokenStartIndex, reader.BytesConsumed - reader.TokenStartIndex);
            }
        }

        return
        [
            .. faults.Take(MostFaults).Select(fault =>
            {
                var (start, length) = places[fault.Path];
                return Error(source, content, start, length, fault.Message);
            }),
        ];
    }

    /// <inheritdoc/>
    public void Dispose() => Document.Dispose();

    private static void Walk(byte[] bytes, List<(long Start, long Length, string Message)> faults)
    {
        var reader = new Utf8JsonReader(bytes, new() { MaxDepth = Deepest });
        var names = new Stack<HashSet<string>>();
        try
        {
            while (faults.Count < MostFaults && reader.Read())
            {
                if (FaultOf(ref reader, names) is { } message)
                {
                    var start = reader.TokenStartIndex;
                    faults.Add((start, reader.BytesConsumed - start, message));
                }
            }
        }
        catch (JsonException)
        {
            var isDeep = reader.CurrentDepth >= Deepest - 1; // the deepest that opened counts from zero
            faults.Add((Math.Min(reader.BytesConsumed, bytes.Length), 1, isDeep
                ? $"the values are nested deeper than {Deepest}"
                : "this is not JSON from here on"));
        }
    }

    private static string? FaultOf(ref Utf8JsonReader reader, Stack<HashSet<string>> names)
    {
        switch (reader.TokenType)
        {
            case JsonTokenType.StartObject:
                names.Push(new(StringComparer.Ordinal));
                return null;
            case JsonTokenType.EndObject:
                names.Pop();
                return null;
            case JsonTokenType.PropertyName:
                return TextOf(ref reader) is not { } name ? HalfCharacter
                    : names.Peek().Add(name) ? null
                    : $"`{name}` stands twice in one object";
            case JsonTokenType.String:
                return TextOf(ref reader) is null ? HalfCharacter : null;
            case JsonTokenType.Number:
                return reader.TryGetDouble(out var number) && double.IsFinite(number)
                    ? null
                    : "this number is past what a double holds";
            default:
                return null;
        }
    }

    private const string HalfCharacter = "this text holds half a character";

    private static string? TextOf(ref Utf8JsonReader reader)
    {
        try
        {
            return reader.GetString();
        }
        catch (InvalidOperationException)
        {
            return null; // an escape that is one half of a surrogate pair
        }
    }

    private static Diagnostic Error(SourceText source, byte[] bytes, long start, long length, string message)
    {
        var from = Encoding.UTF8.GetCharCount(bytes, 0, (int)start);
        var most = Math.Min(length, bytes.Length - start);
        return Diagnostic.Error(
            source, new TextSpan(from, Encoding.UTF8.GetCharCount(bytes, (int)start, (int)most)), message);
    }
}
