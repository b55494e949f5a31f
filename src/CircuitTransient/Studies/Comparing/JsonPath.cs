using System.Text.Json;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Where a reader of JSON stands: <c>observations[3].max.value</c>; the whole is empty.</summary>
internal sealed class JsonPath
{
    private readonly Stack<(string Path, int Index)> open = new(); // index -1: an object
    private string name = "";

    /// <summary>Takes the next token in.</summary>
    /// <returns>The path, where a value begins; else null.</returns>
    public string? Enter(ref Utf8JsonReader reader)
    {
        switch (reader.TokenType)
        {
            case JsonTokenType.PropertyName:
                name = reader.GetString()!;
                return null;
            case JsonTokenType.EndObject or JsonTokenType.EndArray:
                open.Pop();
                return null;
            case JsonTokenType.StartObject:
                return Open(-1);
            case JsonTokenType.StartArray:
                return Open(0);
            default:
                return Next();
        }
    }

    /// <summary>The path of a member of an object.</summary>
    public static string Member(string path, string name) => path.Length == 0 ? name : $"{path}.{name}";

    /// <summary>The path of an item of an array.</summary>
    public static string Item(string path, int index) => $"{path}[{index}]";

    private string Open(int index)
    {
        var path = Next();
        open.Push((path, index));
        return path;
    }

    private string Next()
    {
        if (open.Count == 0)
        {
            return "";
        }

        var (path, index) = open.Pop();
        open.Push((path, index < 0 ? index : index + 1));
        return index < 0 ? Member(path, name) : Item(path, index);
    }
}
