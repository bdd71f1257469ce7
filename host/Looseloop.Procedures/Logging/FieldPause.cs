using Looseloop.Box;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// A pause because a field is present. It looks on without a break, so that an interrupted field is seen whenever it sounds
/// and its end is known to a fraction of a second; it never drives.
/// </summary>
internal sealed class FieldPause(DateTimeOffset seen, LimitsAnswer limits, TimeSpan lockOut)
{
    private const int LookMs = 250;

    private DateTimeOffset _lastFieldFrom = seen;
    private DateTimeOffset? _quietFrom;

    /// <summary>When the field was first seen.</summary>
    public DateTimeOffset From { get; } = seen;

    /// <summary>The earliest moment at which the field can have ended: the begin of the last look that saw it.</summary>
    public DateTimeOffset EndedAfter => _lastFieldFrom;

    /// <summary>The latest: the begin of the first look that did not.</summary>
    public DateTimeOffset EndedBefore => _quietFrom ?? _lastFieldFrom;

    /// <summary>True if a look saw a field, by the box's own rule.</summary>
    public static bool Sees(DarkLevel level, LimitsAnswer limits, BoxSession box) =>
        level.Max > limits.PedestalCounts + limits.FieldCounts || level.Max >= box.Identity.FullCounts;

    /// <summary>Looks once more.</summary>
    /// <returns>True once no field has been seen for the lock-out's time.</returns>
    public bool Look(BoxSession box, CancellationToken cancel)
    {
        DarkLevel level = box.Dark(LookMs, cancel: cancel);
        DateTimeOffset now = box.Time.GetUtcNow();
        DateTimeOffset begun = now - TimeSpan.FromMicroseconds(level.ToUs - level.FromUs);
        if (Sees(level, limits, box))
        {
            _lastFieldFrom = begun;
            _quietFrom = null;
            return false;
        }

        _quietFrom ??= begun;
        return now - _quietFrom >= lockOut;
    }
}
