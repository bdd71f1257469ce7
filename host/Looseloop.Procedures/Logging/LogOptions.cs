using Looseloop.Box;
using Looseloop.Procedures.Read;

namespace Looseloop.Procedures.Logging;

/// <summary>What a log is told beforehand.</summary>
public sealed record LogOptions
{
    /// <summary>How readings are taken; the log puts the source's clock in.</summary>
    public required ReadOptions Read { get; init; }

    /// <summary>
    /// Says how readings are taken once the box has identified itself, with what is known of it and of the coil; null where
    /// <see cref="Read"/> says it all.
    /// </summary>
    public Func<BoxSession, ReadOptions>? ReadOf { get; init; }

    /// <summary>From reading to reading; zero for one after the other.</summary>
    public TimeSpan Every { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>For how long, or null: until interrupted or settled.</summary>
    public TimeSpan? For { get; init; }

    /// <summary>Ends when f0 is settled.</summary>
    public bool UntilSettled { get; init; }

    /// <summary>
    /// The coil is energised now and then while the log goes on. Each time the field has ended, f0 and Q are extrapolated from
    /// the cool-down back to that moment. Without this a field only pauses the log.
    /// </summary>
    public bool BetweenRuns { get; init; }

    /// <summary>How long no field may have been seen before the box drives again.</summary>
    public TimeSpan LockOut { get; init; } = TimeSpan.FromSeconds(30);

    /// <summary>From full reading to full reading; tracked ones stand between.</summary>
    public TimeSpan FullEvery { get; init; } = TimeSpan.FromMinutes(15);

    /// <summary>How long a box that answers to its port may take to identify itself.</summary>
    public TimeSpan Patience { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>The user's options as they are kept with the run.</summary>
    public IReadOnlyDictionary<string, string> Stated { get; init; } = new Dictionary<string, string>();
}
