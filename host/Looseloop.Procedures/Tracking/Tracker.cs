using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Tracking;

/// <summary>
/// Follows f0 and Q with five settings a reading, once a full reading has told the curve. It moves the settings after the
/// peak, says when it needs a full reading, and outlives the connection to a box: after a break it goes on where it was.
/// </summary>
public sealed class Tracker(ReadOptions options)
{
    private const int SamplesAMainsPeriod = 100;

    /// <summary>Ring times of dwell: neighbouring settings are up to a bandwidth apart, and the first comes out of silence.</summary>
    private const double Rings = 9;

    /// <summary>Ring times until what is left of the own ring is below a thousandth of a count.</summary>
    private const double RingsToDie = 15;

    private TrackBasis? _basis;
    private IReadOnlyList<Setting> _settings = [];
    private SetDifference _difference;
    private double _f0Hz;
    private double _q;

    /// <summary>True if there is a curve to track on.</summary>
    public bool HasCurve => _basis is not null;

    /// <summary>The last f0 by the settings' own hertz; NaN before the first.</summary>
    public double F0Hz => _basis is null ? double.NaN : _f0Hz;

    /// <summary>The settings of the next tracked reading.</summary>
    public IReadOnlyList<Setting> Settings => _settings;

    /// <summary>Takes over the curve of a full reading.</summary>
    /// <returns>False where it gave no figures: nothing can be tracked then.</returns>
    public bool Begin(ReadOutcome outcome)
    {
        _basis = TrackBasis.From(outcome, options);
        _settings = [];
        if (_basis is null)
        {
            return false;
        }

        _f0Hz = _basis.Curve.F0Hz;
        _q = _basis.Curve.Q;
        _difference = _basis.DifferenceBetweenSets(outcome.Points);
        return true;
    }

    /// <summary>Forgets the curve: the next step asks for a full reading.</summary>
    public void Forget() => _basis = null;

    /// <summary>One tracked reading; two where the settings have to be moved.</summary>
    /// <exception cref="BoxException">The box refused, failed or fell silent.</exception>
    public TrackStep Step(BoxSession box, CancellationToken cancel)
    {
        if (_basis is not { } basis)
        {
            return TrackStep.Ended(TrackEnd.NoCurve);
        }

        if (_settings.Count == 0)
        {
            _settings = About(box, basis);
        }

        TrackEnd end = Take(box, basis, cancel, out TrackedPoints old);
        if (end != TrackEnd.None)
        {
            return TrackStep.Ended(end);
        }

        (_f0Hz, _q) = (old.Fit.F0Hz, old.Fit.Q);
        if (!TrackSettings.HasLeft(box.Grid, _settings, _f0Hz, _f0Hz / _q))
        {
            return new TrackStep([Document(box, basis, old)], TrackEnd.None);
        }

        IReadOnlyList<Setting> before = _settings;
        _settings = About(box, basis);
        if (_settings.SequenceEqual(before))
        {
            // At the edge of what the box may drive there is no better set.
            return new TrackStep([Document(box, basis, old)], TrackEnd.None);
        }

        end = Take(box, basis, cancel, out TrackedPoints moved);
        if (end != TrackEnd.None)
        {
            return new TrackStep([Document(box, basis, old)], end);
        }

        double difference = moved.Fit.F0Hz - old.Fit.F0Hz;
        _difference = _difference.Widened(difference, (moved.Fit.Q / old.Fit.Q) - 1);
        (_f0Hz, _q) = (moved.Fit.F0Hz, moved.Fit.Q);
        return new TrackStep([Document(box, basis, old), Document(box, basis, moved)], TrackEnd.None, difference);
    }

    private IReadOnlyList<Setting> About(BoxSession box, TrackBasis basis) => TrackSettings.About(
        box.Grid, _f0Hz, _f0Hz / _q, basis.Duty, box.Identity.LowestHz, box.Identity.HighestHz);

    private TrackEnd Take(BoxSession box, TrackBasis basis, CancellationToken cancel, out TrackedPoints taken)
    {
        var target = new Target(_f0Hz, _q, basis.Duty);
        double ringS = target.RingTimeS + options.Law.TimeConstantS;
        box.Pause(TimeSpan.FromSeconds(RingsToDie * ringS));
        int dwellUs = CurveSweep.DwellUs(target, options.Law, Rings);
        int spacingUs = (int)Math.Round(1e6 / options.MainsHz / SamplesAMainsPeriod);
        SweepResult sweep = box.Sweep(new SweepRequest(_settings, dwellUs, SamplesAMainsPeriod) { SpacingUs = spacingUs }, cancel: cancel);
        double boardSeconds = sweep.Look.Samples > 0 ? (box.BoardTimeUs - sweep.Look.FromUs) * 1e-6 : double.NaN;
        taken = new TrackedPoints(sweep.Points, sweep.Look, boardSeconds, default);
        if (sweep.Missing > 0)
        {
            return TrackEnd.PointsMissing;
        }

        if (sweep.Points.Any(point => point.Max >= 0.97 * box.Identity.FullCounts))
        {
            return TrackEnd.Saturated;
        }

        if (Disturbed(basis, sweep.Points))
        {
            return TrackEnd.Disturbed;
        }

        if (DarkMoved(basis, sweep.Look))
        {
            return TrackEnd.DarkMoved;
        }

        FitPoint[] points = UnitDrive.Fundamental(CurveSweep.FitPoints(sweep.Points, basis.Maker));
        if (CurveInversion.Invert(basis.Curve, points) is not { } fit)
        {
            return TrackEnd.OtherCurve;
        }

        taken = taken with { Fit = fit };
        return Judge(basis, fit, points);
    }

    private TrackEnd Judge(TrackBasis basis, TrackedFit fit, FitPoint[] points)
    {
        double bandwidth = fit.F0Hz / fit.Q;
        if (fit.F0Hz < _settings[0].FrequencyHz || fit.F0Hz > _settings[^1].FrequencyHz
            || Math.Abs(fit.F0Hz - _f0Hz) > Math.Max(bandwidth, (_settings[^1].FrequencyHz - _settings[0].FrequencyHz) / 2))
        {
            return TrackEnd.PeakLeft;
        }

        return basis.Judge(fit, points);
    }

    /// <summary>Noise of a hundred samples strays by some four standard deviations.</summary>
    private static bool Disturbed(TrackBasis basis, IReadOnlyList<RawPoint> points)
    {
        double[] sigmas = [.. points.Select(point => Math.Sqrt(point.SampleVariance)).Order()];
        double allowed = Math.Max(8 * sigmas[sigmas.Length / 2], 0.02 * basis.PeakCounts);
        return points.Any(point => Math.Max(point.Max - point.Mean, point.Mean - point.Min) > allowed);
    }

    private static bool DarkMoved(TrackBasis basis, DarkLevel look)
    {
        double sigma = Math.Sqrt(look.SampleVariance / look.Samples);
        return Math.Abs(look.Mean - basis.DarkCounts) > (6 * sigma) + (0.004 * basis.PeakCounts);
    }

    private Reading Document(BoxSession box, TrackBasis basis, TrackedPoints taken) =>
        TrackedReading.Document(box.Identity, options, basis, taken, _difference);
}
