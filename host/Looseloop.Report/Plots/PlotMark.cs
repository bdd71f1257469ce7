namespace Looseloop.Report.Plots;

/// <summary>A straight line across the plot, such as f0 or the edge of a window.</summary>
/// <param name="Vertical">At a value of x (true) or of y.</param>
/// <param name="Value">The value.</param>
/// <param name="Label">What it is; appears in the legend.</param>
public sealed record PlotMark(bool Vertical, double Value, string Label);
