using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Checks;

/// <summary>Every check of a reading, in the order in which its reasons are shown.</summary>
public static class ReadingChecks
{
    /// <summary>All reasons that stand against (or beside) a measurement.</summary>
    public static List<Reason> All(Measurement measurement)
    {
        if (!measurement.Fit.IsFitted)
        {
            return [FitReasons.WhyNot(measurement.Fit.Outcome, measurement.Saturated)];
        }

        return
        [
            .. LevelCheck.Reasons(measurement),
            .. DarkCheck.Reasons(measurement),
            .. SurveyReasons.Near(measurement),
            .. CurveCheck.Reasons(measurement),
            .. RepeatCheck.Reasons(measurement),
            .. ScatterCheck.Reasons(measurement),
        ];
    }
}
