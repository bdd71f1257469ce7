namespace Looseloop.Record;

/// <summary>What a fact is about. The numbers stand in records: never change or reuse one.</summary>
public enum FactSubject
{
    /// <summary>A box: its detector's law, clock trim, pedestal, commissioning.</summary>
    Box = 0,

    /// <summary>A coil: its set-up, the pull found by a standoff.</summary>
    Coil = 1,
}
