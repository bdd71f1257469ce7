namespace Looseloop.Readings;

/// <summary>One term of the uncertainty of a reading (JCGM 100:2008, GUM, 5.1.2).</summary>
/// <param name="Term">Its name, such as "noise" or "coupling".</param>
/// <param name="F0Hz">Standard uncertainty of f0 that it makes, hertz.</param>
/// <param name="QRelative">Relative standard uncertainty of Q that it makes.</param>
/// <param name="Repeatability">True if it shows between two readings of an untouched set-up; else it is common to both.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom of the estimate; infinity where it is not from statistics.</param>
/// <param name="Origin">Where the figure comes from; a few words.</param>
public sealed record BudgetLine(
    string Term, double F0Hz, double QRelative, bool Repeatability, double DegreesOfFreedom, string Origin);
