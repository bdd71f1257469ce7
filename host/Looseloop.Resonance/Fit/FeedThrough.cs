namespace Looseloop.Resonance;

/// <summary>
/// The two amplitudes and feed-throughs that have one and the same power curve. With y = |A/(1+jx) + br + j bi|,
/// y^2 = (n0 + n1 x + n2 x^2)/(1+x^2), n0 = A^2 + 2 A br + n2, n1 = -2 A bi, n2 = br^2 + bi^2; solved for A,
/// A^2 = n0 + n2 +- sqrt(4 n0 n2 - n1^2). f0 and Q are the same for both.
/// </summary>
/// <param name="Amplitude">The larger peak amplitude A.</param>
/// <param name="OtherAmplitude">The smaller.</param>
/// <param name="InPhase">br that goes with <see cref="Amplitude"/>.</param>
/// <param name="Quadrature">bi that goes with <see cref="Amplitude"/>.</param>
/// <param name="OtherInPhase">br that goes with <see cref="OtherAmplitude"/>.</param>
/// <param name="OtherQuadrature">bi that goes with <see cref="OtherAmplitude"/>.</param>
/// <param name="Clamped">
/// Noise has put the figures outside what any feed-through makes (n2 negative, or 4 n0 n2 below n1^2): the nearest possible
/// one is named. f0 and Q are not touched by it.
/// </param>
public readonly record struct FeedThrough(
    double Amplitude, double OtherAmplitude, double InPhase, double Quadrature, double OtherInPhase, double OtherQuadrature,
    bool Clamped)
{
    /// <summary>Nothing is known.</summary>
    public static FeedThrough Unknown { get; } =
        new(double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, false);

    /// <summary>Feed-through over peak amplitude, of the two the larger.</summary>
    public double Ratio => Math.Sqrt((OtherInPhase * OtherInPhase) + (OtherQuadrature * OtherQuadrature)) / OtherAmplitude;

    /// <summary>From the three invariants of the power curve.</summary>
    public static FeedThrough FromInvariants(double n0, double n1, double n2)
    {
        double root = (4 * n0 * n2) - (n1 * n1);
        bool clamped = n2 < 0 || root < 0;
        double constant = Math.Max(n2, 0);
        double spread = Math.Sqrt(Math.Max(root, 0));
        double large = Math.Sqrt(Math.Max(n0 + constant + spread, 0));
        double small = Math.Sqrt(Math.Max(n0 + constant - spread, 0));
        return new FeedThrough(
            large, small, (n0 - constant - (large * large)) / (2 * large), -n1 / (2 * large),
            (n0 - constant - (small * small)) / (2 * small), -n1 / (2 * small), clamped);
    }
}
