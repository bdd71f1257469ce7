using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>A commissioning as JSON.</summary>
internal static class CommissioningJson
{
    public static void Write(Utf8JsonWriter json, BoxIdentity box, CommissioningRecord record, CommissioningStanding standing, bool kept)
    {
        json.WriteString("utc", record.Utc);
        json.WriteString("port", box.Port);
        json.WriteString("board", record.Board);
        json.WriteString("firmware", record.FirmwareVersion);
        json.WriteBoolean("interrupted", record.Interrupted);
        json.WriteBoolean("kept", kept);
        json.WriteBoolean("commissioned", standing.IsComplete);
        json.Texts("missing", standing.Missing.Select(CommissioningText.Name));
        json.Objects("steps", record.Steps, finding =>
        {
            json.WriteString("step", CommissioningText.Name(finding.Step));
            json.WriteString("result", CommissioningText.Result(finding.Result));
            json.WriteString("detail", finding.Detail);
            json.WriteStartObject("figures");
            foreach ((string name, double value) in finding.Figures)
            {
                json.Figure(name, value);
            }

            json.WriteEndObject();
        });
        json.Texts("cautions", BoxCautions.All);
    }
}
