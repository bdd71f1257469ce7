namespace Looseloop.Readings;

/// <summary>
/// What was found out about boxes and holds until it is found again: kept under the name that the user calls the box by
/// (its port, or the name given to it). What was found before stays on record; the latest is given back.
/// </summary>
public interface IBoxFacts
{
    /// <summary>The detector's law as a ladder last read it, or null where none did.</summary>
    DetectorLaw? LawOf(string box);

    /// <summary>The clock's error as last found, or null where it never was.</summary>
    ClockTrim? ClockOf(string box);

    /// <summary>All commissionings of a box, the oldest first.</summary>
    IReadOnlyList<CommissioningRecord> CommissioningsOf(string box);

    /// <summary>Keeps a law that a ladder has read. A call that returns has kept it.</summary>
    void Keep(string box, DetectorLaw law);

    /// <summary>Keeps a clock's error. A call that returns has kept it.</summary>
    void Keep(string box, ClockTrim trim);

    /// <summary>Keeps a commissioning beside those before it. A call that returns has kept it.</summary>
    void Keep(string box, CommissioningRecord commissioning);
}
