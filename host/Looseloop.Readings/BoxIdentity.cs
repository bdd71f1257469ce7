namespace Looseloop.Readings;

/// <summary>What a box says of itself.</summary>
/// <param name="Port">The link it was found on, as the user names it.</param>
/// <param name="Board">The board's word for itself.</param>
/// <param name="FirmwareVersion">Major.minor.patch.</param>
/// <param name="ProtocolVersion">The protocol's version.</param>
/// <param name="BootId">A number drawn at each start of the board.</param>
/// <param name="MostDutyBits">19 on the classic ESP32, 13 on S2, S3 and C3.</param>
/// <param name="LowestHz">Nothing may be driven below this.</param>
/// <param name="HighestHz">Nor above this.</param>
/// <param name="FullCounts">The converter's largest raw count.</param>
/// <param name="Inputs">Sum of 1 (detector), 2 (direct), 4 (thermistor).</param>
public sealed record BoxIdentity(
    string Port, string Board, string FirmwareVersion, int ProtocolVersion, long BootId, int MostDutyBits,
    int LowestHz, int HighestHz, int FullCounts, int Inputs);
