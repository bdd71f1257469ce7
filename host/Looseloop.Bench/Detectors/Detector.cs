using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench.Detectors;

/// <summary>A detector on the waveform of a <see cref="CoilResponse"/>, with memory: its low-pass.</summary>
internal abstract class Detector
{
    protected Detector(World world, CoilResponse response)
    {
        Parameters = world.Detector;
        Response = response;
    }

    protected DetectorParameters Parameters { get; }

    protected CoilResponse Response { get; }

    /// <summary>Must be called before the response changes: takes the detector to the end of the stretch.</summary>
    public abstract void Leave(double timeS);

    /// <summary>Must be called after the response has changed.</summary>
    public abstract void Enter(double timeS);

    /// <summary>
    /// The output above the pedestal, volts, before its ceiling. Times must not run backwards.
    /// </summary>
    /// <param name="timeS">When.</param>
    /// <param name="extraPower">Power of what does not come from the drive, already low-passed, volts squared.</param>
    /// <param name="scale">What the input is multiplied by (hum that modulates it); 1 otherwise.</param>
    public abstract double Output(double timeS, double extraPower, double scale);

    /// <summary>True if the output of this stretch no longer changes by itself.</summary>
    public abstract bool Settled(double timeS);

    public static Detector Of(World world, CoilResponse response) => world.Detector.Kind switch
    {
        DetectorKind.RmsLinear or DetectorKind.RmsLog or DetectorKind.Square => new PowerDetector(world, response),
        _ => new WaveformDetector(world, response),
    };

    /// <summary>The logarithmic output for a mean power, volts.</summary>
    protected double LogOutput(double power)
    {
        double decibel = (10 * Math.Log10(Math.Max(power, 1e-18))) - Parameters.InterceptDbV;
        return Math.Max(decibel, 0) * Parameters.MvPerDb * 1e-3;
    }

    protected static Complex Exp(Complex z)
    {
        if (z.Real < -700)
        {
            return Complex.Zero;
        }

        double size = Math.Exp(z.Real);
        (double sin, double cos) = Math.SinCos(z.Imaginary);
        return new Complex(size * cos, size * sin);
    }
}
