namespace Looseloop.Resonance;

/// <summary>
/// How the noise of one sample depends on the level. A linear output has constant noise in amplitude, a square-law output in power,
/// a logarithmic one in decibels; a real box is a sum of the three. All in units of the peak amplitude.
/// </summary>
/// <param name="AmplitudeSigma">The part that is constant in amplitude.</param>
/// <param name="PowerSigma">The part that is constant in power.</param>
/// <param name="RelativeSigma">The part that is a constant share of the amplitude; a decibel is 0.1151 of it.</param>
public readonly record struct NoiseLaw(double AmplitudeSigma, double PowerSigma, double RelativeSigma)
{
    /// <summary>A linear output.</summary>
    public static NoiseLaw ConstantInAmplitude(double sigma) => new(sigma, 0, 0);

    /// <summary>A square-law output; sigma over the peak power.</summary>
    public static NoiseLaw ConstantInPower(double sigma) => new(0, sigma, 0);

    /// <summary>A logarithmic output.</summary>
    public static NoiseLaw ConstantInDecibels(double sigmaDb) => new(0, 0, sigmaDb * Math.Log(10) / 20);

    /// <summary>Variance of one sample's power, at a power over the peak power.</summary>
    public double PowerVariance(double power)
    {
        double level = Math.Max(power, 0);
        return (4 * level * AmplitudeSigma * AmplitudeSigma) + (PowerSigma * PowerSigma)
            + (4 * level * level * RelativeSigma * RelativeSigma);
    }
}
