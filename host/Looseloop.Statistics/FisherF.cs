namespace Looseloop.Statistics;

/// <summary>Fisher's F distribution.</summary>
public static class FisherF
{
    /// <summary>Probability of at least this ratio of variances, 0..1 (Abramowitz and Stegun 26.6.2).</summary>
    /// <param name="ratio">Variance ratio; 1 is the answer at 0 and below.</param>
    /// <param name="numeratorFreedom">Degrees of freedom above the line, above 0.</param>
    /// <param name="denominatorFreedom">Degrees of freedom below it, above 0.</param>
    public static double UpperTail(double ratio, double numeratorFreedom, double denominatorFreedom) => ratio <= 0
        ? 1
        : SpecialFunctions.BetaRegularised(
            denominatorFreedom / 2, numeratorFreedom / 2, denominatorFreedom / (denominatorFreedom + (numeratorFreedom * ratio)));
}
