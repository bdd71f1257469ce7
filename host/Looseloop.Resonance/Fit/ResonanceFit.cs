namespace Looseloop.Resonance;

/// <summary>What a fit found. All figures are NaN where they could not be found; use none unless <see cref="IsFitted"/>.</summary>
public readonly record struct ResonanceFit()
{
    public FitOutcome Outcome { get; init; } = FitOutcome.NotDetermined;

    /// <summary>True if f0 and Q were found.</summary>
    public bool IsFitted => Outcome == FitOutcome.Fitted;

    /// <summary>Resonant frequency, hertz.</summary>
    public double F0Hz { get; init; } = double.NaN;

    /// <summary>Quality factor.</summary>
    public double Q { get; init; } = double.NaN;

    /// <summary>Bandwidth between the half-power points, hertz: f0/Q.</summary>
    public double BandwidthHz => F0Hz / Q;

    /// <summary>Covariance from the points' stated variances; unknown where they stated none.</summary>
    public ParameterCovariance Stated { get; init; } = ParameterCovariance.Unknown;

    /// <summary>Covariance from the scatter about the curve (stated variances give the weights only).</summary>
    public ParameterCovariance Scatter { get; init; } = ParameterCovariance.Unknown;

    /// <summary>True if the points stated their variances.</summary>
    public bool VariancesStated { get; init; }

    /// <summary>
    /// The one to use: <see cref="Stated"/> where the points stated their variances and scatter accordingly; else
    /// <see cref="Scatter"/>, which is then the larger.
    /// </summary>
    public ParameterCovariance Covariance =>
        !VariancesStated || (ChiSquareProbability < 0.01 && Scatter.F0Hz2 > Stated.F0Hz2) ? Scatter : Stated;

    /// <summary>
    /// Covariance that noise of the stated variances alone would make: what the points scatter beyond it is left out. NaN
    /// without stated variances.
    /// </summary>
    public ParameterCovariance Noise { get; init; } = ParameterCovariance.Unknown;

    /// <summary>Scale of the residuals that the robust weights were made with, standard deviations, 1 or more.</summary>
    public double RobustScale { get; init; } = 1;

    /// <summary>Standard uncertainty of f0, hertz, by <see cref="Covariance"/>.</summary>
    public double F0StandardHz => Covariance.F0Hz;

    /// <summary>Relative standard uncertainty of Q, by <see cref="Covariance"/>.</summary>
    public double QRelativeStandard => Covariance.Q / Q;

    /// <summary>Sum of squared residuals over their variances; without stated variances, of the plain residuals.</summary>
    public double SumOfSquares { get; init; } = double.NaN;

    /// <summary>Points less parameters.</summary>
    public int DegreesOfFreedom { get; init; }

    /// <summary>Probability that noise of the stated variances scatters at least as much; NaN where none were stated.</summary>
    public double ChiSquareProbability { get; init; } = double.NaN;

    /// <summary>Root mean square of the residuals over the peak amplitude (plain, degrees of freedom respected).</summary>
    public double ResidualRatio { get; init; } = double.NaN;

    /// <summary>Power of the resonance at f0 for drive weight 1: P = n0 - n2.</summary>
    public double PeakPower { get; init; } = double.NaN;

    /// <summary>Interference of resonance and feed-through, n1.</summary>
    public double Interference { get; init; } = double.NaN;

    /// <summary>Constant power of the lowest group for drive weight 1, n2; may be negative within noise.</summary>
    public double ConstantPower { get; init; } = double.NaN;

    /// <summary>Standard uncertainty of <see cref="PeakPower"/>.</summary>
    public double PeakPowerStandard { get; init; } = double.NaN;

    /// <summary>
    /// The feed-through by name, from the lowest group. Its constant also holds what the feed-through passes of the drive's
    /// harmonics: for a square wave the in-phase part is an upper bound.
    /// </summary>
    public FeedThrough FeedThrough { get; init; } = FeedThrough.Unknown;

    /// <summary>Peak amplitude of the resonance itself, the two possible values' mean.</summary>
    public double PeakAmplitude => (FeedThrough.Amplitude + FeedThrough.OtherAmplitude) / 2;

    /// <summary>
    /// Sum of squares that constants alone leave, over that of the fit, per degree of freedom of the fit, less the latter: how
    /// strongly the points speak for a resonance.
    /// </summary>
    public double Evidence { get; init; } = double.NaN;

    /// <summary>Successful steps of the minimiser over all starts.</summary>
    public int Iterations { get; init; }

    /// <summary>The fit's amplitude at a frequency (drive weight 1, first group); for drawing.</summary>
    /// <param name="frequencyHz">Above 0.</param>
    /// <param name="prefactorExponent">As it was declared to the fit.</param>
    public double AmplitudeAt(double frequencyHz, double prefactorExponent = 0)
    {
        double x = ResonanceModel.Detuning(frequencyHz, F0Hz, Q);
        double power = (Math.Pow(frequencyHz / F0Hz, 2 * prefactorExponent) * ResonanceModel.Power(x, PeakPower, Interference, 0))
            + ConstantPower;
        return Math.Sqrt(Math.Max(power, 0));
    }
}
