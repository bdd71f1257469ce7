namespace Looseloop.Drift;

/// <summary>One exponential of a warm-up or cool-down.</summary>
/// <param name="Amplitude">How far it stood from its end at the model's origin, in the value's unit; either sign.</param>
/// <param name="TauS">Its time constant, seconds.</param>
public readonly record struct WarmUpTerm(double Amplitude, double TauS);
