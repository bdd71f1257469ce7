using Looseloop.Box;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Ring;
using Looseloop.Procedures.Survey;
using Looseloop.Procedures.Tracking;
using Looseloop.Readings;

namespace Looseloop.Procedures.Refit;

/// <summary>Today's fit, checks and budget over what a recorded reading was made from. Talks to no box.</summary>
public static class ReadingRefit
{
    /// <summary>Fits a full reading again.</summary>
    /// <param name="original">The reading with its raw points.</param>
    /// <param name="basis">What to fit with: the reading's own, or that with another law, clock or pull.</param>
    /// <param name="hostVersion">The program that fits now.</param>
    /// <param name="time">The host's clock, for the time of the fit.</param>
    /// <returns>A reading with an id of its own, and its curve.</returns>
    /// <exception cref="RefitException">There is nothing to fit again.</exception>
    public static ReadOutcome Full(Reading original, FitBasis basis, string hostVersion, TimeProvider time)
    {
        RefuseWithoutPoints(original);
        if (basis.Harmonics.Count != original.Points.Count || original.Dark.Count < 2)
        {
            throw new RefitException("is not whole: its points and what is kept of its fit do not go together. Look the record over with its own check, or read the coil again.");
        }

        SweepsTaken taken = Taken(original, basis, hostVersion, time);
        Measurement measurement = ReadProcedure.Fit(taken);
        ReadOutcome outcome = ReadingJudge.Judge(Document(original, hostVersion, time.GetUtcNow()), measurement);
        return outcome with { Reading = WithRing(original, outcome, basis) };
    }

    /// <summary>Fits a tracked reading again, on the curve of the full reading before it.</summary>
    /// <param name="original">The tracked reading with its raw points.</param>
    /// <param name="full">That full reading, fitted again.</param>
    /// <param name="hostVersion">The program that fits now.</param>
    /// <param name="time">The host's clock, for the time of the fit.</param>
    /// <exception cref="RefitException">There is nothing to fit again, or the points do not lie on that curve.</exception>
    public static Reading Tracked(Reading original, ReadOutcome full, string hostVersion, TimeProvider time)
    {
        RefuseWithoutPoints(original);
        ReadOptions options = Options(full.Reading, full.Reading.Basis!, hostVersion, time);
        if (TrackBasis.From(full, options) is not { } basis || original.Dark.Count == 0)
        {
            throw new RefitException("was tracked on a full reading that has no curve by today's fit: nothing is known of it then.");
        }

        if (TrackedRefit.On(basis, original.Points) is not { } fit)
        {
            throw new RefitException("was tracked, and its points do not lie on the curve of its full reading as that is fitted today: nothing is known of it then.");
        }

        var points = new TrackedPoints(original.Points, original.Dark[0], original.BoardSeconds, fit);
        Reading made = TrackedReading.Document(original.Box, options, basis, points, TrackedReading.DifferenceOf(original));
        return Document(original, hostVersion, made.Utc) with
        {
            Id = made.Id,
            F0Hz = made.F0Hz,
            Q = made.Q,
            PeakCounts = made.PeakCounts,
            FeedThrough = made.FeedThrough,
            Budget = made.Budget,
            Verdict = made.Verdict,
            Reasons = made.Reasons,
        };
    }

    /// <summary>Why a reading that has no basis cannot be fitted again.</summary>
    public static RefitException WithoutBasis(Reading original)
    {
        string words = original switch
        {
            { Points.Count: 0 } => NoPoints,
            { Verdict: Verdict.None } => "never came to a curve: its points are those of a search, and there is no fit to make again. Read the coil again.",
            _ => $"was kept by version {original.HostVersion} without what its fit was made with (the detector's law, the points at the other duty): "
                + "a fit without these could be wrong and look sound. Read the coil again, or take its raw points elsewhere with export --points.",
        };
        return new RefitException(words);
    }

    private const string NoPoints = "has no raw points in the record: there is nothing to fit again.";

