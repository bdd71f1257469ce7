namespace Looseloop.Drift.Comparison;

/// <summary>What two readings say of a change.</summary>
public enum ChangeVerdict
{
    /// <summary>The interval holds both no change and one that would matter, or a reading may not be relied on.</summary>
    CannotTell,

    /// <summary>Any change is smaller than what would matter.</summary>
    NotChanged,

    /// <summary>The change is beyond its expanded uncertainty.</summary>
    Changed,
}
