using System.Text.Json;

namespace CircuitTransient.Studies.Comparing;

/// <summary>A value in a JSON document that may turn out to be of another kind than it should: what is wrong
/// is noted with its path, and reading goes on.</summary>
internal sealed class JsonField
{
    private readonly JsonElement element;
    private readonly string path;
    private readonly List<(string Path, string Message)> faults;

    /// <summary>The whole document.</summary>
    public JsonField(JsonElement root, List<(string Path, string Message)> faults)
        : this(root, "", faults)
    {
    }

    private JsonField(JsonElement element, string path, List<(string Path, string Message)> faults)
    {
        this.element = element;
        this.path = path;
        this.faults = faults;
    }

    /// <summary>Whether it is an array.</summary>
    public bool IsArray => element.ValueKind == JsonValueKind.Array;

    /// <summary>Whether there is nothing: null, or not there at all.</summary>
    public bool IsNothing => element.ValueKind is JsonValueKind.Null or JsonValueKind.Undefined;

    /// <summary>A member that must be there.</summary>
    public JsonField this[string name]
    {
        get
        {
            if (Member(name) is { } member)
            {
                return member;
            }

            if (element.ValueKind == JsonValueKind.Object)
            {
                Fault($"`{name}` is missing here");
            }
            else
            {
                Expect("an object");
            }

            return Nothing;
        }
    }

    /// <summary>A member that may be missing.</summary>
    public JsonField? Member(string name) =>
        element.ValueKind == JsonValueKind.Object && element.TryGetProperty(name, out var member)
            ? new JsonField(member, JsonPath.Member(path, name), faults)
            : null;

    /// <summary>The items of an array.</summary>
    public IEnumerable<JsonField> Items()
    {
        if (!IsArray)
        {
            Expect("an array");
            return [];
        }

        return element.EnumerateArray().Select((item, i) =>
            new JsonField(item, JsonPath.Item(path, i), faults));
    }

    /// <summary>A text.</summary>
    public string Text()
    {
        if (element.ValueKind == JsonValueKind.String)
        {
            return element.GetString()!;
        }

        Expect("a text");
        return "";
    }

    /// <summary>A text or null.</summary>
    public string? TextOrNull() => IsNothing ? null : Text();

    /// <summary>A number.</summary>
    public double Number()
    {
        if (element.ValueKind == JsonValueKind.Number)
        {
            return element.GetDouble();
        }

        Expect("a number");
        return 0;
    }

    /// <summary>A number or null.</summary>
    public double? NumberOrNull() => IsNothing ? null : Number();

    /// <summary>A whole number from zero up.</summary>
    public int Count()
    {
        if (element.ValueKind == JsonValueKind.Number && element.TryGetInt32(out var count) && count >= 0)
        {
            return count;
        }

        Expect("a whole number from zero up");
        return 0;
    }

    /// <summary>True or false.</summary>
    public bool Truth()
    {
        if (element.ValueKind is JsonValueKind.True or JsonValueKind.False)
        {
            return element.GetBoolean();
        }

        Expect("true or false");
        return false;
    }

    /// <summary>Notes that this value is wrong.</summary>
    public void Fault(string message) => faults.Add((path, message));

    private JsonField Nothing => new(default, path, faults);

    private void Expect(string kind)
    {
        // What is missing has been said once already.
        if (element.ValueKind != JsonValueKind.Undefined)
        {
            Fault($"{(path.Length == 0 ? "the document" : $"`{path}`")} should be {kind}");
        }
    }
}
