#nullable enable
namespace Looseloop.Protocol;

/// <summary>One thing that a box said. The fields are those of PROTOCOL.md section 6.</summary>
public abstract record BoxMessage;

public sealed record BoxAnswer(
    int ProtocolVersion, int Major, int Minor, int Patch, string Board, long BootId, long ClockHz, int MostDutyBits,
    int LowestHz, int HighestHz, int PlanEntries, int SweepPoints, int SamplesPerPoint, int FullCounts, int Inputs) : BoxMessage;

public sealed record LimitsAnswer(int LowHz, int HighHz, int PedestalCounts, int FieldCounts) : BoxMessage;

public sealed record DarkAnswer(
    int Channel, int Samples, long Sum, long SumSquares, int Min, int Max, long FromUs, long ToUs) : BoxMessage;

public sealed record PlannedAnswer(int Settings) : BoxMessage;

public sealed record PointAnswer(
    int Index, int DutyBits, int Divider, int DutyCount, int Samples, long Sum, long SumSquares, int Min, int Max,
    long TimeUs) : BoxMessage;

/// <summary>Several points of a survey; the three arrays are of equal length.</summary>
public sealed record PackAnswer(
    int Index, int Samples, long FirstUs, long LastUs, long[] Sum, int[] Min, int[] Max) : BoxMessage;

/// <summary>Samples of one ring: microseconds since the stop, and raw counts.</summary>
public sealed record DecayAnswer(int Repeat, long[] SinceStopUs, int[] Counts) : BoxMessage;

public sealed record AliveAnswer(long TimeUs) : BoxMessage;

public sealed record DoneAnswer(int Count, int Ending, int FaultCode, long TimeUs) : BoxMessage;

public sealed record HaltedAnswer(long TimeUs) : BoxMessage;

public sealed record FaultAnswer(int Code, string Text) : BoxMessage;
