using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>What a commissioning came to, also where it was broken off.</summary>
/// <param name="Record">What is to be kept.</param>
/// <param name="Law">The detector's law, if a ladder found one that does not contradict what was declared.</param>
/// <param name="FirstCoil">The reading of the first coil, if one was taken.</param>
/// <param name="BrokenBy">What broke it off, or null.</param>
public sealed record CommissioningOutcome(CommissioningRecord Record, DetectorLaw? Law, Reading? FirstCoil, Exception? BrokenBy);
