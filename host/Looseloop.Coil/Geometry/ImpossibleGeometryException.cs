namespace Looseloop.Coil;

/// <summary>One thing that is wrong with a geometry.</summary>
/// <param name="Path">The dimension at fault as a coil file names it, such as <c>top_load.height_mm</c>.</param>
/// <param name="Text">What is wrong and what to do; one sentence.</param>
public sealed record GeometryProblem(string Path, string Text);

/// <summary>A coil that cannot be built.</summary>
public sealed class ImpossibleGeometryException(IReadOnlyList<GeometryProblem> problems)
    : Exception(string.Join("; ", problems.Select(p => $"{p.Path}: {p.Text}")))
{
    /// <summary>Everything that is wrong.</summary>
    public IReadOnlyList<GeometryProblem> Problems { get; } = problems;
}
