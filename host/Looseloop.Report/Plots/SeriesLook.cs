namespace Looseloop.Report.Plots;

/// <summary>How a series is drawn.</summary>
public enum SeriesLook
{
    /// <summary>A mark at each point: what was measured.</summary>
    Points,

    /// <summary>A line through the points: what was worked out.</summary>
    Line,
}
