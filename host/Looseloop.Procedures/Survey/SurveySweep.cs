using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Survey;

/// <summary>Every setting of a range once, quickly: short dwell, few samples, packed lines.</summary>
public static class SurveySweep
{
    private const int Samples = 4;
    private const int PointsPerLine = 12;

    /// <summary>A ring is given about this Q's time to build up: longer would cost seconds and show nothing more.</summary>
    private const double QToSettle = 300;

    /// <summary>Nor is a slow detector waited for at every setting: it lags by a setting, which the close look follows.</summary>
    private const double LongestForDetectorS = 1e-3;

    /// <summary>Default range, hertz.</summary>
    public const double LowHz = 30_000;

    /// <summary>Default range, hertz.</summary>
    public const double HighHz = 600_000;

    /// <summary>Sweeps a range upwards.</summary>
    /// <returns>Raw points ascending in frequency, and the dark level of the look before the first.</returns>
    public static (IReadOnlyList<RawPoint> Points, DarkLevel Look) Run(
        BoxSession box, DetectorLaw law, double lowHz, double highHz, double duty, IWatch watch, CancellationToken cancel)
    {
        IReadOnlyList<Setting> settings = box.Grid.Between(lowHz, highHz, duty);
        watch.Begin($"surveying {settings.Count} settings from {lowHz / 1000:0.#} to {highHz / 1000:0.#} kHz", settings.Count * 0.0035);
        var points = new List<RawPoint>(settings.Count);
        DarkLevel look = default;
        foreach (IGrouping<int, Setting> octave in settings.GroupBy(setting => setting.DutyBits))
        {
            double centreHz = octave.First().FrequencyHz * Math.Sqrt(2);
            int dwellUs = (int)(1e6 * ((QToSettle / (Math.PI * centreHz)) + Math.Min(2 * law.TimeConstantS, LongestForDetectorS)));
            var request = new SweepRequest([.. octave], dwellUs, Samples) { Pack = PointsPerLine };
            SweepResult result = box.Sweep(request, _ => watch.Progress((double)(points.Count + 1) / settings.Count), cancel);
            look = look.Samples == 0 ? result.Look : look;
            points.AddRange(result.Points);
        }

        return ([.. points.OrderBy(point => point.Setting.FrequencyHz)], look);
    }

    /// <summary>The points as amplitudes, with the noise of the look.</summary>
    public static IReadOnlyList<SurveyPoint> Amplitudes(IReadOnlyList<RawPoint> points, AmplitudeMaker maker, double sampleVariance) =>
        [.. points.Select(point => maker.Make(point, sampleVariance)).Select(made => new SurveyPoint(made.Raw.Setting.FrequencyHz, made.Amplitude, Math.Sqrt(made.Variance)))];
}
