namespace Looseloop.Resonance;

/// <summary>How a minimisation ended.</summary>
public enum MinimiserOutcome
{
    /// <summary>No further step can lower the sum of squares by more than the tolerance.</summary>
    Converged,

    /// <summary>The iterations ran out while the sum was still falling.</summary>
    OutOfIterations,

    /// <summary>The start has no meaning to the problem, or its residuals are not finite.</summary>
    BadStart,
}
