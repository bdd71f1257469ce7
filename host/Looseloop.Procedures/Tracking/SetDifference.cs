namespace Looseloop.Procedures.Tracking;

/// <summary>By how much two sets of settings disagreed at most since the last full reading; carried as a term.</summary>
/// <param name="F0Hz">In f0, hertz, 0 or more.</param>
/// <param name="QRelative">In Q, relative, 0 or more.</param>
internal readonly record struct SetDifference(double F0Hz, double QRelative)
{
    public SetDifference Widened(double f0Hz, double qRelative) =>
        new(Math.Max(F0Hz, Math.Abs(f0Hz)), Math.Max(QRelative, Math.Abs(qRelative)));
}
