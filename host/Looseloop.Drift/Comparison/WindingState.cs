namespace Looseloop.Drift.Comparison;

/// <summary>What the change of Q and f0 says of the winding.</summary>
public enum WindingState
{
    /// <summary>The readings do not tell.</summary>
    CannotTell,

    /// <summary>Q did not fall by what would make the winding suspect.</summary>
    NotSuspect,

    /// <summary>Q fell, f0 did not rise: more loss (damp or dirty former, bad earth, a conductor near).</summary>
    MoreLoss,

    /// <summary>Q fell and f0 rose: as a shorted turn does, which takes inductance away.</summary>
    ShortedTurn,
}