    private static void RefuseWithoutPoints(Reading original)
    {
        if (original.Points.Count == 0)
        {
            throw new RefitException(NoPoints);
        }
    }

    private static SweepsTaken Taken(Reading original, FitBasis basis, string hostVersion, TimeProvider time)
    {
        var harmonics = new Dictionary<Setting, int>();
        for (int i = 0; i < original.Points.Count; i++)
        {
            harmonics[original.Points[i].Setting] = basis.Harmonics[i];
        }

        Setting[] settings = [.. original.Points.Take(original.Points.Count / 2).Select(point => point.Setting)];
        return new SweepsTaken
        {
            Options = Options(original, basis, hostVersion, time),
            Box = original.Box,
            Target = new Target(basis.PlannedF0Hz, basis.PlannedQ, basis.PlannedDuty),
            Plan = new MeasurePlan(settings, harmonics, basis.DwellUs, basis.Samples, basis.SpacingUs),
            Survey = SurveyOf(basis, original.Dark[0]),
            Sweep = new SweepResult(original.Points, original.Dark[0], basis.MissingInSweep),
            OtherDuty = basis.OtherDuty,
            AtOtherDuty = new SweepResult(basis.AtOtherDuty, original.Dark[0], basis.MissingInChecks),
            AfterLongerDwell = new SweepResult(basis.AfterLongerDwell, original.Dark[0], 0),
            DarkBefore = original.Dark[0],
            DarkAfter = original.Dark[^1],
            Saturated = basis.Saturated,
        };
    }

    private static ReadOptions Options(Reading original, FitBasis basis, string hostVersion, TimeProvider time) => new()
    {
        Law = basis.Law,
        LowHz = basis.Survey?.LowHz ?? SurveySweep.LowHz,
        PrefactorExponent = basis.PrefactorExponent,
        Clock = basis.Clock,
        Pull = basis.Pull,
        Commissioned = basis.Commissioned,
        Coil = original.Coil,
        Note = original.Note,
        SetUp = original.SetUp,
        HostVersion = hostVersion,
        Time = time,
    };

    private static SurveyResult? SurveyOf(FitBasis basis, DarkLevel look) => basis.Survey is { } seen
        ? new SurveyResult([], [], look, [.. seen.Responses.Select(Response)], LargestAtEdge: false, Saturated: false)
        : null;

    private static Response Response(SeenResponse seen) => new(
        Enum.TryParse(seen.Kind, ignoreCase: true, out ResponseKind kind) ? kind : ResponseKind.Unknown,
        seen.FrequencyHz, seen.Amplitude, seen.Harmonic, double.NaN, double.NaN);

    private static Reading Document(Reading original, string hostVersion, DateTimeOffset now) => original with
    {
        Id = Guid.CreateVersion7(now),
        Utc = now,
        HostVersion = hostVersion,
        RingQ = double.NaN,
        RingQRelative = double.NaN,
        Basis = null,
    };

    /// <summary>The decay itself is not kept, so its Q stands as it was found; whether the sweep's agrees is judged anew.</summary>
    private static Reading WithRing(Reading original, ReadOutcome outcome, FitBasis basis)
    {
        IReadOnlyList<Reason> reasons = [.. original.Reasons.Where(reason => reason.Code == ReasonCode.RingTooShort)];
        bool tried = double.IsFinite(original.RingQ) || reasons.Count > 0;
        if (!tried || outcome.Fit is not { IsFitted: true } fit)
        {
            return outcome.Reading;
        }

        double ringQ = 1 / ((1 / original.RingQ) + (original.Basis?.Pull?.LossAdded ?? 0));
        double tauS = ringQ / (Math.PI * fit.F0Hz);
        var ring = new RingOutcome
        {
            At = original.Points[0].Setting,
            TauS = tauS,
            TauUncertaintyS = tauS * original.RingQRelative,
            F0Hz = fit.F0Hz,
            Reasons = reasons,
        };
        return RingSecondOpinion.With(outcome.Reading, fit.Q, ring, basis.Pull);
    }
}
