using System.Text.Json;
using Looseloop.Drift.Comparison;

namespace Looseloop.Rendering;

/// <summary>A comparison as JSON.</summary>
internal static class ComparisonJson
{
    public static void Write(Utf8JsonWriter json, long first, long second, ReadingComparison compared)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteNumber("first", first);
        json.WriteNumber("second", second);
        Change(json, "f0_hz", compared.F0);
        Change(json, "q_relative", compared.Q);
        json.Figure("f0_change_bandwidths", compared.Bandwidths);
        json.Figure("capacitance_change_relative", compared.CapacitanceRelative);
        json.Figure("capacitance_change_95_relative", 2 * compared.CapacitanceStandard);
        json.WriteString("winding", JsonNamingPolicy.SnakeCaseLower.ConvertName(compared.Winding.ToString()));
        json.WriteBoolean("same_box", compared.SameBox);
        Strings(json, "set_up_differences", compared.SetUpDifferences);
        Strings(json, "cautions", compared.Cautions);
    }

    private static void Change(Utf8JsonWriter json, string name, Change change)
    {
        json.WriteStartObject(name);
        json.WriteString("verdict", JsonNamingPolicy.SnakeCaseLower.ConvertName(change.Verdict.ToString()));
        json.Figure("difference", change.Difference);
        json.Figure("difference_95", change.Expanded);
        json.Figure("degrees_of_freedom", change.DegreesOfFreedom);
        json.Figure("detectable", change.Detectable);
        json.Figure("margin", change.Margin);
        json.WriteEndObject();
    }

    private static void Strings(Utf8JsonWriter json, string name, IReadOnlyList<string> texts)
    {
        json.WriteStartArray(name);
        foreach (string text in texts)
        {
            json.WriteStringValue(text);
        }

        json.WriteEndArray();
    }
}
