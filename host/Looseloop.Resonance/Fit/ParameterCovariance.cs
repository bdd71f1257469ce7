namespace Looseloop.Resonance;

/// <summary>Variances and covariance of f0 and Q.</summary>
/// <param name="F0Hz2">Variance of f0, hertz squared.</param>
/// <param name="Q2">Variance of Q.</param>
/// <param name="F0Q">Their covariance, hertz.</param>
public readonly record struct ParameterCovariance(double F0Hz2, double Q2, double F0Q)
{
    /// <summary>Nothing is known.</summary>
    public static ParameterCovariance Unknown { get; } = new(double.NaN, double.NaN, double.NaN);

    /// <summary>Standard uncertainty of f0, hertz.</summary>
    public double F0Hz => Math.Sqrt(F0Hz2);

    /// <summary>Standard uncertainty of Q.</summary>
    public double Q => Math.Sqrt(Q2);

    /// <summary>All multiplied by a factor.</summary>
    public ParameterCovariance Scaled(double factor) => new(F0Hz2 * factor, Q2 * factor, F0Q * factor);
}
