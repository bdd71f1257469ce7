using Looseloop.Resonance;

namespace Looseloop.Procedures.Uncertainty;

/// <summary>
/// How much more than their samples say the points differ between the way there and the way back. Each way is fitted by
/// itself, so a drift is in neither; what one resonance cannot explain is in both residuals alike and drops out of their
/// difference. That separates what comes out otherwise next time (hum, beats, bursts) from what the model lacks: pure error
/// against lack of fit (Draper and Smith, Applied Regression Analysis, 1998, chapter 2, from memory).
/// </summary>
/// <param name="F0">For f0: over the points that determine it.</param>
/// <param name="Q">For Q.</param>
public readonly record struct PairScatter(Excess F0, Excess Q)
{
    /// <summary>A step of a parameter for a derivative, bandwidths or relative.</summary>
    private const double Step = 1e-4;

    /// <summary>No pairs to look at.</summary>
    public static PairScatter Unknown { get; } = new(Excess.Unknown, Excess.Unknown);

    /// <summary>From the points and their residuals, the way there and then the way back in the opposite order.</summary>
    /// <param name="points">An even number of points.</param>
    /// <param name="residuals">Residuals over their standard deviations, each way of its own fit.</param>
    /// <param name="fit">The fit of both ways.</param>
    /// <param name="parameters">Parameters of each fit.</param>
    public static PairScatter Of(ReadOnlySpan<FitPoint> points, ReadOnlySpan<double> residuals, ResonanceFit fit, int parameters)
    {
        int pairs = points.Length / 2;
        if (pairs <= parameters || points.Length % 2 != 0 || residuals.Length != points.Length)
        {
            return Unknown;
        }

        var f0 = new Excess.Sum();
        var q = new Excess.Sum();
        for (int i = 0; i < pairs; i++)
        {
            int k = points.Length - 1 - i;
            double one = VarianceOf(points[i]);
            double other = VarianceOf(points[k]);

            // In the points' own unit: each has a standard deviation of its own, which would turn a common misfit into a difference.
            double difference = (residuals[i] * Math.Sqrt(one)) - (residuals[k] * Math.Sqrt(other));
            double square = difference * difference / (one + other);
            double hz = points[i].FrequencyHz;
            double byF0 = fit.AmplitudeAt(hz) - (fit with { F0Hz = fit.F0Hz + (Step * fit.BandwidthHz) }).AmplitudeAt(hz);
            double byQ = fit.AmplitudeAt(hz) - (fit with { Q = fit.Q * (1 + Step) }).AmplitudeAt(hz);
            f0.Add(square, byF0 * byF0 / points[i].Variance);
            q.Add(square, byQ * byQ / points[i].Variance);
        }

        double left = (pairs - parameters) / (double)pairs;
        return new PairScatter(f0.Over(left), q.Over(left));
    }

    private static double VarianceOf(in FitPoint point) => point.PowerVariance > 0 ? point.PowerVariance : point.Variance;
}

/// <summary>A variance over what the samples say.</summary>
/// <param name="Variance">1 for noise alone; NaN if unknown.</param>
/// <param name="DegreesOfFreedom">Of that figure.</param>
public readonly record struct Excess(double Variance, double DegreesOfFreedom)
{
    /// <summary>How strongly the samples' own scatter is believed before the pairs are seen, degrees of freedom.</summary>
    private const double PriorFreedom = 16;

    public static Excess Unknown { get; } = new(double.NaN, 0);

    /// <summary>
    /// The pairs' figure and the samples' together, by their degrees of freedom. Below 1 where hum that averages out over a
    /// mains period makes samples scatter that leave the mean alone.
    /// </summary>
    public double Believed => (PriorFreedom + (Variance * DegreesOfFreedom)) / (PriorFreedom + DegreesOfFreedom);

    /// <summary>Degrees of freedom of <see cref="Believed"/>.</summary>
    public double BelievedFreedom => PriorFreedom + DegreesOfFreedom;

    internal struct Sum
    {
        private double _weights;
        private double _squares;
        private double _sum;

        public void Add(double square, double weight)
        {
            _weights += weight;
            _squares += weight * weight;
            _sum += weight * square;
        }

        // What the fits took up of the differences is given back; weights that differ leave fewer degrees of freedom (Welch and Satterthwaite).
        public readonly Excess Over(double left) =>
            _weights > 0 ? new Excess(_sum / _weights / left, _weights * _weights / _squares * left) : Unknown;
    }
}
