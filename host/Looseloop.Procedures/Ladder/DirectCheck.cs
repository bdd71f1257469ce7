using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Ladder;

/// <summary>
/// The detector's law against true power: samples of the buffered waveform at times unrelated to the drive have a variance
/// equal to the power, with no detector at all.
/// </summary>
/// <param name="ByDirect">Ratio of the amplitudes of two rungs by the waveform's scatter.</param>
/// <param name="ByLaw">The same ratio by detector and law.</param>
/// <param name="Uncertainty">Standard uncertainty of their relative difference.</param>
public sealed record DirectCheck(double ByDirect, double ByLaw, double Uncertainty)
{
    private const int Samples = 10_000;

    /// <summary>The waveform's own conversions bend by as much as this, relative (half a per cent each; common practice, no source).</summary>
    private const double ConverterAllowance = 0.005;

    private const double Sigmas = 3;

    /// <summary>Relative difference of the two ratios.</summary>
    public double Difference => (ByLaw / ByDirect) - 1;

    /// <summary>True if they agree within their uncertainty.</summary>
    public bool Agrees => Math.Abs(Difference) <= (Sigmas * Uncertainty) + ConverterAllowance;

    /// <summary>True if a box has the input that this takes.</summary>
    public static bool IsPossible(BoxIdentity box) => (box.Inputs & 2) != 0;

    /// <summary>Takes the waveform at two rungs and with the drive off.</summary>
    /// <param name="box">A box with a direct input.</param>
    /// <param name="high">A rung near the top.</param>
    /// <param name="low">One of about a third of its amplitude.</param>
    /// <param name="maker">The law that was found.</param>
    /// <param name="dwellUs">Dwell after a jump, microseconds.</param>
    /// <param name="cancel">Halts.</param>
    public static DirectCheck Take(
        BoxSession box, RawPoint high, RawPoint low, AmplitudeMaker maker, int dwellUs, CancellationToken cancel)
    {
        DarkLevel dark = box.Dark(500, channel: Channel.Direct, cancel: cancel);
        var request = new SweepRequest([low.Setting, high.Setting], dwellUs, Samples) { Channel = Channel.Direct };
        IReadOnlyList<RawPoint> points = box.Sweep(request, cancel: cancel).Points;
        return Of(points[0], points[1], dark, maker.Make(low), maker.Make(high));
    }

    /// <summary>From what was measured.</summary>
    /// <param name="low">The waveform at the lower rung.</param>
    /// <param name="high">The waveform at the higher rung.</param>
    /// <param name="dark">The waveform with the drive off.</param>
    /// <param name="lowByLaw">The lower rung by the detector.</param>
    /// <param name="highByLaw">The higher rung by the detector.</param>
    public static DirectCheck Of(RawPoint low, RawPoint high, DarkLevel dark, AmplitudePoint lowByLaw, AmplitudePoint highByLaw)
    {
        double highPower = high.SampleVariance - dark.SampleVariance;
        double lowPower = low.SampleVariance - dark.SampleVariance;

        // Relative SD of the variance of n samples of a sine is 1/sqrt(2 n), of its root half that; noise adds its own.
        double Relative(RawPoint point, double power) =>
            Math.Sqrt((0.125 + ((dark.SampleVariance / power) * (1 + (dark.SampleVariance / power / 2)))) / point.Samples);
        double law = double.Hypot(Math.Sqrt(lowByLaw.Variance) / lowByLaw.Amplitude, Math.Sqrt(highByLaw.Variance) / highByLaw.Amplitude);
        return new DirectCheck(
            Math.Sqrt(highPower / lowPower), highByLaw.Amplitude / lowByLaw.Amplitude,
            double.Hypot(double.Hypot(Relative(high, highPower), Relative(low, lowPower)), law));
    }
}
