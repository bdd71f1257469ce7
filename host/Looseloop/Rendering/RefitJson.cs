using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Records;

namespace Looseloop.Rendering;

/// <summary>What a refit changed, as JSON.</summary>
internal static class RefitJson
{
    public static void Write(Utf8JsonWriter json, RefitDone done)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteNumber("reading", done.Number);
        json.WriteNumber("refit", done.NewNumber);
        json.WriteBoolean("same", done.Changes.Same);
        json.Figure("f0_change_hz", done.Changes.F0Hz);
        json.Figure("q_change_relative", done.Changes.QRelative);
        Side(json, "kept", done.Kept);
        Side(json, "now", done.Now);
        json.Texts("basis_changes", RefitWords.Differences(done.Before, done.After));
        json.Texts("new_reasons", done.Changes.NewReasons.Select(reason => reason.Name));
        json.Texts("gone_reasons", done.Changes.GoneReasons.Select(reason => reason.Name));
    }

    private static void Side(Utf8JsonWriter json, string name, Reading reading)
    {
        json.WriteStartObject(name);
        json.WriteString("id", reading.Id);
        json.WriteString("host_version", reading.HostVersion);
        json.WriteString("verdict", reading.Verdict.ToString().ToLowerInvariant());
        json.Figure("f0_hz", reading.F0Hz);
        json.Figure("u_f0_repeatability_hz", reading.Budget.F0Hz(absolute: false));
        json.Figure("u_f0_absolute_hz", reading.Budget.F0Hz(absolute: true));
        json.Figure("q", reading.Q);
        json.Figure("u_q_repeatability_relative", reading.Budget.QRelative(absolute: false));
        json.Figure("u_q_absolute_relative", reading.Budget.QRelative(absolute: true));
        json.WriteEndObject();
    }
}
