using System.Text.Json;
using Looseloop.Drift;

namespace Looseloop.Rendering;

/// <summary>A drift analysis as JSON. The value is f0 in hertz, or Q.</summary>
internal static class DriftJson
{
    public static void Write(Utf8JsonWriter json, long run, bool q, long left, DriftAnalysis analysis)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteNumber("run", run);
        json.WriteString("value", q ? "q" : "f0_hz");
        json.WriteNumber("readings", analysis.Count);
        json.WriteNumber("readings_left_out", left);
        json.Figure("duration_s", analysis.DurationS);
        json.Figure("first", analysis.First);
        json.Figure("last", analysis.Last);
        if (analysis.Model is { } model)
        {
            json.WriteStartObject("warm_up");
            json.Figure("end", model.End);
            json.Figure("u_end", model.EndStandard);
            json.WriteBoolean("at_bound", model.AtBound);
            json.Objects("terms", Enumerable.Range(0, model.Terms.Count), i =>
            {
                json.Figure("amplitude", model.Terms[i].Amplitude);
                json.Figure("u_amplitude", model.AmplitudeStandard(i));
                json.Figure("tau_s", model.Terms[i].TauS);
                json.Figure("u_tau_s", model.TauStandardS(i));
            });
            json.WriteEndObject();
        }

        Settling settling = analysis.Settling;
        json.WriteString("settled", JsonNamingPolicy.SnakeCaseLower.ConvertName(settling.State.ToString()));
        json.WriteString("settled_because", settling.Because);
        json.Figure("remaining", settling.Remaining);
        json.Figure("u_remaining", settling.RemainingStandard);
        json.Figure("slope_per_s", settling.SlopePerS);
        json.Figure("u_slope_per_s", settling.SlopeStandardPerS);
        if (analysis.Temperature is { } temperature)
        {
            json.Figure("temperature_ppm_per_k", temperature.PpmPerK);
            json.Figure("u_temperature_ppm_per_k", temperature.StandardPpmPerK);
        }

        if (analysis.Window is { } window)
        {
            json.WriteStartObject("window");
            json.WriteString("kind", JsonNamingPolicy.SnakeCaseLower.ConvertName(window.Kind.ToString()));
            json.Figure("leaves_s", window.TimeS);
            json.Figure("u_leaves_s", window.StandardS);
            json.Figure("earliest_s", window.EarliestS);
            json.Figure("latest_s", window.LatestS);
            json.WriteEndObject();
        }

        json.WriteBoolean("stability_after_warm_up_removed", analysis.Stability.DriftRemoved);
        json.Objects("stability", analysis.Stability.Points, point =>
        {
            json.Figure("averaging_s", point.AveragingS);
            json.Figure("overlapping_allan", point.Overlapping);
            json.Figure("modified_allan", point.Modified);
            json.Figure("total", point.Total);
            json.Figure("u_relative", point.RelativeStandard);
        });
    }
}
