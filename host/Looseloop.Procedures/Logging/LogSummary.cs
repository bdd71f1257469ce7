using Looseloop.Drift;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>What a log came to.</summary>
/// <param name="Stop">Its stop document.</param>
/// <param name="State">Its last state.</param>
/// <param name="Settling">The last judgement over rest, or null where none was made.</param>
/// <param name="LastFieldEnd">f0 and Q at the last end of a field, or null where there was none.</param>
public sealed record LogSummary(RunStop Stop, LogState State, Settling? Settling, FieldEnd? LastFieldEnd);
