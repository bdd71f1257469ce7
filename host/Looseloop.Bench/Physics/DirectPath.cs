using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>
/// The feed-through's transfer from drive to detector, fixed by its ratio to the coil's own transfer at the coil's f0 when
/// the world began. Its own transients last microseconds at most and are left out.
/// </summary>
internal sealed class DirectPath
{
    private readonly FeedThroughTransfer _transfer;
    private readonly double _f0Omega;
    private readonly double _poleOmega;
    private readonly Complex _atF0;

    public DirectPath(FeedThrough parameters, double f0Hz, Complex coilAtF0)
    {
        _transfer = parameters.Transfer;
        _f0Omega = 2 * Math.PI * f0Hz;
        _poleOmega = 2 * Math.PI * parameters.PoleHz;
        _atF0 = Complex.FromPolarCoordinates(parameters.Fraction, parameters.PhaseDeg * Math.PI / 180) * coilAtF0;
    }

    /// <summary>The transfer at an angular frequency, detector volts for each volt of the drive.</summary>
    public Complex At(double omega) => _transfer switch
    {
        FeedThroughTransfer.Rising => _atF0 * (omega / _f0Omega),
        FeedThroughTransfer.Pole => _atF0 * new Complex(1, _f0Omega / _poleOmega) / new Complex(1, omega / _poleOmega),
        _ => _atF0,
    };
}
