using System.Text;
using System.Text.Json;

namespace Looseloop.Rendering;

/// <summary>JSON output: snake_case names with units, NaN as null.</summary>
internal static class JsonText
{
    private static readonly JsonWriterOptions _indented = new() { Indented = true };
    private static readonly JsonWriterOptions _line = new() { Indented = false };

    /// <summary>One object.</summary>
    /// <param name="write">Writes its members.</param>
    /// <param name="oneLine">True for JSON lines.</param>
    public static string Object(Action<Utf8JsonWriter> write, bool oneLine = false)
    {
        using var stream = new MemoryStream();
        using (var writer = new Utf8JsonWriter(stream, oneLine ? _line : _indented))
        {
            writer.WriteStartObject();
            write(writer);
            writer.WriteEndObject();
        }

        return Encoding.UTF8.GetString(stream.ToArray());
    }

    /// <summary>A number, or null where it is not one.</summary>
    public static void Figure(this Utf8JsonWriter writer, string name, double value)
    {
        if (double.IsFinite(value))
        {
            writer.WriteNumber(name, value);
        }
        else
        {
            writer.WriteNull(name);
        }
    }

    /// <summary>An array of sentences.</summary>
    public static void Texts(this Utf8JsonWriter writer, string name, IEnumerable<string> texts)
    {
        writer.WriteStartArray(name);
        foreach (string text in texts)
        {
            writer.WriteStringValue(text);
        }

        writer.WriteEndArray();
    }

    /// <summary>An array of objects.</summary>
    public static void Objects<T>(this Utf8JsonWriter writer, string name, IEnumerable<T> items, Action<T> write)
    {
        writer.WriteStartArray(name);
        foreach (T item in items)
        {
            writer.WriteStartObject();
            write(item);
            writer.WriteEndObject();
        }

        writer.WriteEndArray();
    }
}
