using System.Buffers;
using System.Globalization;
using System.Text;
using System.Text.Json;
using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>The facts as JSON objects with units in their names; a figure that is not known is null.</summary>
internal static class FactJson
{
    public static string Of(DetectorLaw law) => Object(json => Write(json, law));

    public static void Write(Utf8JsonWriter json, DetectorLaw law)
    {
        json.WriteString("kind", law.Kind.ToString());
        ReadingJson.Number(json, "pedestal_counts", law.PedestalCounts);
        ReadingJson.Number(json, "u_pedestal_counts", law.PedestalUncertainty);
        ReadingJson.Number(json, "shape", law.Shape);
        ReadingJson.Number(json, "u_shape", law.ShapeUncertainty);
        ReadingJson.Number(json, "reference_counts", law.ReferenceCounts);
        ReadingJson.Number(json, "time_constant_s", law.TimeConstantS);
        ReadingJson.Number(json, "bow_bound", law.BowBound);
        ReadingJson.Number(json, "high_extra_s", law.HighExtraS);
        ReadingJson.Number(json, "u_high_extra_s", law.HighExtraUncertaintyS);
        On(json, law.ReadOn);
    }

    public static DetectorLaw ToLaw(string text) => Read(text, ToLaw);

    public static DetectorLaw ToLaw(JsonElement json) => new(
        Enum.Parse<DetectorKind>(json.GetProperty("kind").GetString()!), Figure(json, "pedestal_counts"), Figure(json, "u_pedestal_counts"),
        Figure(json, "shape"), Figure(json, "u_shape"), Figure(json, "reference_counts"), Figure(json, "time_constant_s"), On(json))
    {
        BowBound = Figure(json, "bow_bound"),
        HighExtraS = Figure(json, "high_extra_s"),
        HighExtraUncertaintyS = Figure(json, "u_high_extra_s"),
    };

    public static string Of(ClockTrim trim) => Object(json => Write(json, trim));

    public static void Write(Utf8JsonWriter json, ClockTrim trim)
    {
        ReadingJson.Number(json, "ppm", trim.Ppm);
        ReadingJson.Number(json, "u_ppm", trim.UncertaintyPpm);
        On(json, trim.On);
    }

    public static ClockTrim ToClock(string text) => Read(text, ToClock);

    public static ClockTrim ToClock(JsonElement json) => new(Figure(json, "ppm"), Figure(json, "u_ppm"), On(json)!.Value);

    public static string Of(CommissioningRecord commissioning) => Object(json =>
    {
        On(json, commissioning.Utc);
        json.WriteString("board", commissioning.Board);
        json.WriteString("firmware", commissioning.FirmwareVersion);
        json.WriteBoolean("interrupted", commissioning.Interrupted);
        json.WriteStartArray("steps");
        foreach (StepFinding finding in commissioning.Steps)
        {
            json.WriteStartObject();
            json.WriteString("step", finding.Step.ToString());
            json.WriteString("result", finding.Result.ToString());
            json.WriteString("detail", finding.Detail);
            json.WriteStartObject("figures");
            foreach ((string name, double value) in finding.Figures)
            {
                ReadingJson.Number(json, name, value);
            }

            json.WriteEndObject();
            json.WriteEndObject();
        }

        json.WriteEndArray();
    });

    public static CommissioningRecord ToCommissioning(string text) => Read(text, json => new CommissioningRecord(
        On(json)!.Value, json.GetProperty("board").GetString()!, json.GetProperty("firmware").GetString()!,
        [.. json.GetProperty("steps").EnumerateArray().Select(ToFinding)], json.GetProperty("interrupted").GetBoolean()));

    public static string Of(Pull pull, IReadOnlyDictionary<string, string> setUp) => Object(json =>
    {
        json.WriteString("set_up", TextMap.ToJson(setUp));
        Write(json, pull);
    });

    public static void Write(Utf8JsonWriter json, Pull pull)
    {
        ReadingJson.Number(json, "f0_relative", pull.F0Relative);
        ReadingJson.Number(json, "u_f0_relative", pull.F0Uncertainty);
        ReadingJson.Number(json, "loss_added", pull.LossAdded);
        ReadingJson.Number(json, "u_loss_added", pull.LossUncertainty);
        On(json, pull.On);
    }

    public static Pull ToPull(string text) => Read(text, ToPull);

    public static Pull ToPull(JsonElement json) => new(
        Figure(json, "f0_relative"), Figure(json, "u_f0_relative"), Figure(json, "loss_added"), Figure(json, "u_loss_added"), On(json)!.Value);

    /// <summary>The set-up that a pull belongs to, as its JSON text.</summary>
    public static string SetUpOf(string pull) => Read(pull, json => json.GetProperty("set_up").GetString()!);

    private static StepFinding ToFinding(JsonElement json) => new(
        Enum.Parse<CommissioningStep>(json.GetProperty("step").GetString()!), Enum.Parse<StepResult>(json.GetProperty("result").GetString()!),
        json.GetProperty("detail").GetString()!,
        json.GetProperty("figures").EnumerateObject().ToDictionary(
            figure => figure.Name, figure => figure.Value.ValueKind == JsonValueKind.Number ? figure.Value.GetDouble() : double.NaN));

    public static double Figure(JsonElement json, string name) =>
        json.TryGetProperty(name, out JsonElement value) && value.ValueKind == JsonValueKind.Number ? value.GetDouble() : double.NaN;

    private static void On(Utf8JsonWriter json, DateTimeOffset? time) =>
        json.WriteString("on", time?.ToString("O", CultureInfo.InvariantCulture));

    private static DateTimeOffset? On(JsonElement json) =>
        json.GetProperty("on").GetString() is { } text ? DateTimeOffset.Parse(text, CultureInfo.InvariantCulture) : null;

    public static string Object(Action<Utf8JsonWriter> body)
    {
        ArrayBufferWriter<byte> buffer = new();
        using (Utf8JsonWriter json = new(buffer))
        {
            json.WriteStartObject();
            body(json);
            json.WriteEndObject();
        }

        return Encoding.UTF8.GetString(buffer.WrittenSpan);
    }

    public static T Read<T>(string text, Func<JsonElement, T> map)
    {
        using JsonDocument document = JsonDocument.Parse(text);
        return map(document.RootElement);
    }
}
