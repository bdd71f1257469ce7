using System.Buffers;
using System.Text;
using System.Text.Json;

namespace Looseloop.Record;

/// <summary>Key and value texts as a JSON object, keys in ordinal order, so that equal maps give equal texts.</summary>
internal static class TextMap
{
    public static string ToJson(IReadOnlyDictionary<string, string> map)
    {
        if (map.Count == 0)
        {
            return "{}";
        }

        ArrayBufferWriter<byte> buffer = new();
        using (Utf8JsonWriter writer = new(buffer))
        {
            writer.WriteStartObject();
            foreach ((string key, string value) in map.OrderBy(pair => pair.Key, StringComparer.Ordinal))
            {
                writer.WriteString(key, value);
            }

            writer.WriteEndObject();
        }

        return Encoding.UTF8.GetString(buffer.WrittenSpan);
    }

    public static IReadOnlyDictionary<string, string> FromJson(string json)
    {
        Dictionary<string, string> map = new(StringComparer.Ordinal);
        using JsonDocument document = JsonDocument.Parse(json);
        foreach (JsonProperty property in document.RootElement.EnumerateObject())
        {
            map[property.Name] = property.Value.GetString() ?? "";
        }

        return map;
    }
}
