using System.Buffers;
using System.Collections.Immutable;
using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Unicode;
using CircuitTransient.Circuits;

namespace CircuitTransient.Reports;

/// <summary>JSON as every document writes it: doubles that read back to the same bits, null for what is
/// infinite or left open.</summary>
internal static class JsonWriting
{
    // Letters of every script stay readable; < > & ' are escaped, so that it may stand inside a page.
    private static readonly JsonWriterOptions Options = new()
    {
        Indented = true,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.Create(UnicodeRanges.All),
    };

    /// <summary>A whole document, with a final line break.</summary>
    public static string Document(Action<Utf8JsonWriter> write)
    {
        var buffer = new ArrayBufferWriter<byte>();
        using (var json = new Utf8JsonWriter(buffer, Options))
        {
            write(json);
        }

        return Encoding.UTF8.GetString(buffer.WrittenSpan) + "\n";
    }

    /// <summary>A whole document that is one object.</summary>
    public static string Document<T>(T item, Action<Utf8JsonWriter, T> write) =>
        Document(json => json.Object(item, write));

    /// <summary>A whole document that is an array of objects.</summary>
    public static string Documents<T>(ImmutableArray<T> items, Action<Utf8JsonWriter, T> write) =>
        Document(json =>
        {
            json.WriteStartArray();
            foreach (var item in items)
            {
                json.Object(item, write);
            }

            json.WriteEndArray();
        });

    /// <summary>The schema that is embedded under a name.</summary>
    public static string Schema(string name) => EmbeddedText.Of(name);

    /// <summary>The member <c>circuit</c>: which circuit the document speaks of.</summary>
    public static void Circuit(this Utf8JsonWriter json, Circuit circuit)
    {
        json.WriteStartObject("circuit");
        json.WriteString("title", circuit.Title);
        json.WriteString("file", circuit.Source.Name);
        json.WriteString("sha256", circuit.Source.Sha256);
        json.WriteNumber("parts", circuit.Parts.Length);
        json.WriteNumber("nodes", circuit.Nodes.Length);
        json.WriteNumber("storedQuantities", circuit.Parts.Count(part => part is Capacitor or Inductor));
        json.WriteEndObject();
    }

    /// <summary>A member that is an object.</summary>
    public static void Object(this Utf8JsonWriter json, string name, Action write)
    {
        json.WriteStartObject(name);
        write();
        json.WriteEndObject();
    }

    /// <summary>A member that is an object, or null.</summary>
    public static void Object<T>(
        this Utf8JsonWriter json, string name, T? item, Action<Utf8JsonWriter, T> write)
        where T : class
    {
        json.WritePropertyName(name);
        if (item is null)
        {
            json.WriteNullValue();
        }
        else
        {
            json.Object(item, write);
        }
    }

    /// <summary>A member that is an array.</summary>
    public static void Array<T>(
        this Utf8JsonWriter json, string name, IEnumerable<T> items, Action<T> write)
    {
        json.WriteStartArray(name);
        foreach (var item in items)
        {
            write(item);
        }

        json.WriteEndArray();
    }

    /// <summary>A member that is an array of objects.</summary>
    public static void Objects<T>(
        this Utf8JsonWriter json, string name, IEnumerable<T> items, Action<T> write) =>
        json.Objects(name, items, (_, item) => write(item));

    /// <summary>A member that is an array of objects.</summary>
    public static void Objects<T>(
        this Utf8JsonWriter json, string name, IEnumerable<T> items, Action<Utf8JsonWriter, T> write) =>
        json.Array(name, items, item => json.Object(item, write));

    /// <summary>A member that is an array of texts.</summary>
    public static void Texts(this Utf8JsonWriter json, string name, ImmutableArray<string> texts) =>
        json.Array(name, texts, json.WriteStringValue);

    /// <summary>A member that is a text; left out where there is none.</summary>
    public static void Text(this Utf8JsonWriter json, string name, string? text)
    {
        if (text is not null)
        {
            json.WriteString(name, text);
        }
    }

    /// <summary>A member that is a number, or null.</summary>
    public static void Number(this Utf8JsonWriter json, string name, double? value)
    {
        json.WritePropertyName(name);
        json.NumberValue(value);
    }

    /// <summary>A number, or null.</summary>
    public static void NumberValue(this Utf8JsonWriter json, double? value)
    {
        if (value is { } number && double.IsFinite(number))
        {
            json.WriteNumberValue(number + 0.0); // turns the negative zero into the plain one
        }
        else
        {
            json.WriteNullValue();
        }
    }

    private static void Object<T>(this Utf8JsonWriter json, T item, Action<Utf8JsonWriter, T> write)
    {
        json.WriteStartObject();
        write(json, item);
        json.WriteEndObject();
    }
}
