using Looseloop.Resonance;

namespace Looseloop.Procedures.Detector;

/// <summary>
/// The true strength of the drive at a duty, against that at duty 1/2, where uneven edges change nothing to first order:
/// from amplitudes at the same settings and both duties. Uneven edges lengthen the high time by the same nanoseconds at
/// every setting, so near one frequency one factor serves all.
/// </summary>
/// <param name="Factor">True drive weight over the one computed from the duty count.</param>
/// <param name="Uncertainty">Its standard uncertainty.</param>
public readonly record struct EdgeWeight(double Factor, double Uncertainty)
{
    /// <summary>Nothing measured, nothing corrected.</summary>
    public static EdgeWeight None { get; } = new(1, 0);

    /// <summary>Measures it.</summary>
    /// <param name="points">Fundamental points at the duty in question.</param>
    /// <param name="atHalf">The same frequencies near duty 1/2.</param>
    public static EdgeWeight Of(IEnumerable<AmplitudePoint> points, IEnumerable<AmplitudePoint> atHalf)
    {
        var half = atHalf.ToDictionary(point => point.Raw.Setting.FrequencyHz);
        double sum = 0;
        double weights = 0;
        foreach (AmplitudePoint point in points)
        {
            if (!half.TryGetValue(point.Raw.Setting.FrequencyHz, out AmplitudePoint other) || !(point.Amplitude > 0) || !(other.Amplitude > 0))
            {
                continue;
            }

            double measured = point.Amplitude / other.Amplitude;
            double computed = DutyHarmonics.DriveWeight(1, point.Raw.Setting.Duty) / DutyHarmonics.DriveWeight(1, other.Raw.Setting.Duty);
            double relative = (point.Variance / (point.Amplitude * point.Amplitude)) + (other.Variance / (other.Amplitude * other.Amplitude));
            sum += measured / computed / relative;
            weights += 1 / relative;
        }

        return weights > 0 ? new EdgeWeight(sum / weights, Math.Sqrt(1 / weights)) : None;
    }
}
