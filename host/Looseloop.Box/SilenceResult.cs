namespace Looseloop.Box;

/// <summary>What a box did about a host that fell silent.</summary>
/// <param name="Stopped">True if it ended its work by itself.</param>
/// <param name="FaultCode">The reason it gave, a code of Protocol.FaultCode.</param>
/// <param name="After">From the host's last line until it said so, or for how long it was watched.</param>
public sealed record SilenceResult(bool Stopped, int FaultCode, TimeSpan After);
