namespace Looseloop.Coil;

/// <summary>Coupling coefficient of primary and secondary from readings.</summary>
/// <param name="K">The coefficient, 0..1.</param>
/// <param name="Uncertainty">Its standard uncertainty.</param>
public sealed record Coupling(double K, double Uncertainty)
{
    /// <summary>
    /// From the secondary's readings with the primary open and shorted: k = sqrt(1 - (fo/fs)^2), with first-order uncertainty
    /// (GUM 5.2.2).
    /// </summary>
    /// <param name="openHz">Primary open.</param>
    /// <param name="shortedHz">Primary shorted at its terminals; higher.</param>
    /// <param name="openUncertaintyHz">Standard uncertainty of the first; of repeatability, since clock and pull are common to both.</param>
    /// <param name="shortedUncertaintyHz">The same of the second.</param>
    /// <param name="correlation">Correlation of the two, 0 for repeatability.</param>
    /// <exception cref="ArgumentException">Shorting did not raise the frequency.</exception>
    public static Coupling FromOpenAndShorted(
        double openHz, double shortedHz, double openUncertaintyHz, double shortedUncertaintyHz, double correlation = 0)
    {
        Demand.Frequency(openHz, "the open reading");
        Demand.Frequency(shortedHz, "the shorted reading");
        Demand.Uncertainty(openUncertaintyHz, "the uncertainty of the open reading");
        Demand.Uncertainty(shortedUncertaintyHz, "the uncertainty of the shorted reading");
        Demand.Within(correlation, -1, 1, "the correlation", "");
        if (shortedHz <= openHz)
        {
            throw new ArgumentException(
                "shorting the primary must raise the secondary's frequency: check which reading is which, and that the short is at the primary's terminals");
        }

        double ratio = openHz / shortedHz;
        double k = Math.Sqrt(1 - (ratio * ratio));
        // dk/dfo = -ratio/(k fs), dk/dfs = ratio^2/(k fs)
        double a = ratio / (k * shortedHz) * openUncertaintyHz;
        double b = ratio * ratio / (k * shortedHz) * shortedUncertaintyHz;
        double variance = Math.Max(0, (a * a) + (b * b) - (2 * correlation * a * b));
        return new Coupling(k, Math.Sqrt(variance));
    }

    /// <summary>From the two peaks of an equally tuned pair: k = (f+^2 - f-^2)/(f+^2 + f-^2).</summary>
    /// <param name="lowerHz">The lower peak.</param>
    /// <param name="upperHz">The upper peak.</param>
    public static double FromEqualSplit(double lowerHz, double upperHz)
    {
        Demand.Frequency(lowerHz, "the lower peak");
        Demand.Frequency(upperHz, "the upper peak");
        if (upperHz <= lowerHz)
        {
            throw new ArgumentException("the upper peak must lie above the lower one");
        }

        double u = upperHz * upperHz;
        double l = lowerHz * lowerHz;
        return (u - l) / (u + l);
    }

    /// <summary>
    /// The two frequencies of a coupled pair, hertz:
    /// f+-^2 = [f1^2 + f2^2 +- sqrt((f1^2 - f2^2)^2 + 4 k^2 f1^2 f2^2)] / (2 (1 - k^2)) (textbook; Terman 1943).
    /// </summary>
    /// <param name="firstHz">The one circuit alone, the other open.</param>
    /// <param name="secondHz">The other alone.</param>
    /// <param name="k">Coupling, 0 .. below 1.</param>
    public static (double LowerHz, double UpperHz) SplitHz(double firstHz, double secondHz, double k)
    {
        Demand.Frequency(firstHz, "the first frequency");
        Demand.Frequency(secondHz, "the second frequency");
        Demand.Within(k, 0, 0.999999, "the coupling", "");
        double a = firstHz * firstHz;
        double b = secondHz * secondHz;
        double root = Math.Sqrt(((a - b) * (a - b)) + (4 * k * k * a * b));
        double below = 2 * (1 - (k * k));
        // The lower one from the product a b/(1 - k^2), or it would cancel.
        double upper = (a + b + root) / below;
        return (Math.Sqrt(a * b / (1 - (k * k)) / upper), Math.Sqrt(upper));
    }
}
