using Looseloop.Statistics;

namespace Looseloop.Resonance;

/// <summary>Turns the end of a minimisation into a <see cref="ResonanceFit"/>.</summary>
internal static class FitSummary
{
    public static ResonanceFit Make(
        FitData data, ReadOnlySpan<double> best, bool determined, ReadOnlySpan<double> covariance, double sum, double inflation, double robustScale,
        int iterations, Span<double> normalized, in FitOptions options, double leastEvidence, ReadOnlySpan<double> residuals)
    {
        int parameters = data.ParameterCount;
        int freedom = data.Count - parameters;
        double f0 = best[0];
        double q = best[1];
        double scatter = freedom > 0 ? sum / freedom : double.NaN;
        double unit = data.VariancesStated || !(scatter > 0) ? 1 : 1 / Math.Sqrt(scatter);
        double plain = 0;
        for (int i = 0; i < data.Count; i++)
        {
            // Robust weights stay in: a point they silenced is not to be read as a good one.
            normalized[i] = residuals[i] * unit;
            double sigma = data.InPower[i] ? 1 / data.InverseSigma[i] / (2 * data.LargestAmplitude) : 1 / data.InverseSigma[i];
            plain += residuals[i] * residuals[i] * sigma * sigma;
        }

        double evidence = Evidence(data, scatter, sum);
        bool background = data.Background == BackgroundModel.FeedThrough;
        double prefactor = options.PrefactorExponent == 0 ? 1 : Math.Pow(f0 / data.ReferenceHz, 2 * options.PrefactorExponent);
        double peak = best[2] * prefactor;
        double interference = background ? best[3] * prefactor : 0;
        double constant = background ? best[4] / data.FirstGroupDrive2 : 0;
        FeedThrough feedThrough = FeedThrough.FromInvariants(peak + constant, interference, constant);
        double amplitude = (feedThrough.Amplitude + feedThrough.OtherAmplitude) / 2;
        FitOutcome outcome =
            !(double.IsFinite(f0) && double.IsFinite(q) && double.IsFinite(sum)) ? FitOutcome.NotDetermined
            : !(evidence > leastEvidence) || !(peak > 0) ? FitOutcome.NoPeak
            : f0 < data.LowestHz || f0 > data.HighestHz ? FitOutcome.PeakOutside
            : !determined ? FitOutcome.NotDetermined
            : FitOutcome.Fitted;
        ParameterCovariance one = determined
            ? new ParameterCovariance(covariance[0], covariance[parameters + 1], covariance[1])
            : ParameterCovariance.Unknown;
        bool robust = options.Loss != RobustLoss.None;
        double stated = data.VariancesStated ? (robust ? inflation : 1) : double.NaN;
        double fromScatter = robust ? inflation : scatter;
        double chosen = data.VariancesStated ? stated : fromScatter;
        return new ResonanceFit
        {
            Outcome = outcome,
            F0Hz = f0,
            Q = q,
            Stated = one.Scaled(stated),
            Scatter = one.Scaled(fromScatter),
            Noise = one.Scaled(data.VariancesStated ? stated / (robustScale * robustScale) : double.NaN),
            RobustScale = robustScale,
            VariancesStated = data.VariancesStated,
            SumOfSquares = sum * data.UnknownSigma * data.UnknownSigma,
            DegreesOfFreedom = freedom,
            ChiSquareProbability = data.VariancesStated ? ChiSquare.UpperTail(sum, freedom) : double.NaN,
            ResidualRatio = freedom > 0 ? Math.Sqrt(plain / freedom) / amplitude : double.NaN,
            PeakPower = peak,
            PeakPowerStandard = determined ? Math.Sqrt(covariance[(2 * parameters) + 2] * chosen) * prefactor : double.NaN,
            Interference = interference,
            ConstantPower = constant,
            FeedThrough = feedThrough,
            Evidence = evidence,
            Iterations = iterations,
        };
    }

    /// <summary>How much worse constants alone explain the points, in units of the scatter about the curve.</summary>
    private static double Evidence(FitData data, double scatter, double sum)
    {
        Span<double> weight = stackalloc double[ResonanceFitter.MostGroups];
        Span<double> mean = stackalloc double[ResonanceFitter.MostGroups];
        weight.Clear();
        mean.Clear();
        for (int i = 0; i < data.Count; i++)
        {
            double w = data.InverseSigma[i] * data.RobustRoot[i];
            weight[data.Group[i]] += w * w;
            mean[data.Group[i]] += w * w * data.Target[i];
        }

        double flat = 0;
        for (int i = 0; i < data.Count; i++)
        {
            int g = data.Group[i];
            double w = data.InverseSigma[i] * data.RobustRoot[i];
            double r = w * (data.Target[i] - (mean[g] / weight[g]));
            flat += r * r;
        }

        double noise = data.VariancesStated ? Math.Max(double.IsNaN(scatter) ? 1 : scatter, 1) : scatter;
        return flat == 0 ? 0 : (flat - sum) / noise;
    }
}
