using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>
/// The harmonics of a pulse train with linear edges, exactly. Phasor h of v(t) = v0 + Re sum V_h e^(j h w t) with t = 0 at the
/// middle of the rising edge: V_h = swing (sinc(h f rise) - e^(-j 2 pi h D) sinc(h f fall)) / (j pi h). Of sharp edges
/// |V_h| = 2 swing |sin(pi h D)| / (pi h).
/// </summary>
internal static class SquareWave
{
    /// <summary>Fills the phasors 1.. of a setting, volts.</summary>
    /// <param name="stage">The drive stage.</param>
    /// <param name="frequencyHz">The true frequency.</param>
    /// <param name="duty">The timer's duty, 0..1; the stage's longer high time is added here.</param>
    /// <param name="phasors">Where phasor h goes, at index h; index 0 becomes the mean.</param>
    public static void Fill(DriveStage stage, double frequencyHz, double duty, Complex[] phasors)
    {
        double high = Math.Clamp(duty + (stage.HighExtraNs * 1e-9 * frequencyHz), 0, 1);
        phasors[0] = stage.SwingVolts * high;
        (double sin, double cos) = Math.SinCos(-2 * Math.PI * high);
        var turn = new Complex(cos, sin);
        Complex power = 1;
        for (int h = 1; h < phasors.Length; h++)
        {
            power *= turn;
            double x = Math.PI * h * frequencyHz * 1e-9;
            Complex edges = Sinc(x * stage.RiseNs) - (power * Sinc(x * stage.FallNs));
            phasors[h] = new Complex(edges.Imaginary, -edges.Real) * (stage.SwingVolts / (Math.PI * h));
        }
    }

    private static double Sinc(double x) => Math.Abs(x) < 1e-4 ? 1 - (x * x / 6) : Math.Sin(x) / x;
}
