namespace Looseloop.Drift;

/// <summary>
/// The judgement over the end of a run. Settled: what is still to come plus twice its uncertainty is below the expanded
/// uncertainty of one reading, and over the last third of the run the slope is within twice its uncertainty or makes less
/// than that expanded uncertainty over the time for which a reading is to hold. Before 1.5 time constants the end cannot be
/// told.
/// </summary>
/// <param name="State">The judgement.</param>
/// <param name="Remaining">What is still to come at the last reading, signed, in the value's unit; NaN where not determinable.</param>
/// <param name="RemainingStandard">Its standard uncertainty; NaN where not determinable.</param>
/// <param name="SlopePerS">Slope over the last third, value's unit per second.</param>
/// <param name="SlopeStandardPerS">Its standard uncertainty.</param>
/// <param name="Limit">The expanded uncertainty of one reading that it was held against.</param>
/// <param name="Because">Why, one sentence with figures.</param>
public sealed record Settling(
    SettledState State, double Remaining, double RemainingStandard, double SlopePerS, double SlopeStandardPerS, double Limit,
    string Because)
{
    /// <summary>Fewer readings than this tell nothing about an exponential.</summary>
    public const int FewestReadings = 8;

    /// <summary>Shorter than this many time constants a run does not show its end.</summary>
    public const double FewestTimeConstants = 1.5;

    /// <summary>Judges the end of a series.</summary>
    /// <param name="series">The readings.</param>
    /// <param name="model">The model chosen for them, or null.</param>
    /// <param name="limit">Expanded uncertainty (k = 2) of one reading, in the value's unit; above zero.</param>
    /// <param name="useS">How long a reading is to hold, seconds; above zero.</param>
    public static Settling Judge(DriftSeries series, WarmUpModel? model, double limit, double useS)
    {
        if (!(limit > 0))
        {
            throw new ArgumentOutOfRangeException(nameof(limit), limit, "an uncertainty above zero is needed");
        }

        if (!(useS > 0))
        {
            throw new ArgumentOutOfRangeException(nameof(useS), useS, "a time above zero is needed");
        }

        if (model is null || series.Count < FewestReadings)
        {
            return Unknown(default, limit, $"{series.Count} readings are too few: {FewestReadings} are needed");
        }

        double endS = series.TimeS[^1];
        WeightedLine line = Line(series, endS - (series.DurationS / 3));
        if (model.Terms.Count == 0)
        {
            return Flat(series, line, limit, useS);
        }

        double slowestS = model.Terms[^1].TauS;
        if (model.AtBound || series.DurationS < FewestTimeConstants * slowestS)
        {
            return Unknown(line, limit, string.Create(
                System.Globalization.CultureInfo.InvariantCulture,
                $"the run of {series.DurationS:0} s is shorter than {FewestTimeConstants} time constants of {slowestS:0} s"));
        }

        double remaining = model.Remaining(endS);
        double standard = model.RemainingStandard(endS);
        double bound = Math.Abs(remaining) + (2 * standard);
        bool near = bound < limit;
        bool level = Math.Abs(line.Slope) < 2 * line.SlopeStandard || Math.Abs(line.Slope) * useS < limit;
        SettledState state = near && level ? SettledState.Settled : SettledState.NotSettled;
        string because = near && !level
            ? string.Create(
                System.Globalization.CultureInfo.InvariantCulture,
                $"the last third still moves by {line.Slope * useS:0.###} in {useS:0} s, against {limit:0.###} of one reading")
            : string.Create(
                System.Globalization.CultureInfo.InvariantCulture,
                $"{Math.Abs(remaining):0.###} with 2u = {2 * standard:0.###} are still to come, against {limit:0.###} of one reading");
        return new Settling(state, remaining, standard, line.Slope, line.SlopeStandard, limit, because);
    }

    // No warm-up is seen. That is no proof of rest: the run must be able to show a drift that would matter.
    private static Settling Flat(DriftSeries series, WeightedLine lastThird, double limit, double useS)
    {
        WeightedLine whole = Line(series, series.TimeS[0]);
        double bound = (Math.Abs(whole.Slope) + (2 * whole.SlopeStandard)) * useS;
        bool seen = Math.Abs(whole.Slope) > 2 * whole.SlopeStandard;
        string figures = string.Create(
            System.Globalization.CultureInfo.InvariantCulture,
            $"no warm-up is seen, and the slope allows up to {bound:0.###} in {useS:0} s, against {limit:0.###} of one reading");
        if (bound < limit)
        {
            return new Settling(
                SettledState.Settled, 0, whole.SlopeStandard * useS, lastThird.Slope, lastThird.SlopeStandard, limit, figures);
        }

        SettledState state = seen && Math.Abs(whole.Slope) * useS > limit ? SettledState.NotSettled : SettledState.NotDeterminable;
        return new Settling(state, double.NaN, double.NaN, lastThird.Slope, lastThird.SlopeStandard, limit, figures);
    }

    private static Settling Unknown(WeightedLine line, double limit, string because) =>
        new(SettledState.NotDeterminable, double.NaN, double.NaN, line.Slope, line.SlopeStandard, limit, because);

    private static WeightedLine Line(DriftSeries series, double fromS)
    {
        int first = series.TimeS.BinarySearch(fromS);
        first = first < 0 ? ~first : first;
        return WeightedLine.Fit(series.TimeS[first..], series.Value[first..], series.Standard[first..]);
    }
}
