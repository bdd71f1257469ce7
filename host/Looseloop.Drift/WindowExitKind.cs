namespace Looseloop.Drift;

/// <summary>What a warm-up does to a window.</summary>
public enum WindowExitKind
{
    /// <summary>No model tells where the value goes.</summary>
    NotDeterminable,

    /// <summary>It stays inside, by more than twice the uncertainty.</summary>
    Stays,

    /// <summary>It leaves, or has left, at a stated time.</summary>
    Leaves,

    /// <summary>It ends so near an edge that it may stay or leave.</summary>
    MayLeave,

    /// <summary>It is outside from the start.</summary>
    Outside,
}
