using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>What a fit was made with as JSON, its points left out: they stand in a table of their own.</summary>
internal static class BasisJson
{
    public static string Of(FitBasis basis) => FactJson.Object(json => Write(json, basis));

    public static void Write(Utf8JsonWriter json, FitBasis basis)
    {
        json.WriteStartObject("law");
        FactJson.Write(json, basis.Law);
        json.WriteEndObject();
        ReadingJson.Number(json, "prefactor_exponent", basis.PrefactorExponent);
        if (basis.Clock is { } clock)
        {
            json.WriteStartObject("clock");
            FactJson.Write(json, clock);
            json.WriteEndObject();
        }

        if (basis.Pull is { } pull)
        {
            json.WriteStartObject("pull");
            FactJson.Write(json, pull);
            json.WriteEndObject();
        }

        json.WriteBoolean("commissioned", basis.Commissioned);
        ReadingJson.Number(json, "planned_f0_hz", basis.PlannedF0Hz);
        ReadingJson.Number(json, "planned_q", basis.PlannedQ);
        ReadingJson.Number(json, "planned_duty", basis.PlannedDuty);
        json.WriteNumber("dwell_us", basis.DwellUs);
        json.WriteNumber("samples", basis.Samples);
        json.WriteNumber("spacing_us", basis.SpacingUs);
        ReadingJson.Number(json, "other_duty", basis.OtherDuty);
        json.WriteNumber("missing_in_sweep", basis.MissingInSweep);
        json.WriteNumber("missing_in_checks", basis.MissingInChecks);
        json.WriteBoolean("saturated", basis.Saturated);
        json.WriteStartArray("harmonics");
        foreach (int harmonic in basis.Harmonics)
        {
            json.WriteNumberValue(harmonic);
        }

        json.WriteEndArray();
        if (basis.Survey is { } survey)
        {
            Write(json, survey);
        }
    }

    /// <summary>The basis of a text, without points.</summary>
    public static FitBasis From(string text) => FactJson.Read(text, json => new FitBasis
    {
        Law = FactJson.ToLaw(json.GetProperty("law")),
        PrefactorExponent = FactJson.Figure(json, "prefactor_exponent"),
        Clock = json.TryGetProperty("clock", out JsonElement clock) ? FactJson.ToClock(clock) : null,
        Pull = json.TryGetProperty("pull", out JsonElement pull) ? FactJson.ToPull(pull) : null,
        Commissioned = json.GetProperty("commissioned").GetBoolean(),
        PlannedF0Hz = FactJson.Figure(json, "planned_f0_hz"),
        PlannedQ = FactJson.Figure(json, "planned_q"),
        PlannedDuty = FactJson.Figure(json, "planned_duty"),
        DwellUs = json.GetProperty("dwell_us").GetInt32(),
        Samples = json.GetProperty("samples").GetInt32(),
        SpacingUs = json.GetProperty("spacing_us").GetInt32(),
        OtherDuty = FactJson.Figure(json, "other_duty"),
        MissingInSweep = json.GetProperty("missing_in_sweep").GetInt32(),
        MissingInChecks = json.GetProperty("missing_in_checks").GetInt32(),
        Saturated = json.GetProperty("saturated").GetBoolean(),
        Harmonics = [.. json.GetProperty("harmonics").EnumerateArray().Select(value => value.GetInt32())],
        Survey = json.TryGetProperty("survey", out JsonElement survey) ? ToSurvey(survey) : null,
        AtOtherDuty = [],
        AfterLongerDwell = [],
    });

    private static void Write(Utf8JsonWriter json, SurveySeen survey)
    {
        json.WriteStartObject("survey");
        ReadingJson.Number(json, "low_hz", survey.LowHz);
        json.WriteStartArray("responses");
        foreach (SeenResponse response in survey.Responses)
        {
            json.WriteStartObject();
            json.WriteString("kind", response.Kind);
            ReadingJson.Number(json, "frequency_hz", response.FrequencyHz);
            ReadingJson.Number(json, "amplitude_counts", response.Amplitude);
            json.WriteNumber("harmonic", response.Harmonic);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        json.WriteEndObject();
    }

    private static SurveySeen ToSurvey(JsonElement json) => new(
        FactJson.Figure(json, "low_hz"),
        [
            .. json.GetProperty("responses").EnumerateArray().Select(response => new SeenResponse(
                response.GetProperty("kind").GetString()!, FactJson.Figure(response, "frequency_hz"),
                FactJson.Figure(response, "amplitude_counts"), response.GetProperty("harmonic").GetInt32())),
        ]);
}
