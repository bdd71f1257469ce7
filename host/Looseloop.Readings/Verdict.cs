namespace Looseloop.Readings;

/// <summary>How far a reading may be trusted.</summary>
public enum Verdict
{
    /// <summary>No figure: nothing that could be called f0 and Q was found, or giving one would mislead.</summary>
    None,

    /// <summary>Figures are given, and the reasons say why not to rely on them.</summary>
    Doubtful,

    /// <summary>The figures and their intervals stand.</summary>
    Sound,
}
