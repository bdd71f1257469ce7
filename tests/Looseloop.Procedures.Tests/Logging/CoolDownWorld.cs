using Looseloop.Bench;
using Looseloop.Procedures.Tests.Tracking;

namespace Looseloop.Procedures.Tests.Logging;

/// <summary>
/// A coil that an energised run has warmed: its field sounds in bursts until <paramref name="StopS"/>, then f0 and Q cool
/// down. The truth at the stop is the bench's.
/// </summary>
internal sealed record CoolDownWorld(World World, double StopS)
{
    public static CoolDownWorld Draw(Random random)
    {
        double stopS = 20 + (100 * random.NextDouble());
        double tauS = 300 + (900 * random.NextDouble());
        double periodS = Math.Pow(10, -2 + (1.5 * random.NextDouble())); // 100 bursts a second down to some 3
        World world = BenchTracking.World(0.02 + (0.05 * random.NextDouble()), 360 * random.NextDouble());
        return new CoolDownWorld(
            world with
            {
                Room = world.Room with
                {
                    Carriers = [new Carrier { FrequencyHz = 149_300, Volts = 1, PeriodS = periodS, OnS = 0.05 * periodS, FromS = 0, ToS = stopS }],
                    WarmUp = new WarmUp
                    {
                        StartPpm = -300 - (1200 * random.NextDouble()),
                        TimeS = tauS,
                        StartQPercent = -2 - (4 * random.NextDouble()),
                    },
                },
            },
            stopS);
    }
}
