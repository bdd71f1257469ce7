using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Uncertainty;

/// <summary>What widened the absolute budget for want of being measured.</summary>
public static class BudgetReasons
{
    public static IEnumerable<Reason> Of(Measurement measurement, Budget budget)
    {
        ReadOptions options = measurement.Options;
        double f0 = measurement.Fit.F0Hz;
        double Ppm(string term) => budget.Lines.First(line => line.Term == term).F0Hz / f0 * 1e6;
        double Percent(string term) => budget.Lines.First(line => line.Term == term).QRelative * 100;
        if (!options.Law.RespondsToPower)
        {
            yield return new Reason(ReasonCode.DetectorNotPower, $"The detector does not respond to power: {Percent("harmonics"):0.0} % of Q.");
        }

        if (options.Law.ReadOn is null)
        {
            yield return new Reason(ReasonCode.DetectorNotRead, $"The detector's law is only declared: {Percent("detector law"):0.00} % of Q.");
        }

        if (options.Clock is null)
        {
            yield return new Reason(ReasonCode.ClockNotTrimmed, $"The box's clock was never trimmed: {Ppm("clock"):0} ppm of f0.");
        }

        if (options.Pull is null)
        {
            yield return new Reason(ReasonCode.PullNotMeasured, $"The pull of loop, pickup and people is not known: {Ppm("pull"):0} ppm of f0.");
        }

        if (options.SetUp.Count == 0)
        {
            yield return new Reason(ReasonCode.SetUpNotStated, "What stands with the coil was not stated.");
        }

        if (!options.Commissioned)
        {
            yield return new Reason(ReasonCode.NotCommissioned, "The box was never commissioned.");
        }
    }
}
