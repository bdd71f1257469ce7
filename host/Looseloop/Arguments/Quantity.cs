using System.CommandLine;
using System.Globalization;

namespace Looseloop.Arguments;

/// <summary>Quantities as people write them on a command line: 152k, 152.3kHz, 5s, 250ms, 8h.</summary>
internal static class Quantity
{
    private static readonly Dictionary<string, double> _hertz = new(StringComparer.OrdinalIgnoreCase)
    {
        [""] = 1,
        ["hz"] = 1,
        ["k"] = 1e3,
        ["khz"] = 1e3,
        ["m"] = 1e6,
        ["mhz"] = 1e6,
    };

    private static readonly Dictionary<string, double> _seconds = new(StringComparer.OrdinalIgnoreCase)
    {
        [""] = 1,
        ["s"] = 1,
        ["ms"] = 1e-3,
        ["min"] = 60,
        ["m"] = 60,
        ["h"] = 3600,
    };

    /// <summary>An option in hertz, with k, kHz, M or MHz behind the number.</summary>
    public static Option<double?> HertzOption(string name, string description) =>
        Option(name, description, _hertz, "a frequency such as 152k, 152.3kHz or 152300");

    /// <summary>An option in seconds, with ms, s, min or h behind the number.</summary>
    public static Option<double?> SecondsOption(string name, string description) =>
        Option(name, description, _seconds, "a time such as 5s, 250ms, 20min or 8h");

    /// <summary>Reads hertz.</summary>
    public static bool TryHertz(string text, out double hertz) => TryRead(text, _hertz, out hertz);

    private static Option<double?> Option(string name, string description, Dictionary<string, double> units, string wanted) => new(name)
    {
        Description = description,
        CustomParser = result =>
        {
            string text = result.Tokens.Count > 0 ? result.Tokens[0].Value : "";
            if (TryRead(text, units, out double value) && value >= 0)
            {
                return value;
            }

            result.AddError($"{name} wants {wanted}, not '{text}'.");
            return null;
        },
    };

    private static bool TryRead(string text, Dictionary<string, double> units, out double value)
    {
        string trimmed = text.Trim();
        int end = trimmed.Length;
        while (end > 0 && char.IsAsciiLetter(trimmed[end - 1]))
        {
            end--;
        }

        value = 0;
        return units.TryGetValue(trimmed[end..], out double unit)
            && double.TryParse(trimmed[..end].TrimEnd(), NumberStyles.Float, CultureInfo.InvariantCulture, out value)
            && double.IsFinite(value *= unit);
    }
}
