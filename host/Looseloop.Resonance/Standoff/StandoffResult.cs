namespace Looseloop.Resonance;

/// <summary>A coil without the thing that was moved.</summary>
/// <param name="F0Hz">f0 at no coupling, hertz.</param>
/// <param name="F0StandardHz">Its standard uncertainty, hertz.</param>
/// <param name="Q">Q at no coupling.</param>
/// <param name="QRelativeStandard">Its relative standard uncertainty.</param>
/// <param name="F0PullPerUnit">Hertz per unit of the abscissa, A/Q or (A/Q)^2.</param>
/// <param name="F0PullStandard">Its standard uncertainty.</param>
/// <param name="InverseQPerUnit">1/Q per unit of the abscissa; 0 for a pickup, which takes no power.</param>
/// <param name="InverseQStandard">Its standard uncertainty.</param>
/// <param name="ChiSquare">Of both lines together; tells whether lines they are.</param>
/// <param name="DegreesOfFreedom">Of that sum; 0 for two readings of a loop.</param>
public readonly record struct StandoffResult(
    double F0Hz, double F0StandardHz, double Q, double QRelativeStandard, double F0PullPerUnit, double F0PullStandard,
    double InverseQPerUnit, double InverseQStandard, double ChiSquare, int DegreesOfFreedom);
