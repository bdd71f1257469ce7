using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>
/// The curve of a full reading, held for the tracked readings that follow it: its interference and constant power in
/// proportion to its peak, with their covariance. f0, Q and the scale are free again in each tracked reading.
/// </summary>
public sealed class HeldCurve
{
    private const int Parameters = 5;

    /// <summary>
    /// Coil and feed-through each go with some power of the frequency between -1 and 1: by how much more than f0 the ratio of
    /// the two may have moved (half-width of a rectangle).
    /// </summary>
    private const double RatioPerF0 = 2;

    private readonly double _prefactorExponent;
    private readonly double _resonantPower;

    private HeldCurve(ResonanceFit fit, double prefactorExponent)
    {
        _prefactorExponent = prefactorExponent;
        F0Hz = fit.F0Hz;
        Q = fit.Q;
        Interference = fit.Interference / fit.PeakPower;
        Constant = fit.ConstantPower / fit.PeakPower;
        PeakPower = fit.PeakPower;
        FeedThroughRatio = double.IsFinite(fit.FeedThrough.Ratio) ? fit.FeedThrough.Ratio : 0;

        // A^2 over the peak's power; of the two possible amplitudes the mean, which differs from either by the feed-through
        // squared and matters only as far as Q has moved.
        _resonantPower = fit.PeakAmplitude * fit.PeakAmplitude / fit.PeakPower;
    }

    /// <summary>f0 of the full reading, as its fit gave it, hertz.</summary>
    public double F0Hz { get; }

    /// <summary>Q of the full reading.</summary>
    public double Q { get; }

    /// <summary>Power of the resonance at f0, counts squared.</summary>
    public double PeakPower { get; }

    /// <summary>n1 over the peak's power.</summary>
    public double Interference { get; }

    /// <summary>n2 over the peak's power.</summary>
    public double Constant { get; }

    /// <summary>Feed-through over peak amplitude.</summary>
    public double FeedThroughRatio { get; }

    /// <summary>Variance of <see cref="Interference"/> at the full reading.</summary>
    public double InterferenceVariance { get; private set; }

    /// <summary>Variance of <see cref="Constant"/> at the full reading.</summary>
    public double ConstantVariance { get; private set; }

    /// <summary>Their covariance.</summary>
    public double HeldCovariance { get; private set; }

    /// <summary>The curve of a full reading.</summary>
    /// <param name="fit">Its fit.</param>
    /// <param name="points">The points of the fit that the fundamental made, at drive weight 1, with their variances.</param>
    /// <param name="prefactorExponent">As it was declared to the fit.</param>
    /// <returns>Null where there is no fit, or the points do not determine its terms.</returns>
    public static HeldCurve? From(ResonanceFit fit, IReadOnlyList<FitPoint> points, double prefactorExponent)
    {
        if (!fit.IsFitted || !(fit.PeakPower > 0) || points.Count < Parameters)
        {
            return null;
        }

        var curve = new HeldCurve(fit, prefactorExponent);
        return curve.Hold(fit, points) ? curve : null;
    }

    /// <summary>The amplitude at a frequency.</summary>
    /// <param name="frequencyHz">Where, hertz.</param>
    /// <param name="f0Hz">f0 now, hertz.</param>
    /// <param name="q">Q now.</param>
    /// <param name="scale">Amplitude of everything, against the full reading's.</param>
    public double Amplitude(double frequencyHz, double f0Hz, double q, double scale) =>
        Amplitude(frequencyHz, f0Hz, q, scale, Interference, Constant);

    /// <summary>
    /// What must be added to both variances once f0 has moved: the feed-through, of ratio b, has then changed against the coil
    /// by up to 2 b times the relative move, in any direction.
    /// </summary>
    internal (double Interference, double Constant) VarianceOfAge(double f0Hz)
    {
        double change = RatioPerF0 * FeedThroughRatio * Math.Abs((f0Hz / F0Hz) - 1) / Math.Sqrt(3);
        double interference = 2 * change;
        double constant = 2 * FeedThroughRatio * change;
        return (interference * interference, constant * constant);
    }

