namespace Looseloop.Resonance;

/// <summary>How far a point may stray before its weight falls (tuning constants for 95 % efficiency with Gaussian noise).</summary>
public enum RobustLoss
{
    /// <summary>All points count by their variances: least squares.</summary>
    None,

    /// <summary>Linear beyond 1.345 standard deviations (P. J. Huber, Ann. Math. Stat. 35 (1964) 73).</summary>
    Huber,

    /// <summary>Logarithmic, constant 2.385; for a few per cent of sparks.</summary>
    Cauchy,

    /// <summary>No weight at all beyond 4.685 standard deviations (Holland and Welsch, Commun. Stat. A6 (1977) 813).</summary>
    Bisquare,
}
