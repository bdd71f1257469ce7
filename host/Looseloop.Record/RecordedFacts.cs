using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>What a record knows of boxes and coils; it takes no more than to read the record.</summary>
/// <param name="record">The record.</param>
public class RecordedFacts(RecordReader record)
{
    private protected const string Law = "detector-law";
    private protected const string Clock = "clock-trim";
    private protected const string Commissioned = "commissioning";
    private protected const string SetUp = "set-up";
    private protected const string Pulled = "pull";

    /// <summary>The detector's law as a ladder last read it, or null where none did.</summary>
    public DetectorLaw? LawOf(string box) =>
        record.LatestFact(FactSubject.Box, box, Law) is { } fact ? FactJson.ToLaw(fact.Json) : null;

    /// <summary>The clock's error as last found, or null where it never was.</summary>
    public ClockTrim? ClockOf(string box) =>
        record.LatestFact(FactSubject.Box, box, Clock) is { } fact ? FactJson.ToClock(fact.Json) : null;

    /// <summary>All commissionings of a box, the oldest first.</summary>
    public IReadOnlyList<CommissioningRecord> CommissioningsOf(string box) =>
        [.. record.Facts(FactSubject.Box, box, Commissioned).Select(fact => FactJson.ToCommissioning(fact.Json))];

    /// <summary>What stands with the coil, key and value; empty where nothing was stated.</summary>
    public IReadOnlyDictionary<string, string> SetUpOf(string coil) =>
        record.LatestFact(FactSubject.Coil, coil, SetUp) is { } fact ? TextMap.FromJson(fact.Json) : new Dictionary<string, string>();

    /// <summary>The pull that a standoff last found for this coil and exactly this set-up, or null where none did.</summary>
    public Pull? PullOf(string coil, IReadOnlyDictionary<string, string> setUp)
    {
        string wanted = TextMap.ToJson(setUp);
        Fact? newest = record.Facts(FactSubject.Coil, coil, Pulled).LastOrDefault(fact => FactJson.SetUpOf(fact.Json) == wanted);
        return newest is null ? null : FactJson.ToPull(newest.Json);
    }
}
