using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Tracking;

/// <summary>Worlds and readings for the tracking tests.</summary>
internal static class BenchTracking
{
    /// <summary>The law that the builder of an ordinary virtual box would declare: linear true RMS, pedestal 310 counts.</summary>
    public static DetectorLaw Law { get; } =
        DetectorLaw.Declared(Readings.DetectorKind.RmsLinear, 0.25 / 3.3 * 4095) with { TimeConstantS = 40e-6 };

    public static ReadOptions Options(TimeProvider time, double nearHz = 150_000) =>
        new() { Law = Law, NearHz = nearHz, HostVersion = "test", Time = time };

    public static World World(double feedThrough = 0.05, double phaseDeg = 60, WarmUp? warmUp = null, double f0Hz = 150_000, double q = 200) => new()
    {
        Coil = new VirtualCoil { Modes = [new CoilMode(f0Hz, q)] },
        FeedThrough = new FeedThrough { Fraction = feedThrough, PhaseDeg = phaseDeg },
        Room = new Room { WarmUp = warmUp ?? new WarmUp() },
    };

    public static ReadOutcome Full(BoxSession box, ReadOptions options) =>
        new ReadProcedure(box, options, NoWatch.Instance, CancellationToken.None).Run();
}
