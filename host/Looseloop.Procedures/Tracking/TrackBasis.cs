using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>What tracked readings take over from the full reading before them.</summary>
internal sealed class TrackBasis
{
    /// <summary>A residual this small, of the peak, moves f0 and Q by less than the interval allows.</summary>
    private const double HarmlessResidual = 0.004;

    private TrackBasis(ReadOutcome outcome, HeldCurve curve, ReadOptions options)
    {
        Reading reading = outcome.Reading;
        Reading = reading;
        Curve = curve;
        Duty = reading.Points.MinBy(point => Math.Abs(point.Setting.FrequencyHz - curve.F0Hz)).Setting.Duty;
        DarkCounts = reading.Dark.Average(dark => dark.Mean);
        Maker = new AmplitudeMaker(new DetectorScale(reading.Basis?.Law ?? options.Law), DarkCounts);
        PeakCounts = reading.Points.Max(point => point.Mean) - DarkCounts;
    }

    public Reading Reading { get; }

    public HeldCurve Curve { get; }

    public double Duty { get; }

    /// <summary>Raw counts with the drive off.</summary>
    public double DarkCounts { get; }

    /// <summary>The highest point over the dark, raw counts.</summary>
    public double PeakCounts { get; }

    public AmplitudeMaker Maker { get; }

    /// <summary>The basis that a full reading makes, or null where it gave no figures.</summary>
    public static TrackBasis? From(ReadOutcome outcome, ReadOptions options)
    {
        bool figures = outcome.Fit is { IsFitted: true } && double.IsFinite(outcome.Reading.F0Hz)
            && outcome.Reading.Points.Count > 0 && outcome.Reading.Dark.Count > 0;
        if (!figures || HeldCurve.From(outcome.Fit!.Value, UnitDrive.Fundamental(outcome.Points), options.PrefactorExponent) is not { } curve)
        {
            return null;
        }

        return new TrackBasis(outcome, curve, options);
    }

    /// <summary>
    /// By how much f0 and Q differ between sets of settings one step apart: the full reading's own points, taken five at a
    /// time about f0 and one step beside it. What the first change of settings would show.
    /// </summary>
    public SetDifference DifferenceBetweenSets(IReadOnlyList<FitPoint> points)
    {
        FitPoint[] settings = [.. UnitDrive.Fundamental(points).GroupBy(point => point.FrequencyHz).Select(Mean).OrderBy(point => point.FrequencyHz)];
        int nearest = 0;
        for (int i = 1; i < settings.Length; i++)
        {
            bool nearer = Math.Abs(settings[i].FrequencyHz - Curve.F0Hz) < Math.Abs(settings[nearest].FrequencyHz - Curve.F0Hz);
            nearest = nearer ? i : nearest;
        }

        var found = new List<TrackedFit>();
        for (int beside = -1; beside <= 1; beside++)
        {
            int first = nearest + beside - (TrackSettings.Count / 2);
            if (first >= 0 && first + TrackSettings.Count <= settings.Length
                && CurveInversion.Invert(Curve, settings.AsSpan(first, TrackSettings.Count)) is { } fit)
            {
                found.Add(fit);
            }
        }

        return found.Count < 2
            ? default
            : new SetDifference(found.Max(fit => fit.F0Hz) - found.Min(fit => fit.F0Hz), (found.Max(fit => fit.Q) / found.Min(fit => fit.Q)) - 1);
    }

    /// <summary>Whether a fit of a few settings still belongs to this curve.</summary>
    /// <param name="fit">The fit.</param>
    /// <param name="points">Its points, at drive weight 1.</param>
    public TrackEnd Judge(TrackedFit fit, FitPoint[] points)
    {
        double amplitude = fit.Scale * fit.Q / Curve.Q;
        if (amplitude is < 0.7 or > 1.4 || fit.Q / Curve.Q is < 0.8 or > 1.25)
        {
            return TrackEnd.FarFromCurve;
        }

        double noise = Math.Sqrt(points.Average(point => point.Variance)) / (amplitude * Math.Sqrt(Curve.PeakPower));
        return fit.ResidualRatio > Math.Max(HarmlessResidual, 5 * noise) ? TrackEnd.OtherCurve : TrackEnd.None;
    }

    private static FitPoint Mean(IEnumerable<FitPoint> same)
    {
        double sum = 0;
        double variance = 0;
        int count = 0;
        FitPoint any = default;
        foreach (FitPoint point in same)
        {
            any = point;
            sum += point.Amplitude;
            variance += point.Variance;
            count++;
        }

        return any with { Amplitude = sum / count, Variance = variance / count / count };
    }
}
