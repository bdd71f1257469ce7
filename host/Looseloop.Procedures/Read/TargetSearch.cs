using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>
/// Goes from a rough frequency to a first f0 and Q: quick sweeps about it, wider for a low Q, longer for a high one, at the
/// highest duty that keeps the converter inside its range.
/// </summary>
public static class TargetSearch
{
    private const int Samples = 10;
    private const int PointsEachSide = 12;
    private const int Rounds = 4;
    private const double FirstQ = 250;

    /// <summary>The span wanted to either side, bandwidths.</summary>
    private const double HalfSpan = 4;

    /// <summary>Tops above this share of the converter's range bend (its upper end is not straight, nor are detectors').</summary>
    public const double UsableShare = 0.74;

    /// <summary>Duties to try in turn. 1/3 silences the third harmonic, which a power detector would rather not see.</summary>
    public static IReadOnlyList<double> Duties(DetectorLaw law) =>
        law.RespondsToPower ? [1 / 3.0, 1 / 6.0, 1 / 12.0, 1 / 24.0] : [0.5, 0.25, 0.125, 0.0625];

    /// <summary>What the search came to.</summary>
    /// <param name="Target">The first idea, or null where there is no resonance.</param>
    /// <param name="Outcome">How the last fit ended.</param>
    /// <param name="Saturated">True if the converter is at its upper end even at the lowest duty.</param>
    /// <param name="Points">The points of the last sweep.</param>
    /// <param name="Fit">The last fit, amplitudes over drive weights.</param>
    public sealed record Result(Target? Target, FitOutcome Outcome, bool Saturated, IReadOnlyList<RawPoint> Points, ResonanceFit Fit);

    /// <summary>Searches.</summary>
    /// <param name="box">The box.</param>
    /// <param name="maker">Its law and zero.</param>
    /// <param name="aboutHz">Where.</param>
    /// <param name="options">Prefactor and the like.</param>
    /// <param name="cancel">Halts.</param>
    public static Result Run(BoxSession box, AmplitudeMaker maker, double aboutHz, ReadOptions options, CancellationToken cancel)
    {
        DetectorLaw law = maker.Scale.Law;
        IReadOnlyList<double> duties = Duties(law);
        double stepHz = StepHz(box.Grid, aboutHz);
        var target = new Target(aboutHz, FirstQ, duties[0]);
        var fit = new ResonanceFit();
        IReadOnlyList<RawPoint> points = [];
        int duty = 0;
        bool saturated = false;
        for (int round = 0; round < Rounds; round++)
        {
            int stride = (int)Math.Clamp(Math.Ceiling(HalfSpan * target.BandwidthHz / (PointsEachSide * stepHz)), 1, 40);
            IReadOnlyList<Setting> settings = Inside(box, CurveSweep.About(box.Grid, target.F0Hz, PointsEachSide, stride, duties[duty]));
            points = box.Sweep(new SweepRequest(settings, CurveSweep.DwellUs(target, law), Samples), cancel: cancel).Points;
            saturated = points.Any(point => point.Max > UsableShare * box.Identity.FullCounts);
            if (saturated && duty + 1 < duties.Count)
            {
                duty++;
                round--;
                continue;
            }

            fit = Fit(points, maker, options);
            if (!fit.IsFitted)
            {
                // A curve much wider than the sweep is flat in it: look once over a wide span before giving up.
                if (round == 0)
                {
                    target = target with { Q = FirstQ / 8 };
                    continue;
                }

                return new Result(null, fit.Outcome, saturated, points, fit);
            }

            double q = Math.Clamp(fit.Q, 3, 5000);
            bool agrees = Math.Abs(Math.Log(q / target.Q)) < 0.4 && Math.Abs(fit.F0Hz - target.F0Hz) < 2 * fit.BandwidthHz;
            target = new Target(fit.F0Hz, q, duties[duty]);
            if (agrees)
            {
                break;
            }
        }

        return new Result(target, fit.Outcome, saturated, points, fit);
    }

    /// <summary>The grid's step near a frequency, hertz.</summary>
    public static double StepHz(SettingGrid grid, double frequencyHz)
    {
        Setting near = grid.Nearest(frequencyHz, 0.5);
        return grid.Steps(near, 1).FrequencyHz - near.FrequencyHz;
    }

    private static ResonanceFit Fit(IReadOnlyList<RawPoint> points, AmplitudeMaker maker, ReadOptions options)
    {
        FitPoint[] fitPoints = CurveSweep.FitPoints(points, maker);
        ResonanceFit full = ResonanceFitter.FitOnce(fitPoints, new FitOptions { PrefactorExponent = options.PrefactorExponent });
        if (full.IsFitted && full.QRelativeStandard < 0.3)
        {
            return full;
        }

        // On a grid too coarse to tell the feed-through, the plain curve still says where to look.
        ResonanceFit plain = ResonanceFitter.FitOnce(
            fitPoints, new FitOptions { PrefactorExponent = options.PrefactorExponent, Background = BackgroundModel.None });
        return plain.IsFitted ? plain : full;
    }

    private static IReadOnlyList<Setting> Inside(BoxSession box, IReadOnlyList<Setting> settings) =>
        [.. settings.Where(setting => setting.FrequencyHz >= box.Identity.LowestHz && setting.FrequencyHz <= box.Identity.HighestHz)];
}
