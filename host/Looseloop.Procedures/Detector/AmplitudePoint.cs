using Looseloop.Readings;

namespace Looseloop.Procedures.Detector;

/// <summary>A raw point as an amplitude at the detector.</summary>
/// <param name="Raw">The point.</param>
/// <param name="Amplitude">Amplitude with the dark power taken off, counts of a linear detector; may be negative in noise.</param>
/// <param name="Variance">Variance of that, same unit squared, above 0.</param>
public readonly record struct AmplitudePoint(RawPoint Raw, double Amplitude, double Variance)
{
    /// <summary>Variance of the power where the output is power itself, unit to the fourth; NaN otherwise.</summary>
    public double PowerVariance { get; init; } = double.NaN;
}

/// <summary>Turns raw points into amplitudes: pedestal off at the output, law, then noise and carriers off as power.</summary>
public sealed class AmplitudeMaker
{
    private readonly DetectorScale _scale;
    private readonly double _darkPower;

    /// <param name="scale">The detector's law.</param>
    /// <param name="darkCounts">Raw counts with the drive off.</param>
    public AmplitudeMaker(DetectorScale scale, double darkCounts)
    {
        _scale = scale;
        double dark = scale.Amplitude(darkCounts);
        _darkPower = dark * Math.Abs(dark);
    }

    public DetectorScale Scale => _scale;

    /// <summary>One point.</summary>
    /// <param name="raw">The raw point.</param>
    /// <param name="sampleVariance">Variance of one sample, counts squared, where the point's own is unknown or not wanted.</param>
    public AmplitudePoint Make(RawPoint raw, double? sampleVariance = null)
    {
        double level = _scale.Amplitude(raw.Mean);
        double power = (level * Math.Abs(level)) - _darkPower;
        double amplitude = Math.Sign(power) * Math.Sqrt(Math.Abs(power));

        // d(amplitude)/d(level) = level/amplitude grows without bound where the dark power is all there is.
        double gain = Math.Min(Math.Abs(level) / Math.Max(Math.Abs(amplitude), 1e-9), 3);
        double slope = _scale.Slope(raw.Mean) * Math.Max(gain, 1);
        double own = sampleVariance ?? raw.SampleVariance;
        double variance = Math.Max(double.IsNaN(own) ? SampleStatistics.QuantisationVariance : own, SampleStatistics.QuantisationVariance);

        // Rounding averages out only where the scatter is at least half a count (Widrow and Kollar, Quantization Noise, 2008).
        double meanVariance = (variance / raw.Samples) + (variance < 0.3 ? SampleStatistics.QuantisationVariance : 0);
        double reference = _scale.Law.ReferenceCounts;
        return new AmplitudePoint(raw, amplitude, slope * slope * meanVariance)
        {
            PowerVariance = _scale.Law.Kind == DetectorKind.SquareLaw ? meanVariance * reference * reference : double.NaN,
        };
    }
}
