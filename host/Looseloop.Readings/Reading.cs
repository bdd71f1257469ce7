namespace Looseloop.Readings;

/// <summary>f0 and Q of a coil as it stands, with everything they came from.</summary>
public sealed record Reading
{
    /// <summary>Unique on every machine and ordered in time (UUID version 7).</summary>
    public required Guid Id { get; init; }

    /// <summary>When it was complete.</summary>
    public required DateTimeOffset Utc { get; init; }

    /// <summary>Board time at the middle of its points, microseconds.</summary>
    public required long BoardTimeUs { get; init; }

    /// <summary>The host's monotonic clock when it was complete, seconds from an arbitrary zero; NaN where unknown.</summary>
    public double MonotonicS { get; init; } = double.NaN;

    /// <summary>Temperature of the coil or its room by the box's thermistor, degrees Celsius; NaN where there is none.</summary>
    public double TemperatureC { get; init; } = double.NaN;

    /// <summary>How long the box worked on it, seconds of board time, the looks and the survey included.</summary>
    public required double BoardSeconds { get; init; }

    public required BoxIdentity Box { get; init; }

    /// <summary>The host program's version.</summary>
    public required string HostVersion { get; init; }

    /// <summary>The coil's name, or null where none was given.</summary>
    public string? Coil { get; init; }

    /// <summary>The user's note, or null.</summary>
    public string? Note { get; init; }

    /// <summary>What stands with the coil, key and value; empty where nothing was stated.</summary>
    public IReadOnlyDictionary<string, string> SetUp { get; init; } = new Dictionary<string, string>();

    /// <summary>Resonant frequency, hertz; NaN where the verdict is none.</summary>
    public required double F0Hz { get; init; }

    /// <summary>Quality factor; NaN where the verdict is none.</summary>
    public required double Q { get; init; }

    /// <summary>Peak amplitude in counts of a linear detector at duty 1/2; NaN where unknown.</summary>
    public required double PeakCounts { get; init; }

    /// <summary>Feed-through over peak amplitude; NaN where unknown.</summary>
    public double FeedThrough { get; init; } = double.NaN;

    /// <summary>Q by ring-down, or NaN where none was taken.</summary>
    public double RingQ { get; init; } = double.NaN;

    /// <summary>Its relative standard uncertainty, or NaN.</summary>
    public double RingQRelative { get; init; } = double.NaN;

    public required Budget Budget { get; init; }

    public required Verdict Verdict { get; init; }

    public required IReadOnlyList<Reason> Reasons { get; init; }

    /// <summary>The raw points that f0 and Q came from, in the order they were taken.</summary>
    public required IReadOnlyList<RawPoint> Points { get; init; }

    /// <summary>The dark levels taken before, between and after.</summary>
    public required IReadOnlyList<DarkLevel> Dark { get; init; }

    /// <summary>
    /// What the fit was made with; null where there was none, and for a tracked reading, whose fit rests on the full reading
    /// before it. Readings kept before version 3 of the record's form have none.
    /// </summary>
    public FitBasis? Basis { get; init; }
}
