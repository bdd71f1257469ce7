namespace Looseloop.Bench.Physics;

/// <summary>Where a warming coil stands at a time.</summary>
internal static class Drift
{
    public static bool Any(WarmUp warmUp) =>
        warmUp.StartPpm != 0 || warmUp.PpmPerHour != 0 || warmUp.StartQPercent != 0 || warmUp.QPercentPerHour != 0;

    /// <summary>By what f0 and Q are multiplied, a time in seconds after the world's begin.</summary>
    public static void At(WarmUp warmUp, double timeS, out double f0Scale, out double qScale)
    {
        double left = Math.Exp(-timeS / warmUp.TimeS);
        double hours = timeS / 3600;
        f0Scale = 1 + (1e-6 * ((warmUp.StartPpm * left) + (warmUp.PpmPerHour * hours)));
        qScale = 1 + (0.01 * ((warmUp.StartQPercent * left) + (warmUp.QPercentPerHour * hours)));
    }
}
