namespace Looseloop.Drift;

/// <summary>When a warm-up leaves a window centre +- half width.</summary>
/// <param name="Kind">What it does.</param>
/// <param name="TimeS">When the model crosses the edge, seconds on the series' clock; NaN where it does not.</param>
/// <param name="StandardS">Standard uncertainty of that, first order; NaN where it does not.</param>
/// <param name="EarliestS">The earliest time, at twice the model's uncertainty; NaN where it cannot leave.</param>
/// <param name="LatestS">The latest time likewise; infinite where it may never leave.</param>
public sealed record WindowExit(WindowExitKind Kind, double TimeS, double StandardS, double EarliestS, double LatestS)
{
    private const int ScanSteps = 400;

    /// <summary>Looks from a time on.</summary>
    /// <param name="model">The fitted warm-up, or null.</param>
    /// <param name="centre">The window's centre, in the value's unit.</param>
    /// <param name="halfWidth">Half its width; above zero.</param>
    /// <param name="fromS">The first time that counts.</param>
    public static WindowExit Find(WarmUpModel? model, double centre, double halfWidth, double fromS)
    {
        if (!(halfWidth > 0))
        {
            throw new ArgumentOutOfRangeException(nameof(halfWidth), halfWidth, "a half width above zero is needed");
        }

        if (model is null || model.AtBound)
        {
            return new WindowExit(WindowExitKind.NotDeterminable, double.NaN, double.NaN, double.NaN, double.NaN);
        }

        // After fifteen of the slowest time constants 3e-7 of the drift is left.
        double spanS = model.Terms.Count == 0 ? 0 : 15 * model.Terms[^1].TauS;
        double crossing = First(t => Math.Abs(model.At(t) - centre) - halfWidth);
        double earliest = First(t => Math.Abs(model.At(t) - centre) + (2 * model.StandardAt(t)) - halfWidth);
        double latest = First(t => Math.Abs(model.At(t) - centre) - (2 * model.StandardAt(t)) - halfWidth);
        if (double.IsNaN(earliest))
        {
            return new WindowExit(WindowExitKind.Stays, double.NaN, double.NaN, double.NaN, double.PositiveInfinity);
        }

        double last = double.IsNaN(latest) ? double.PositiveInfinity : latest;
        if (double.IsNaN(crossing))
        {
            return new WindowExit(WindowExitKind.MayLeave, double.NaN, double.NaN, earliest, last);
        }

        if (crossing <= fromS)
        {
            WindowExitKind kind = double.IsNaN(latest) || latest > fromS ? WindowExitKind.MayLeave : WindowExitKind.Outside;
            return new WindowExit(kind, fromS, double.NaN, fromS, last);
        }

        double speed = Math.Abs(model.SlopeAt(crossing));
        double standard = speed > 0 ? model.StandardAt(crossing) / speed : double.PositiveInfinity;
        return new WindowExit(
            double.IsPositiveInfinity(last) ? WindowExitKind.MayLeave : WindowExitKind.Leaves, crossing, standard, earliest, last);

        // The first time at which a function is at or above zero, by a scan that is dense early, then bisection.
        double First(Func<double, double> outside)
        {
            double before = fromS;
            if (outside(before) >= 0)
            {
                return before;
            }

            for (int i = 1; i <= ScanSteps && spanS > 0; i++)
            {
                double part = (double)i / ScanSteps;
                double after = fromS + (spanS * part * part);
                if (outside(after) >= 0)
                {
                    for (int k = 0; k < 60; k++)
                    {
                        double middle = (before + after) / 2;
                        (before, after) = outside(middle) >= 0 ? (before, middle) : (middle, after);
                    }

                    return after;
                }

                before = after;
            }

            return double.NaN;
        }
    }
}
