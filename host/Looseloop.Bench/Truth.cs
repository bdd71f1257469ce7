using System.Numerics;
using Looseloop.Bench.Physics;

namespace Looseloop.Bench;

/// <summary>
/// What a perfect instrument would find in a world, from the exact poles of its circuits: f0 = |s|/(2 pi) and
/// Q = |s|/(-2 Re s) of the pole s that is most the coil's lowest mode.
/// </summary>
public sealed class Truth
{
    private Truth(double f0Hz, double q)
    {
        F0Hz = f0Hz;
        Q = q;
    }

    public double F0Hz { get; }

    public double Q { get; }

    /// <summary>The coil with loop, pickup, box and people away: what the absolute interval of a reading speaks of.</summary>
    /// <param name="world">The world.</param>
    /// <param name="timeS">When, seconds from the world's begin; matters only where it warms up.</param>
    public static Truth Unloaded(World world, double timeS = 0)
    {
        Drift.At(world.Room.WarmUp, timeS, out double f0Scale, out double qScale);
        return Of(Meshes.Unloaded(world, f0Scale, qScale));
    }

    /// <summary>The coil as it stands with loop, pickup, box and people.</summary>
    public static Truth Loaded(World world, double timeS = 0)
    {
        Drift.At(world.Room.WarmUp, timeS, out double f0Scale, out double qScale);
        return Of(Meshes.Loaded(world, f0Scale, qScale));
    }

    private static Truth Of(Meshes meshes)
    {
        var poles = Poles.Of(meshes, PickupSense.Voltage);
        Complex s = poles.Pole[poles.Coil()];
        return new Truth(s.Magnitude / (2 * Math.PI), s.Magnitude / (-2 * s.Real));
    }
}
