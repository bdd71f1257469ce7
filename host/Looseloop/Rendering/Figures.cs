using System.Globalization;

namespace Looseloop.Rendering;

/// <summary>Figures as text: never more digits than the uncertainty carries.</summary>
internal static class Figures
{
    /// <summary>A value rounded to the second digit of its uncertainty, thousands parted by a thin gap.</summary>
    public static string Value(double value, double uncertainty) =>
        double.IsFinite(value) ? Grouped(value, Decimals(uncertainty)) : "-";

    /// <summary>An uncertainty with two digits.</summary>
    public static string Uncertainty(double uncertainty) =>
        double.IsFinite(uncertainty) ? Grouped(uncertainty, Decimals(uncertainty)) : "-";

    /// <summary>How many decimals two digits of an uncertainty need.</summary>
    private static int Decimals(double uncertainty)
    {
        if (!(uncertainty > 0) || !double.IsFinite(uncertainty))
        {
            return 3;
        }

        return (int)Math.Clamp(1 - Math.Floor(Math.Log10(uncertainty)), 0, 9);
    }

    private static string Grouped(double value, int decimals)
    {
        var format = (NumberFormatInfo)CultureInfo.InvariantCulture.NumberFormat.Clone();
        format.NumberGroupSeparator = " ";
        return value.ToString($"N{decimals}", format);
    }
}
