namespace Looseloop.Drift;

/// <summary>
/// What a value was when an energised run stopped, from readings taken after it: the cool-down is fitted and run backward to
/// that moment. An energised coil is never read; this is how its f0 and Q are learnt all the same.
/// </summary>
/// <param name="AtStop">The value at the stop, in its unit.</param>
/// <param name="AtStopStandard">
/// Its standard uncertainty: the fit's covariance, the stop's time, and what the choice of model makes.
/// </param>
/// <param name="DegreesOfFreedom">Degrees of freedom behind it.</param>
/// <param name="StopS">The moment, seconds on the series' clock.</param>
/// <param name="FirstReadingAfterS">How long after the stop the first reading came, seconds.</param>
/// <param name="Model">The fitted cool-down; its origin is the stop.</param>
public sealed record CoolDown(
    double AtStop, double AtStopStandard, double DegreesOfFreedom, double StopS, double FirstReadingAfterS, WarmUpModel Model)
{
    /// <summary>Fewer readings than this cannot carry the extrapolation.</summary>
    public const int FewestReadings = 6;

    /// <summary>Extrapolates.</summary>
    /// <param name="series">Readings after the stop; earlier ones are refused.</param>
    /// <param name="stopS">When the run stopped, seconds on the series' clock.</param>
    /// <param name="stopStandardS">Standard uncertainty of that moment, seconds, 0 or more.</param>
    /// <returns>Null where there are fewer than <see cref="FewestReadings"/>, or the cool-down cannot be fitted.</returns>
    public static CoolDown? Extrapolate(DriftSeries series, double stopS, double stopStandardS)
    {
        if (series.Count < FewestReadings)
        {
            return null;
        }

        double afterS = series.TimeS[0] - stopS;
        if (afterS < 0)
        {
            throw new ArgumentException("a reading lies before the moment the run stopped", nameof(series));
        }

        if (WarmUpFit.Choose(series, stopS) is not { } model)
        {
            return null;
        }

        // A fast part that ended before the first reading leaves no trace in the data. The richer neighbour of the chosen
        // model says what another choice would have made of the gap; where its own covariance explains the difference, nothing
        // is added.
        double atStop = model.At(stopS);
        double standard = model.StandardAt(stopS);
        double choice = 0;
        if (model.Terms.Count < 2 && WarmUpFit.Fit(series, model.Terms.Count + 1, stopS) is { AtBound: false } other)
        {
            double difference = other.At(stopS) - atStop;
            double explained = Math.Sqrt(Math.Abs((other.StandardAt(stopS) * other.StandardAt(stopS)) - (standard * standard)));
            choice = Math.Min(Math.Abs(difference), explained) / Math.Sqrt(3);
        }

        double timing = model.SlopeAt(stopS) * stopStandardS;
        double total = Math.Sqrt((standard * standard) + (choice * choice) + (timing * timing));
        return new CoolDown(atStop, total, Math.Max(1, series.Count - model.Parameters), stopS, afterS, model);
    }
}
