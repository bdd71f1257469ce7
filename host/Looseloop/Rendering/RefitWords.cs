using System.Globalization;
using Looseloop.Readings;

namespace Looseloop.Rendering;

/// <summary>What differs between the bases of two fits, in words.</summary>
internal static class RefitWords
{
    /// <summary>One sentence for each difference; none where they are alike.</summary>
    public static IEnumerable<string> Differences(FitBasis before, FitBasis now)
    {
        if (before.Law != now.Law)
        {
            yield return $"detector's law: {Law(before.Law)}; now {Law(now.Law)}";
        }

        if (before.Clock != now.Clock)
        {
            yield return $"clock: {Clock(before.Clock)}; now {Clock(now.Clock)}";
        }

        if (before.Pull != now.Pull)
        {
            yield return $"pull: {Pull(before.Pull)}; now {Pull(now.Pull)}";
        }

        if (before.Commissioned != now.Commissioned)
        {
            yield return "the box has been commissioned since";
        }
    }

    private static string Law(DetectorLaw law) => Text(
        $"{law.Kind}, {(law.ReadOn is { } on ? $"read {Day(on)}" : "only declared")}, pedestal {law.PedestalCounts:0.0}, shape {law.Shape:0.00}, reference {law.ReferenceCounts:0.0} counts");

    private static string Clock(ClockTrim? trim) => trim is null ? "never trimmed" : Text($"{trim.Ppm:+0.0;-0.0} ppm, found {Day(trim.On)}");

    private static string Pull(Pull? pull) => pull is null ? "not known" : Text($"{1e6 * pull.F0Relative:+0;-0} ppm of f0, found {Day(pull.On)}");

    private static string Day(DateTimeOffset time) => time.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
