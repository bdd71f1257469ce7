namespace Looseloop.Procedures.SetUp;

/// <summary>
/// What stands with a coil and decides its reading. A set-up is a dictionary of these keys; a key that is missing was not
/// stated.
/// </summary>
public static class SetUpFields
{
    public const string TopLoad = "top load";
    public const string BaseEarth = "base earth";
    public const string Primary = "primary";
    public const string LoopPlace = "loop";
    public const string PickupPlace = "pickup";
    public const string HostPower = "host power";

    /// <summary>Every key, in the order in which they are shown.</summary>
    public static IReadOnlyList<string> All { get; } = [TopLoad, BaseEarth, Primary, LoopPlace, PickupPlace, HostPower];

    /// <summary>What a key may be; empty where any words do.</summary>
    public static IReadOnlyList<string> Allowed(string field) => field switch
    {
        Primary => ["absent", "open", "shorted"],
        HostPower => ["battery", "mains"],
        _ => [],
    };

    /// <summary>Keys that a set-up leaves out.</summary>
    public static IReadOnlyList<string> Unstated(IReadOnlyDictionary<string, string> setUp) =>
        [.. All.Where(field => !setUp.ContainsKey(field))];

    /// <summary>A set-up with some of it stated anew; an empty text takes a key out.</summary>
    /// <exception cref="ArgumentException">A text that its key does not allow.</exception>
    public static IReadOnlyDictionary<string, string> With(
        IReadOnlyDictionary<string, string> setUp, IEnumerable<KeyValuePair<string, string>> stated)
    {
        var changed = new Dictionary<string, string>(setUp);
        foreach ((string field, string text) in stated)
        {
            IReadOnlyList<string> allowed = Allowed(field);
            if (text.Length == 0)
            {
                changed.Remove(field);
            }
            else if (allowed.Count > 0 && !allowed.Contains(text))
            {
                throw new ArgumentException($"{field} is {string.Join(", ", allowed)}, not '{text}'.", nameof(stated));
            }
            else
            {
                changed[field] = text;
            }
        }

        return changed;
    }

    /// <summary>What to mind in a set-up, one sentence each.</summary>
    public static IEnumerable<string> Advice(IReadOnlyDictionary<string, string> setUp)
    {
        if (setUp.TryGetValue(Primary, out string? primary) && primary != "absent")
        {
            yield return primary == "shorted"
                ? "A shorted primary raises f0 by k^2/2 of it and takes Q: this is not the coil alone."
                : "An open primary may resonate by itself with its own wiring: keep its leads apart.";
        }

        if (setUp.TryGetValue(HostPower, out string? power) && power == "mains")
        {
            yield return "A computer on mains ties the box to the mains earth: read once on battery and see whether f0 stays.";
        }

        if (setUp.TryGetValue(BaseEarth, out string? earth) && earth is "no" or "none" or "floating")
        {
            yield return "A base that is not earthed makes the cable part of the coil: earth it as it will run.";
        }

        yield return "Read again after moving the cable: what changes is the cable's, not the coil's.";
    }
}
