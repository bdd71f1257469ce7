using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Read;

/// <summary>What a reading is told beforehand.</summary>
public sealed record ReadOptions
{
    /// <summary>The detector's law, as read or declared.</summary>
    public required DetectorLaw Law { get; init; }

    /// <summary>Where to look without a survey, hertz; null for a survey.</summary>
    public double? NearHz { get; init; }

    /// <summary>The survey's range, hertz.</summary>
    public double LowHz { get; init; } = SurveySweep.LowHz;

    /// <summary>The survey's range, hertz.</summary>
    public double HighHz { get; init; } = SurveySweep.HighHz;

    /// <summary>Mains frequency, hertz: samples are spread over whole periods of it.</summary>
    public double MainsHz { get; init; } = 50;

    /// <summary>n of the amplitude's prefactor (f/f0)^n: 0 for a loop that is mostly resistance, -1 for one that is mostly inductance.</summary>
    public double PrefactorExponent { get; init; }

    /// <summary>The box's clock error, or null where it was never trimmed.</summary>
    public ClockTrim? Clock { get; init; }

    /// <summary>What loop, pickup and people pull in this set-up, or null where no standoff was taken.</summary>
    public Pull? Pull { get; init; }

    /// <summary>True if the box has been commissioned.</summary>
    public bool Commissioned { get; init; }

    /// <summary>Takes Q from ring-downs too.</summary>
    public bool Ring { get; init; }

    public string? Coil { get; init; }

    public string? Note { get; init; }

    public IReadOnlyDictionary<string, string> SetUp { get; init; } = new Dictionary<string, string>();

    public required string HostVersion { get; init; }

    /// <summary>The host's own clock, for the time of the reading.</summary>
    public required TimeProvider Time { get; init; }
}
