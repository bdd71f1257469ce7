namespace Looseloop.Drift;

/// <summary>What a drift analysis is asked.</summary>
public sealed record DriftOptions
{
    /// <summary>How long a reading is to hold, seconds (common practice, no source: half an hour between looks).</summary>
    public double UseS { get; init; } = 1800;

    /// <summary>Expanded uncertainty (k = 2) of one reading; twice the median stated one where null.</summary>
    public double? ReadingExpanded { get; init; }

    /// <summary>Half the width of the driver's window, in the value's unit, or null for no such question.</summary>
    public double? WindowHalfWidth { get; init; }

    /// <summary>Its centre; the model's value at the first reading where null (the driver was tuned then).</summary>
    public double? WindowCentre { get; init; }
}
