using Looseloop.Procedures.Logging;
using Looseloop.Procedures.Tests.Tracking;

namespace Looseloop.Procedures.Tests.Logging;

/// <summary>Runs a log on a socket.</summary>
internal static class LogRun
{
    public static LogOptions Options(TimeProvider time, TimeSpan? forTime, TimeSpan every) => new()
    {
        Read = BenchTracking.Options(time),
        For = forTime,
        Every = every,
    };

    public static LogSummary Run(
        BenchSocket socket, MemorySink sink, TestWatch watch, LogOptions options, CancellationToken cancel = default) =>
        new LogProcedure(socket, options, sink, watch, cancel).Run();
}
