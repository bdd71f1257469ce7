using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>The mean of the driver's output at D and at 1 - D: counts must be the counts asked for, and edges even.</summary>
public static class DutyStep
{
    private const double AtHz = 150_000;

    /// <summary>Uneven edges beyond this share of the period are a worse driver than the notes want.</summary>
    private const double MostEdge = 0.005;

    /// <summary>
    /// A meter's own scatter, share of the supply. Below it one wrong count of 512 beside right ones still shows: it moves
    /// itself by 0.8 counts against the mean of five, 0.0016.
    /// </summary>
    private const double Meter = 0.0014;

    /// <summary>How many means are taken.</summary>
    public const int Duties = 5;

    /// <summary>1/2, 1/3 and its complement, 1/5 and its complement.</summary>
    public static IReadOnlyList<Setting> Settings(SettingGrid grid)
    {
        Setting half = grid.Nearest(AtHz, 0.5);
        int whole = 1 << half.DutyBits;
        int third = SettingGrid.WithDuty(half, 1 / 3.0).DutyCount;
        int fifth = SettingGrid.WithDuty(half, 0.2).DutyCount;
        return [.. new[] { half.DutyCount, third, whole - third, fifth, whole - fifth }.Select(count => half with { DutyCount = count })];
    }

    /// <summary>Judges means, shares of the supply.</summary>
    public static StepFinding Judge(IReadOnlyList<Setting> settings, IReadOnlyList<double> shares)
    {
        double[] off = [.. settings.Select((setting, i) => shares[i] - setting.Duty)];
        double edge = off.Average();
        double worst = off.Max(one => Math.Abs(one - edge));
        double edgeNs = 1e9 * edge / settings[0].FrequencyHz;
        var figures = settings.Select((setting, i) => ($"share_at_count_{setting.DutyCount}", shares[i])).ToDictionary(pair => pair.Item1, pair => pair.Item2);
        figures["high_extra_ns"] = edgeNs;
        figures["largest_deviation"] = worst;
        if (worst > Meter)
        {
            int at = Array.FindIndex(off, one => Math.Abs(one - edge) == worst);
            return Finding(StepResult.Failed, $"At count {settings[at].DutyCount} the mean is {shares[at]:0.0000} of the supply where {settings[at].Duty + edge:0.0000} was due: the duty that comes out is not the one asked for. Measure the supply with the same meter and range, then again.");
        }

        if (Math.Abs(edge) > MostEdge)
        {
            return Finding(StepResult.Failed, $"High {edgeNs:+0;-0} ns too long at every duty: uneven edges. Use another driver, or live with a ghost at f0/2.");
        }

        double aCount = 1.0 / (1 << settings[0].DutyBits);
        string low = Math.Abs(edge + aCount) < aCount / 4
            ? " That is also what one count too few everywhere looks like: check the firmware, or see on a scope that it is the edges."
            : "";
        return Finding(StepResult.Passed, $"Every count as asked for; high {edgeNs:+0.0;-0.0;0.0} ns too long (edges).{low}");

        StepFinding Finding(StepResult result, FormattableString detail) =>
            new(CommissioningStep.Duty, result, FormattableString.Invariant(detail), figures);
    }
}
