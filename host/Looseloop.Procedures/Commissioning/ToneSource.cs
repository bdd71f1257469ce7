namespace Looseloop.Procedures.Commissioning;

/// <summary>How a tone source at the pickup sounds.</summary>
public enum ToneSource
{
    Off,
    Steady,

    /// <summary>One millisecond in every 200: a coil that is run in bursts.</summary>
    Chopped,
}
