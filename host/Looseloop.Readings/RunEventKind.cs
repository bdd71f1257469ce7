namespace Looseloop.Readings;

/// <summary>What can happen in a run beside a reading. The numbers stand in records: never change or reuse one.</summary>
public enum RunEventKind
{
    /// <summary>Something worth keeping that has no kind of its own.</summary>
    Note = 0,

    /// <summary>No reading could be taken between two times.</summary>
    Gap = 1,

    /// <summary>Paused: a field is present with the drive off.</summary>
    PausedFieldPresent = 2,

    /// <summary>Reading goes on after a pause.</summary>
    Resumed = 3,

    /// <summary>The box does not answer any more.</summary>
    LinkLost = 4,

    /// <summary>The box answers again and was identified.</summary>
    Reconnected = 5,

    /// <summary>The board has started again: its clock begins anew.</summary>
    BoardReset = 6,

    /// <summary>The settings of the tracked readings were moved after the peak.</summary>
    SettingsChanged = 7,

    /// <summary>An energised run was seen to end: the moment to which a cool-down is extrapolated.</summary>
    FieldEnded = 8,

    /// <summary>A reading was tried and gave none.</summary>
    ReadingFailed = 9,

    /// <summary>f0 and Q at the end of an energised run, extrapolated from the cool-down; From and To are that moment.</summary>
    AtFieldEnd = 10,
}
