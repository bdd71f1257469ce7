namespace Looseloop.Statistics;

/// <summary>The chi-square distribution.</summary>
public static class ChiSquare
{
    /// <summary>Probability of at least this sum of squares, 0..1; NaN without degrees of freedom.</summary>
    /// <param name="sumOfSquares">Not negative.</param>
    /// <param name="degreesOfFreedom">Above 0.</param>
    public static double UpperTail(double sumOfSquares, double degreesOfFreedom) =>
        degreesOfFreedom > 0 && sumOfSquares >= 0
            ? SpecialFunctions.GammaUpper(degreesOfFreedom / 2, sumOfSquares / 2)
            : double.NaN;
}
