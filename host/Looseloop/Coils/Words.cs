using System.Globalization;

namespace Looseloop.Coils;

/// <summary>Figures of coils as text, in the units of the trade and with the digits that mean something.</summary>
internal static class Words
{
    public static string Kilohertz(double hertz, int decimals = 2) => Number(hertz / 1e3, decimals) + " kHz";

    public static string Picofarad(double farad) => Digits(farad * 1e12, 4) + " pF";

    public static string Nanofarad(double farad) => Digits(farad * 1e9, 4) + " nF";

    public static string Henry(double henry) => henry >= 1e-3 ? Digits(henry * 1e3, 4) + " mH" : Digits(henry * 1e6, 4) + " µH";

    public static string Percent(double relative, int decimals = 1) => Number(100 * relative, decimals) + " %";

    /// <summary>With a fixed number of decimals; a dash where there is no number.</summary>
    public static string Number(double value, int decimals) =>
        double.IsFinite(value) ? value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture) : "-";

    /// <summary>As a person would have typed it: six digits at most, no needless zeros.</summary>
    public static string Plain(double value) => double.IsFinite(value) ? value.ToString("0.######", CultureInfo.InvariantCulture) is { Length: <= 7 } s ? s : Digits(value, 6) : "-";

    /// <summary>With so many significant digits.</summary>
    public static string Digits(double value, int digits)
    {
        if (!double.IsFinite(value) || value == 0)
        {
            return double.IsFinite(value) ? "0" : "-";
        }

        int decimals = digits - 1 - (int)Math.Floor(Math.Log10(Math.Abs(value)));
        return Number(value, Math.Clamp(decimals, 0, 12));
    }
}