    /// <summary>
    /// The same with other terms. Feed-through stays as it is while Q moves, and the resonance's own amplitude goes with Q:
    /// with r = Q/Q held, P = A^2 r^2 + 2 A br r and n1 = -2 A bi r.
    /// </summary>
    internal double Amplitude(double frequencyHz, double f0Hz, double q, double scale, double interference, double constant)
    {
        double r = q / Q;
        double x = ResonanceModel.Detuning(frequencyHz, f0Hz, q);
        double peak = r + (((r * r) - r) * _resonantPower);
        double resonance = (peak + (interference * r * x)) / (1 + (x * x));
        double prefactor = _prefactorExponent == 0 ? 1 : Math.Pow(frequencyHz / f0Hz, 2 * _prefactorExponent);
        return scale * Math.Sqrt(PeakPower * Math.Max((prefactor * resonance) + constant, 0));
    }

    // (J'WJ)^-1 of the fit's five parameters at the points, brought to the two ratios that are held.
    private bool Hold(ResonanceFit fit, IReadOnlyList<FitPoint> points)
    {
        double[] at = [fit.F0Hz, fit.Q, fit.PeakPower, fit.Interference, fit.ConstantPower];
        double[] step =
        [
            1e-4 * fit.BandwidthHz, 1e-4 * fit.Q, 1e-4 * fit.PeakPower, 1e-4 * fit.PeakPower, 1e-4 * fit.PeakPower,
        ];
        double[,] normal = new double[Parameters, Parameters];
        double[] slope = new double[Parameters];
        foreach (FitPoint point in points)
        {
            if (!(point.Variance > 0) || !(point.Amplitude > 0))
            {
                continue;
            }

            double amplitude = Math.Sqrt(Math.Max(Power(point.FrequencyHz, at), point.Variance));
            for (int k = 0; k < Parameters; k++)
            {
                double middle = at[k];
                at[k] = middle + step[k];
                double above = Power(point.FrequencyHz, at);
                at[k] = middle - step[k];
                slope[k] = (above - Power(point.FrequencyHz, at)) / (2 * step[k]) / (2 * amplitude);
                at[k] = middle;
            }

            for (int i = 0; i < Parameters; i++)
            {
                for (int j = 0; j < Parameters; j++)
                {
                    normal[i, j] += slope[i] * slope[j] / point.Variance;
                }
            }
        }

        if (SymmetricMatrix.Inverse(normal) is not { } covariance)
        {
            return false;
        }

        // Where the points scatter more than they state, so do the terms.
        double inflation = Math.Max(1, fit.SumOfSquares / Math.Max(1, fit.DegreesOfFreedom));
        inflation = fit.VariancesStated && double.IsFinite(inflation) ? inflation : 1;
        double p2 = PeakPower * PeakPower;
        double c = Interference;
        double d = Constant;
        InterferenceVariance = inflation * (covariance[3, 3] - (2 * c * covariance[2, 3]) + (c * c * covariance[2, 2])) / p2;
        ConstantVariance = inflation * (covariance[4, 4] - (2 * d * covariance[2, 4]) + (d * d * covariance[2, 2])) / p2;
        HeldCovariance = inflation * (covariance[3, 4] - (c * covariance[2, 4]) - (d * covariance[2, 3]) + (c * d * covariance[2, 2])) / p2;
        return true;
    }

    private double Power(double frequencyHz, double[] at)
    {
        double prefactor = _prefactorExponent == 0 ? 1 : Math.Pow(frequencyHz / at[0], 2 * _prefactorExponent);
        return (prefactor * ResonanceModel.Power(ResonanceModel.Detuning(frequencyHz, at[0], at[1]), at[2], at[3], 0)) + at[4];
    }
}
