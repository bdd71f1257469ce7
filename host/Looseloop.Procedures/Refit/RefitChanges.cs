using Looseloop.Readings;

namespace Looseloop.Procedures.Refit;

/// <summary>What today's fit makes of a reading otherwise than the fit that it was kept with.</summary>
public sealed record RefitChanges
{
    /// <summary>Figures that differ by less than this share of themselves are the same to rounding.</summary>
    public const double Rounding = 1e-9;

    /// <summary>f0 now less f0 as kept, hertz; NaN where either has none.</summary>
    public required double F0Hz { get; init; }

    /// <summary>Q now over Q as kept, less 1; NaN where either has none.</summary>
    public required double QRelative { get; init; }

    /// <summary>True if f0, Q and their uncertainties are the same to rounding (or are missing in both), and so is the verdict with its reasons.</summary>
    public required bool Same { get; init; }

    /// <summary>Reasons that stand now and did not.</summary>
    public required IReadOnlyList<Reason> NewReasons { get; init; }

    /// <summary>Reasons that stood and do not now.</summary>
    public required IReadOnlyList<Reason> GoneReasons { get; init; }

    /// <summary>Compares.</summary>
    public static RefitChanges Between(Reading kept, Reading now)
    {
        HashSet<ReasonCode> before = [.. kept.Reasons.Select(reason => reason.Code)];
        HashSet<ReasonCode> after = [.. now.Reasons.Select(reason => reason.Code)];
        bool figures = Equal(kept.F0Hz, now.F0Hz) && Equal(kept.Q, now.Q)
            && Equal(kept.Budget.F0Hz(false), now.Budget.F0Hz(false)) && Equal(kept.Budget.F0Hz(true), now.Budget.F0Hz(true))
            && Equal(kept.Budget.QRelative(false), now.Budget.QRelative(false)) && Equal(kept.Budget.QRelative(true), now.Budget.QRelative(true));
        return new RefitChanges
        {
            F0Hz = now.F0Hz - kept.F0Hz,
            QRelative = (now.Q / kept.Q) - 1,
            Same = figures && kept.Verdict == now.Verdict && before.SetEquals(after),
            NewReasons = [.. now.Reasons.Where(reason => !before.Contains(reason.Code))],
            GoneReasons = [.. kept.Reasons.Where(reason => !after.Contains(reason.Code))],
        };
    }

    private static bool Equal(double one, double other) =>
        (double.IsNaN(one) && double.IsNaN(other)) || Math.Abs(one - other) <= Rounding * Math.Abs(one);
}
