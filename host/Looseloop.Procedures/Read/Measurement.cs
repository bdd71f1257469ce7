using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Survey;
using Looseloop.Procedures.Uncertainty;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Read;

/// <summary>Everything that a reading's checks and budget look at. Documents only; nothing here talks to a box.</summary>
public sealed record Measurement
{
    public required ReadOptions Options { get; init; }

    public required BoxIdentity Box { get; init; }

    /// <summary>What the points were planned on.</summary>
    public required Target Target { get; init; }

    public required MeasurePlan Plan { get; init; }

    /// <summary>The survey before it, or null for a reading near a known frequency.</summary>
    public SurveyResult? Survey { get; init; }

    /// <summary>The points, there and back.</summary>
    public required IReadOnlyList<RawPoint> Points { get; init; }

    public required AmplitudeMaker Maker { get; init; }

    public required IReadOnlyList<FitPoint> FitPoints { get; init; }

    public required ResonanceFit Fit { get; init; }

    /// <summary>Residuals of the fit over their standard uncertainties, in the order of the points.</summary>
    public required IReadOnlyList<double> Residuals { get; init; }

    /// <summary>The fit of the way there, and of the way back.</summary>
    public required ResonanceFit There { get; init; }

    /// <inheritdoc cref="There"/>
    public required ResonanceFit Back { get; init; }

    /// <summary>How the points of the two ways differ.</summary>
    public required PairScatter Pairs { get; init; }

    /// <summary>The same settings at another duty, and their fit.</summary>
    public required ResonanceFit OtherDutyFit { get; init; }

    /// <summary>The other duty.</summary>
    public required double OtherDuty { get; init; }

    /// <summary>The points at it.</summary>
    public required IReadOnlyList<RawPoint> AtOtherDuty { get; init; }

    /// <summary>The drive's true strength at the reading's duty, where vernier settings made it matter.</summary>
    public required EdgeWeight Edges { get; init; }

    /// <summary>Points taken again after twice the dwell, each with the first one at the same setting.</summary>
    public required IReadOnlyList<(AmplitudePoint First, AmplitudePoint Longer)> DwellPairs { get; init; }

    public required DarkLevel DarkBefore { get; init; }

    public required DarkLevel DarkAfter { get; init; }

    /// <summary>Points that could not be had.</summary>
    public int Missing { get; init; }

    /// <summary>Those of them that the fit itself lacks.</summary>
    public int MissingInSweep { get; init; }

    /// <summary>True if even the lowest duty left the converter at its upper end.</summary>
    public bool Saturated { get; init; }

    /// <summary>Fits the points again with something changed: what a budget term needs.</summary>
    public ResonanceFit Refit(Func<RawPoint, AmplitudePoint> make, double? prefactorExponent = null) =>
        ResonanceFitter.FitOnce(
            [.. Points.Select(make).Select((made, i) => FitPoints[i] with { Amplitude = made.Amplitude, Variance = made.Variance })],
            FitOptions with { PrefactorExponent = prefactorExponent ?? Options.PrefactorExponent });

    /// <summary>What is declared to the fit.</summary>
    public FitOptions FitOptions => new()
    {
        PrefactorExponent = Options.PrefactorExponent,
        F0GuessHz = Target.F0Hz,
        QGuess = Target.Q,
    };
}
