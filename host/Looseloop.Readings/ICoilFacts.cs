namespace Looseloop.Readings;

/// <summary>
/// What is known of coils and their places: kept under the coil's name. What was kept before stays on record; the latest
/// is given back.
/// </summary>
public interface ICoilFacts
{
    /// <summary>What stands with the coil, key and value; empty where nothing was stated.</summary>
    IReadOnlyDictionary<string, string> SetUpOf(string coil);

    /// <summary>The pull that a standoff last found for this coil and exactly this set-up, or null where none did.</summary>
    Pull? PullOf(string coil, IReadOnlyDictionary<string, string> setUp);

    /// <summary>Keeps what stands with the coil, all of it. A call that returns has kept it.</summary>
    void Keep(string coil, IReadOnlyDictionary<string, string> setUp, DateTimeOffset utc);

    /// <summary>Keeps the pull found for a coil and set-up. A call that returns has kept it.</summary>
    void Keep(string coil, IReadOnlyDictionary<string, string> setUp, Pull pull);
}
