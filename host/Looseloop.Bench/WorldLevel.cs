using Looseloop.Bench.Physics;

namespace Looseloop.Bench;

/// <summary>Sets a world's level, as somebody does who moves the pickup until the reading looks right.</summary>
public static class WorldLevel
{
    /// <summary>The detector's settled output at the coil's f0 as it stands, raw counts, without noise.</summary>
    /// <param name="world">The world.</param>
    /// <param name="duty">The drive's duty.</param>
    public static double PeakCounts(this World world, double duty = 0.5)
    {
        var scene = new Scene(world with { Room = world.Room with { WarmUp = new WarmUp() } }, 1);
        scene.Drive(0, scene.Response.F0Hz, duty);
        return scene.DetectorVolts(10) * Converter.Full / world.Converter.FullScaleVolts;
    }

    /// <summary>
    /// The same world with the buffer's gain changed so that the peak reads a number of raw counts, the pedestal included.
    /// Coupling and pull stay as they are.
    /// </summary>
    /// <param name="world">The world.</param>
    /// <param name="counts">Raw counts at f0, more than the pedestal's.</param>
    /// <param name="duty">The drive's duty there.</param>
    public static World WithPeakCounts(this World world, double counts, double duty = 0.5)
    {
        double low = 1e-6;
        double high = 1e6;
        for (int i = 0; i < 60; i++)
        {
            double middle = Math.Sqrt(low * high);
            if (PeakCounts(WithGain(world, middle), duty) < counts)
            {
                low = middle;
            }
            else
            {
                high = middle;
            }
        }

        return WithGain(world, Math.Sqrt(low * high));
    }

    private static World WithGain(World world, double gain) => world with { Pickup = world.Pickup with { Gain = gain } };
}
