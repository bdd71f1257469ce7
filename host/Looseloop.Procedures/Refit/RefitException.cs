namespace Looseloop.Procedures.Refit;

/// <summary>A reading cannot be fitted again. The message says why, as the rest of a sentence about the reading, and what to do.</summary>
public sealed class RefitException(string message) : Exception(message);
