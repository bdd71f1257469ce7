namespace Looseloop.Coil;

/// <summary>One cause that would, alone, account for a reading.</summary>
/// <param name="Name">Which: a dimension in words, or "added capacitance".</param>
/// <param name="From">As the coil file has it, in the unit.</param>
/// <param name="To">What it would have to be, in the unit; NaN where no value within reach does it.</param>
/// <param name="Unit">pF, mm or empty.</param>
/// <param name="Remark">What it means in practice; one sentence.</param>
public sealed record Cause(string Name, double From, double To, string Unit, string Remark)
{
    /// <summary>Whether it can account for the reading at all.</summary>
    public bool CanAccount => double.IsFinite(To);
}
