namespace Looseloop.Resonance;

/// <summary>A sum of squares to be made smallest.</summary>
public interface ILeastSquaresProblem
{
    /// <summary>How many parameters, 1 or more.</summary>
    int ParameterCount { get; }

    /// <summary>How many residuals, at least as many as parameters.</summary>
    int ResidualCount { get; }

    /// <summary>Computes the residuals and, where wanted, their derivatives.</summary>
    /// <param name="parameters">Where.</param>
    /// <param name="residuals">Filled: (model - data) / standard deviation.</param>
    /// <param name="jacobian">
    /// Empty where no derivatives are wanted; else filled column by column:
    /// d residual i / d parameter j stands at [j * ResidualCount + i].
    /// </param>
    /// <returns>False where the parameters have no meaning, such as a negative Q; the minimiser then takes a shorter step.</returns>
    bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian);
}
