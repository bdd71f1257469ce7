namespace Looseloop.Readings;

/// <summary>One commissioning of a box, or the part of it that was done. It is kept as it is; a later one stands beside it.</summary>
/// <param name="Utc">When it began.</param>
/// <param name="Board">The board's word for itself.</param>
/// <param name="FirmwareVersion">What ran on it.</param>
/// <param name="Steps">Each step that was asked for, once.</param>
/// <param name="Interrupted">True if it ended before its last step.</param>
public sealed record CommissioningRecord(
    DateTimeOffset Utc, string Board, string FirmwareVersion, IReadOnlyList<StepFinding> Steps, bool Interrupted);
