namespace Looseloop.Resonance;

/// <summary>What is declared to the fit rather than found by it.</summary>
public readonly record struct FitOptions()
{
    /// <summary>What the fit allows beside the resonance.</summary>
    public BackgroundModel Background { get; init; } = BackgroundModel.FeedThrough;

    /// <summary>
    /// n of a prefactor (f/f0)^n of the amplitude: -1 for an inductive loop on constant voltage, 0 for none, 1 for a loop on
    /// constant current. An n wrong by one moves f0 by 16 ppm at Q = 200.
    /// </summary>
    public double PrefactorExponent { get; init; }

    /// <summary>Treatment of straying points.</summary>
    public RobustLoss Loss { get; init; } = RobustLoss.None;

    /// <summary>
    /// No point counts as better known than this standard deviation (quantisation: a step over the square root of 12);
    /// 0 for no floor.
    /// </summary>
    public double AmplitudeFloor { get; init; }

    /// <summary>Another start for f0, hertz, where one is known; else NaN.</summary>
    public double F0GuessHz { get; init; } = double.NaN;

    /// <summary>The Q that goes with <see cref="F0GuessHz"/>; else NaN.</summary>
    public double QGuess { get; init; } = double.NaN;
}
