namespace Looseloop.Resonance;

/// <summary>What the duty test leaves possible.</summary>
/// <param name="Orders">Harmonics of the drive that explain the ratio, lowest first; 2 stands for all even ones; empty for none.</param>
public sealed record DutyTestResult(IReadOnlyList<int> Orders)
{
    /// <summary>The response follows the fundamental and nothing else: it is where it seems to be.</summary>
    public bool IsFundamental => Orders.Count == 1 && Orders[0] == 1;

    /// <summary>The response is certainly not the fundamental's: a ghost.</summary>
    public bool IsGhost => Orders.Count > 0 && !Orders.Contains(1);

    /// <summary>Neither can be said.</summary>
    public bool IsUnknown => !IsFundamental && !IsGhost;

    /// <summary>The lowest order that fits, 0 where unknown. The third and seventh harmonic cannot be told apart by this test.</summary>
    public int Order => IsUnknown ? 0 : Orders[0];
}
