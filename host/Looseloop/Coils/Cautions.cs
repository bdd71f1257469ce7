using System.Text.Json;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>What must stand beside a figure that could lead someone to energise something.</summary>
internal static class Cautions
{
    public const string Energise =
        "Before anything is energised: local rules, the venue's licence and a competent person come first. A resonant coil can kill, burn, and upset pacemakers and electronics.";

    public const string Hands =
        "Before the tap is touched: driver off and locked out, tank capacitors discharged and shorted, earth on.";

    public static void Say(Shell shell, params string[] cautions)
    {
        foreach (string caution in cautions)
        {
            shell.Say(caution);
        }
    }

    public static void Write(Utf8JsonWriter json, params string[] cautions)
    {
        json.WriteStartArray("cautions");
        foreach (string caution in cautions)
        {
            json.WriteStringValue(caution);
        }

        json.WriteEndArray();
    }
}
