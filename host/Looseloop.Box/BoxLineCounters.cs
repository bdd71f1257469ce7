namespace Looseloop.Box;

/// <summary>What the line to a box has been through since it was opened.</summary>
public sealed class BoxLineCounters
{
    /// <summary>Lines received.</summary>
    public long Lines { get; internal set; }

    /// <summary>Lines that did not pass their checksum or did not parse.</summary>
    public long Damaged { get; internal set; }

    /// <summary>Lines that never arrived, by the box's own count.</summary>
    public long Missing { get; internal set; }

    /// <summary>Answers to requests that had been given up.</summary>
    public long Late { get; internal set; }

    /// <summary>Requests sent again for want of an answer.</summary>
    public long Repeated { get; internal set; }

    /// <summary>Points measured again because their line was lost.</summary>
    public long PointsAskedAgain { get; internal set; }
}
