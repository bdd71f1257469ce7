using Looseloop.Drift;

namespace Looseloop.Procedures.Logging;

/// <summary>f0 and Q at the moment an energised run stopped, extrapolated from the readings after it.</summary>
/// <param name="Utc">The moment.</param>
/// <param name="UncertaintyS">Its standard uncertainty, seconds.</param>
/// <param name="Readings">How many readings carry the extrapolation.</param>
/// <param name="F0">f0; its <see cref="CoolDown.AtStopStandard"/> without <paramref name="F0CommonHz"/>.</param>
/// <param name="Q">Q, or null where its cool-down could not be fitted.</param>
/// <param name="F0CommonHz">What all those readings have in common, standard uncertainty of f0, hertz.</param>
/// <param name="QCommon">The same of Q.</param>
public sealed record FieldEnd(
    DateTimeOffset Utc, double UncertaintyS, int Readings, CoolDown F0, CoolDown? Q, double F0CommonHz, double QCommon)
{
    /// <summary>Combined standard uncertainty of f0 at the stop, hertz.</summary>
    public double F0StandardHz => double.Hypot(F0.AtStopStandard, F0CommonHz);

    /// <summary>Combined standard uncertainty of Q at the stop; NaN without one.</summary>
    public double QStandard => Q is null ? double.NaN : double.Hypot(Q.AtStopStandard, QCommon);
}
