namespace Looseloop.Resonance;

/// <summary>The end of a minimisation.</summary>
/// <param name="Outcome">How it ended.</param>
/// <param name="SumOfSquares">The smallest sum of squared residuals found; NaN after a bad start.</param>
/// <param name="Iterations">Steps that lowered it.</param>
/// <param name="Evaluations">How often residuals were computed.</param>
public readonly record struct MinimiserResult(MinimiserOutcome Outcome, double SumOfSquares, int Iterations, int Evaluations);
