namespace Looseloop.Coil;

/// <summary>What every public computation demands of its inputs, so that NaN, zero, negative and absurd values never become a figure.</summary>
internal static class Demand
{
    /// <summary>Nothing in this trade is longer, in metres.</summary>
    public const double LongestM = 1000;

    /// <summary>No winding has more turns.</summary>
    public const double MostTurns = 1e6;

    /// <summary>A length: above zero and at most <see cref="LongestM"/> metres.</summary>
    public static double Length(double valueM, string what) => Within(valueM, 1e-9, LongestM, what, "m");

    /// <summary>A number of turns: above zero, at most <see cref="MostTurns"/>.</summary>
    public static double Turns(double turns) => Within(turns, 1e-6, MostTurns, "turns", "");

    /// <summary>A frequency between 1 Hz and 1 GHz.</summary>
    public static double Frequency(double valueHz, string what) => Within(valueHz, 1, 1e9, what, "Hz");

    /// <summary>A capacitance above zero and at most a farad.</summary>
    public static double Capacitance(double valueF, string what) => Within(valueF, 1e-18, 1, what, "F");

    /// <summary>An inductance above zero and at most 1 kH.</summary>
    public static double Inductance(double valueH, string what) => Within(valueH, 1e-12, 1000, what, "H");

    /// <summary>A quality factor above 1/2 (a ringing circuit) and at most a million.</summary>
    public static double Quality(double q, string what) => Within(q, 0.5, 1e6, what, "");

    /// <summary>A finite number within bounds, both included.</summary>
    public static double Within(double value, double least, double most, string what, string unit)
    {
        if (!double.IsFinite(value) || value < least || value > most)
        {
            string u = unit.Length > 0 ? " " + unit : "";
            throw new ArgumentOutOfRangeException(
                what, value, FormattableString.Invariant($"{what} must lie between {least:G6} and {most:G6}{u}"));
        }

        return value;
    }

    /// <summary>A standard uncertainty: finite and not negative.</summary>
    public static double Uncertainty(double value, string what) => Within(value, 0, 1e12, what, "");
}
