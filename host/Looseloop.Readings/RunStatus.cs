namespace Looseloop.Readings;

/// <summary>How a run ended. The numbers stand in records: never change or reuse one.</summary>
public enum RunStatus
{
    /// <summary>It did all it was asked to do.</summary>
    Completed = 0,

    /// <summary>Stopped by the user, or its program ended without a word.</summary>
    Interrupted = 1,

    /// <summary>The box was lost and did not come back.</summary>
    LinkLost = 2,

    /// <summary>It met an error.</summary>
    Fault = 3,
}
