namespace Looseloop.Readings;

/// <summary>One reason behind a verdict.</summary>
/// <param name="Code">Which trap, or which note.</param>
/// <param name="Detail">What was seen, with figures and units; one sentence.</param>
public sealed record Reason(ReasonCode Code, string Detail)
{
    /// <summary>The best verdict that a reading with this reason may have.</summary>
    public Verdict AtBest => ReasonText.AtBest(Code);

    /// <summary>What to do about it; one sentence.</summary>
    public string Advice => ReasonText.Advice(Code);

    /// <summary>The code as it is written in output: lower-case words joined by hyphens.</summary>
    public string Name => ReasonText.Name(Code);
}
