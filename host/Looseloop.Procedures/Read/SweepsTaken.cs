using Looseloop.Box;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Read;

/// <summary>All that was taken for a reading, before any of it is fitted.</summary>
internal sealed record SweepsTaken
{
    /// <summary>What the reading was told, the law's pedestal settled.</summary>
    public required ReadOptions Options { get; init; }

    public required BoxIdentity Box { get; init; }

    public required Target Target { get; init; }

    public required MeasurePlan Plan { get; init; }

    public SurveyResult? Survey { get; init; }

    /// <summary>There and back.</summary>
    public required SweepResult Sweep { get; init; }

    public required double OtherDuty { get; init; }

    public required SweepResult AtOtherDuty { get; init; }

    public required SweepResult AfterLongerDwell { get; init; }

    public required DarkLevel DarkBefore { get; init; }

    public required DarkLevel DarkAfter { get; init; }

    public required bool Saturated { get; init; }
}
