namespace Looseloop.Coil;

/// <summary>One contribution to the uncertainty of an expected f1.</summary>
/// <param name="Name">A dimension, or what the model leaves out.</param>
/// <param name="UncertaintyHz">Standard uncertainty, hertz.</param>
/// <param name="Origin">Where the figure comes from; a few words.</param>
public sealed record Contribution(string Name, double UncertaintyHz, string Origin);
