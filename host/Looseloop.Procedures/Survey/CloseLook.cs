using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Readings;

namespace Looseloop.Procedures.Survey;

/// <summary>
/// Looks properly at one maximum of a survey: three settings about it and one to either side, settled, at duty 1/2 and at
/// duty 1/5. What stands beside the maximum is taken off in power, so feed-through does not blur the ratio.
/// </summary>
public static class CloseLook
{
    private const double HighDuty = 0.5;
    private const double LowDuty = 0.2;
    private const int StepsAside = 6;
    private const int Samples = 16;
    private const double RingsToSettle = 7;
    private const double QToSettle = 400;

    /// <summary>A sweep runs ahead of the ring: the settled maximum may lie some steps from where the survey saw it.</summary>
    private const int MostMoves = 2;
    private const double SigmasToFollow = 3;
    private const double SigmasToMove = 2;
    private const int Middle = 2;

    /// <summary>What the look found.</summary>
    /// <param name="High">The setting of the maximum, duty 1/2.</param>
    /// <param name="Low">The same at duty 1/5.</param>
    /// <param name="Amplitude">Amplitude over its surroundings at duty 1/2, counts; not above 0 if nothing is there.</param>
    /// <param name="Sigma">Its standard uncertainty.</param>
    /// <param name="Ratio">Amplitude at 1/5 over that at 1/2.</param>
    /// <param name="RatioUncertainty">Its standard uncertainty.</param>
    /// <param name="IsMaximum">False if the level still rose where the look ended: a slope of something else.</param>
    public sealed record Finding(
        Setting High, Setting Low, double Amplitude, double Sigma, double Ratio, double RatioUncertainty, bool IsMaximum);

    /// <summary>Looks at the maximum near a frequency, and follows it to where it settles.</summary>
    public static Finding Run(BoxSession box, AmplitudeMaker maker, double frequencyHz, CancellationToken cancel)
    {
        Setting centre = box.Grid.Nearest(frequencyHz, HighDuty);
        for (int move = 0; ; move++)
        {
            Finding finding = At(box, maker, centre, cancel);
            bool maximum = finding.High.FrequencyHz == centre.FrequencyHz;

            // Where nothing stands there is nothing to follow.
            if (maximum || move == MostMoves || !(finding.Amplitude > SigmasToFollow * finding.Sigma))
            {
                return finding with { IsMaximum = maximum };
            }

            centre = finding.High;
        }
    }

    private static Finding At(BoxSession box, AmplitudeMaker maker, Setting centre, CancellationToken cancel)
    {
        int[] steps = [-StepsAside, -1, 0, 1, StepsAside];
        Setting[] high = [.. steps.Select(step => SettingGrid.WithDuty(box.Grid.Steps(centre, step), HighDuty))];
        Setting[] low = [.. high.Select(setting => SettingGrid.WithDuty(setting, LowDuty))];
        double tauS = QToSettle / (Math.PI * centre.FrequencyHz);
        int dwellUs = (int)(1e6 * RingsToSettle * (tauS + maker.Scale.Law.TimeConstantS));
        SweepResult result = box.Sweep(new SweepRequest([.. high, .. low], dwellUs, Samples), cancel: cancel);
        Power[] powers = new Power[high.Length * 2];
        foreach (RawPoint point in result.Points)
        {
            int index = Array.IndexOf(high, point.Setting);
            index = index >= 0 ? index : high.Length + Array.IndexOf(low, point.Setting);
            AmplitudePoint made = maker.Make(point);
            powers[index] = new Power(made.Amplitude * Math.Abs(made.Amplitude), 4 * made.Amplitude * made.Amplitude * made.Variance);
        }

        int best = Enumerable.Range(1, 3).MaxBy(i => powers[i].Value);

        // A flat top does not wander with the noise.
        double gain = powers[best].Value - powers[Middle].Value;
        best = gain < SigmasToMove * Math.Sqrt(powers[best].Variance + powers[Middle].Variance) ? Middle : best;
        Power over = powers[best].Over(powers[0], powers[4]);
        Power overLow = powers[best + 5].Over(powers[5], powers[9]);
        double amplitude = Math.Sign(over.Value) * Math.Sqrt(Math.Abs(over.Value));
        double ratio = over.Value > 0 ? Math.Sqrt(Math.Max(overLow.Value, 0) / over.Value) : double.NaN;
        double relative = ratio > 0
            ? 0.5 * Math.Sqrt((over.Variance / (over.Value * over.Value)) + (overLow.Variance / (overLow.Value * overLow.Value)))
            : 1;
        double floor = over.Value > 0 ? Math.Sqrt(Math.Sqrt(overLow.Variance) / over.Value) : double.PositiveInfinity;
        return new Finding(
            high[best], low[best], amplitude, Math.Sqrt(over.Variance) / (2 * Math.Max(Math.Abs(amplitude), 1e-9)), ratio,
            Math.Min(ratio > 0 ? ratio * relative : double.PositiveInfinity, floor), true);
    }

    /// <summary>A squared amplitude and its variance.</summary>
    private readonly record struct Power(double Value, double Variance)
    {
        public Power Over(Power left, Power right) =>
            new(Value - (0.5 * (left.Value + right.Value)), Variance + (0.25 * (left.Variance + right.Variance)));
    }
}
