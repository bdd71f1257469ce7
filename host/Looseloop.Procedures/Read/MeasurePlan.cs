using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>Where a reading's points lie once f0 and Q are known about, and how each is sampled.</summary>
/// <param name="Settings">In the order of the sweep; a setting that deserves more samples stands there more than once.</param>
/// <param name="Harmonics">Which harmonic of the drive each setting uses: 1, or 3 and 5 for vernier settings.</param>
/// <param name="DwellUs">Dwell before each, microseconds.</param>
/// <param name="Samples">Samples at each visit.</param>
/// <param name="SpacingUs">Microseconds from sample to sample; samples times spacing is a whole mains period.</param>
public sealed record MeasurePlan(
    IReadOnlyList<Setting> Settings, IReadOnlyDictionary<Setting, int> Harmonics, int DwellUs, int Samples, int SpacingUs)
{
    private const int SamplesAMainsPeriod = 100;
    private const int MostVisits = 6;

    /// <summary>Time on air of a reading, seconds; more where a ring is long.</summary>
    private const double OnAirS = 0.65;

    /// <summary>What a point costs beside dwell and samples: the timer, and its line of text.</summary>
    private const double PointS = 0.006;

    /// <summary>
    /// Seven ring times leave a thousandth of the step before, which two ways of low noise tell apart; where the ring is short
    /// beside the samples, up to three more cost next to nothing.
    /// </summary>
    private const double MostMoreRings = 3;
    private const double CheapShare = 0.08;

    /// <summary>Vernier settings are driven at this duty, where the third and fifth harmonics are strongest.</summary>
    private const double VernierDuty = 0.5;

    /// <summary>How far from f0 settings are offered to the design, bandwidths.</summary>
    private const double MostReach = 8;
    private const double LeastReach = 2.2;

    /// <summary>
    /// Nor farther than this share of f0: over a wide span the loop's prefactor, a feed-through that changes with frequency
    /// and the overtones' tails bend the curve.
    /// </summary>
    private const double ReachShare = 0.06;

    /// <summary>
    /// A design puts its points where they determine the model; a second response hides between them. So every setting
    /// within this of f0, bandwidths, is visited at least once, or every second or third where there are many.
    /// </summary>
    private const double Doubting = 2.6;
    private const int MostDoubting = 13;

    private const double LeastDoubt = 1 / 32.0;

    /// <summary>Below this duty the level was too high for the converter; a vernier at 1/2 might be again.</summary>
    private const double LeastDutyForVernier = 0.3;

    /// <summary>True if vernier settings are among them.</summary>
    public bool UsesVernier => Harmonics.Values.Any(harmonic => harmonic > 1);

    /// <summary>Settings that drive the coil by their fundamental, each once, ascending.</summary>
    public IReadOnlyList<Setting> Fundamental =>
        [.. Settings.Where(setting => Harmonics[setting] == 1).Distinct().OrderBy(setting => setting.FrequencyHz)];

    /// <summary>Plans for a target by the Fisher information of the settings that the box can make.</summary>
    /// <param name="box">The box.</param>
    /// <param name="search">What is known so far.</param>
    /// <param name="maker">The detector's law and zero.</param>
    /// <param name="mainsHz">Mains frequency, hertz.</param>
    public static MeasurePlan For(BoxSession box, TargetSearch.Result search, AmplitudeMaker maker, double mainsHz)
    {
        Target target = RoundedEstimate.Of(search.Target!);
        DetectorLaw law = maker.Scale.Law;
        int spacingUs = (int)Math.Round(1e6 / mainsHz / SamplesAMainsPeriod);
        double tauUs = 1e6 * (target.RingTimeS + law.TimeConstantS);
        double moreRings = Math.Min(MostMoreRings, CheapShare * SamplesAMainsPeriod * spacingUs / tauUs);
        int dwellUs = CurveSweep.DwellUs(target, law, CurveSweep.RingsInOrder + moreRings);
        bool vernier = law.RespondsToPower && target.Duty >= LeastDutyForVernier;
        double visitS = (2e-6 * (dwellUs + (SamplesAMainsPeriod * spacingUs))) + (2 * PointS);
        var request = new PlanRequest
        {
            Estimate = RoundedEstimate.Of(target, search.Fit),
            F0StandardHz = target.BandwidthHz * Doubt(search.Fit.F0StandardHz / target.BandwidthHz, 1 / 3.0),
            QRelativeStandard = Doubt(search.Fit.QRelativeStandard, 0.3),
            Noise = NoiseOf(search, maker),
            Fundamental = Around(box, target, 1, target.Duty),
            Third = vernier ? Around(box, target, 3, VernierDuty) : [],
            Fifth = vernier ? Around(box, target, 5, VernierDuty) : [],
            DetectorTimeS = law.TimeConstantS,
            SampleS = spacingUs * 1e-6,
            PointS = PointS,
            TimeS = Math.Max(OnAirS, 9 * visitS),
            LeastSamples = SamplesAMainsPeriod,
            ReachBandwidths = Reach(target),
        };
        SweepPlan? designed = SweepDesigner.Design(request);
        return designed is null
            ? Even(box, target, dwellUs, spacingUs)
            : Of(box, target, designed, dwellUs, spacingUs);
    }

    /// <summary>A doubt of the estimate in powers of two, and not below what rounding has added.</summary>
    private static double Doubt(double standard, double most) =>
        Math.Min(RoundedEstimate.Geometric(Math.Max(standard, LeastDoubt), 2), most);

    private static double Reach(Target target) => Math.Clamp(ReachShare * target.Q, LeastReach, MostReach);

    private static MeasurePlan Of(BoxSession box, Target target, SweepPlan designed, int dwellUs, int spacingUs)
    {
        var settings = new List<Setting>();
        var harmonics = new Dictionary<Setting, int>();
        foreach (IGrouping<Setting, PlannedPoint> visits in designed.Points.GroupBy(point => point.Setting))
        {
            PlannedPoint point = visits.First();
            if (!IsInside(box, point.Setting))
            {
                continue;
            }

            int times = Math.Clamp((int)Math.Round((double)visits.Sum(visit => visit.Samples) / (2 * SamplesAMainsPeriod)), 1, MostVisits);
            settings.AddRange(Enumerable.Repeat(point.Setting, times));
            harmonics[point.Setting] = point.Harmonic;
        }

        Setting[] near = [.. Around(box, target, 1, target.Duty).Where(s => Math.Abs(s.FrequencyHz - target.F0Hz) < Doubting * target.BandwidthHz)];
        if (near.Length < 3)
        {
            // So sharp a curve falls between the settings; its nearest ones still tell the drive's strength and the level.
            near = [.. CurveSweep.About(box.Grid, target.F0Hz, 1, 1, target.Duty).Where(setting => IsInside(box, setting))];
        }

        int stride = (near.Length + MostDoubting - 1) / MostDoubting;
        settings.AddRange(near.Where((setting, i) => i % Math.Max(stride, 1) == 0 && harmonics.TryAdd(setting, 1)));

        return new MeasurePlan(
            [.. settings.OrderBy(setting => harmonics[setting]).ThenBy(setting => setting.FrequencyHz)], harmonics, dwellUs, SamplesAMainsPeriod, spacingUs);
    }

    /// <summary>Where nothing can be designed (too few settings, or no idea of the noise): evenly over the curve.</summary>
    private static MeasurePlan Even(BoxSession box, Target target, int dwellUs, int spacingUs)
    {
        const int Points = 17;
        const int FewestEven = 6;
        Setting[] all = [.. Around(box, target, 1, target.Duty)];
        if (all.Length < FewestEven)
        {
            all = [.. CurveSweep.About(box.Grid, target.F0Hz, FewestEven, 1, target.Duty).Where(setting => IsInside(box, setting))];
        }

        int stride = Math.Max(1, all.Length / Points);
        Setting[] settings = [.. all.Where((_, i) => i % stride == 0)];
        return new MeasurePlan(settings, settings.ToDictionary(setting => setting, _ => 1), dwellUs, SamplesAMainsPeriod, spacingUs);
    }

    /// <summary>Settings whose harmonic falls within reach of f0: every one, or strided where the curve is wide.</summary>
    private static IReadOnlyList<Setting> Around(BoxSession box, Target target, int harmonic, double duty)
    {
        const int Most = 60;

        // By the exact detuning f/f0 - f0/f = 2u/Q, so that a low Q does not reach below zero.
        double half = Reach(target) / target.Q;
        double ratio = half + Math.Sqrt(1 + (half * half));
        double lowHz = Math.Max(target.F0Hz / ratio / harmonic, box.Identity.LowestHz);
        double highHz = Math.Min(target.F0Hz * ratio / harmonic, box.Identity.HighestHz);
        if (lowHz >= highHz)
        {
            return [];
        }

        IReadOnlyList<Setting> all = box.Grid.Between(lowHz, highHz, duty);
        int stride = (all.Count + Most - 1) / Most;
        return stride <= 1 ? all : [.. all.Where((_, i) => i % stride == 0)];
    }

    private static bool IsInside(BoxSession box, Setting setting) =>
        setting.FrequencyHz >= box.Identity.LowestHz && setting.FrequencyHz <= box.Identity.HighestHz;

    /// <summary>The noise of one sample, constant in the detector's output, over the peak amplitude at drive weight 1.</summary>
    private static NoiseLaw NoiseOf(TargetSearch.Result search, AmplitudeMaker maker)
    {
        double[] variances = [.. search.Points.Select(point => point.SampleVariance).Where(double.IsFinite).Order()];
        double sigma = RoundedEstimate.Geometric(variances.Length == 0 ? 1 : Math.Max(Math.Sqrt(variances[variances.Length / 2]), 0.1), 2);
        DetectorLaw law = maker.Scale.Law;
        double peak = RoundedEstimate.Geometric(Math.Sqrt(search.Fit.PeakPower), 2);
        double rawAtPeak = maker.Scale.Counts(peak);
        double amplitudeSigma = sigma * maker.Scale.Slope(rawAtPeak);
        return law.Kind switch
        {
            DetectorKind.SquareLaw => NoiseLaw.ConstantInPower(2 * amplitudeSigma / peak),
            DetectorKind.RmsLog or DetectorKind.LogOfWaveform => new NoiseLaw(0, 0, amplitudeSigma / peak),
            _ => NoiseLaw.ConstantInAmplitude(amplitudeSigma / peak),
        };
    }
}
