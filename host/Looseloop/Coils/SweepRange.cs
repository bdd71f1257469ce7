using System.Globalization;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>A dimension and the values it runs over, written KEY=FROM..TO:STEP.</summary>
internal sealed record SweepRange(string Path, double From, double To, double Step)
{
    public static SweepRange Parse(string text)
    {
        string[] sides = text.Split('=', 2);
        string[] ends = sides.Length == 2 ? sides[1].Split("..", 2) : [];
        string[] rest = ends.Length == 2 ? ends[1].Split(':', 2) : [];
        if (rest.Length == 0 || !Read(ends[0], out double from) || !Read(rest[0], out double to))
        {
            throw Wrong(text);
        }

        double step = (to - from) / 10;
        if (rest.Length == 2 && !Read(rest[1], out step))
        {
            throw Wrong(text);
        }

        return to > from && step > 0 && (to - from) / step <= 999
            ? new SweepRange(sides[0].Trim(), from, to, step)
            : throw new UserError($"--sweep {text}: the end must lie above the beginning, and the step must be above zero and make at most 1000 rows.");
    }

    private static bool Read(string text, out double value) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);

    private static UserError Wrong(string text) =>
        new($"--sweep wants KEY=FROM..TO or KEY=FROM..TO:STEP, such as top_load.major_diameter_mm=150..400:10, not '{text}'.");
}
