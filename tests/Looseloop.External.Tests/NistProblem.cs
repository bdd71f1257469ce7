using Looseloop.Resonance;

namespace Looseloop.External.Tests;

/// <summary>A model's value and its derivatives by the parameters.</summary>
internal delegate double ModelFunction(ReadOnlySpan<double> b, double x, Span<double> derivatives);

/// <summary>A NIST set and its model as a sum of squares.</summary>
internal sealed class NistProblem(NistSet set, ModelFunction model) : ILeastSquaresProblem
{
    public int ParameterCount => set.Certified.Length;

    public int ResidualCount => set.X.Length;

    public bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian)
    {
        Span<double> derivatives = stackalloc double[parameters.Length];
        for (int i = 0; i < residuals.Length; i++)
        {
            residuals[i] = model(parameters, set.X[i], derivatives) - set.Y[i];
            for (int j = 0; !jacobian.IsEmpty && j < parameters.Length; j++)
            {
                jacobian[(j * residuals.Length) + i] = derivatives[j];
            }
        }

        return true;
    }
}
