using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>What a record knows of boxes and coils.</summary>
/// <param name="store">The record, open for writing.</param>
/// <param name="hostVersion">The program that finds new facts.</param>
public sealed class RecordFacts(RecordStore store, string hostVersion) : IBoxFacts, ICoilFacts
{
    private const string Law = "detector-law";
    private const string Clock = "clock-trim";
    private const string Commissioned = "commissioning";
    private const string SetUp = "set-up";
    private const string Pulled = "pull";

    /// <inheritdoc/>
    public DetectorLaw? LawOf(string box) =>
        store.Reader.LatestFact(FactSubject.Box, box, Law) is { } fact ? FactJson.ToLaw(fact.Json) : null;

    /// <inheritdoc/>
    public ClockTrim? ClockOf(string box) =>
        store.Reader.LatestFact(FactSubject.Box, box, Clock) is { } fact ? FactJson.ToClock(fact.Json) : null;

    /// <inheritdoc/>
    public void Keep(string box, DetectorLaw law) =>
        Keep(FactSubject.Box, box, Law, law.ReadOn ?? throw new ArgumentException("a law that no ladder has read is no finding", nameof(law)), FactJson.Of(law));

    /// <inheritdoc/>
    public void Keep(string box, ClockTrim trim) => Keep(FactSubject.Box, box, Clock, trim.On, FactJson.Of(trim));

    /// <inheritdoc/>
    public IReadOnlyList<CommissioningRecord> CommissioningsOf(string box) =>
        [.. store.Reader.Facts(FactSubject.Box, box, Commissioned).Select(fact => FactJson.ToCommissioning(fact.Json))];

    /// <inheritdoc/>
    public void Keep(string box, CommissioningRecord commissioning) =>
        Keep(FactSubject.Box, box, Commissioned, commissioning.Utc, FactJson.Of(commissioning));

    /// <inheritdoc/>
    public IReadOnlyDictionary<string, string> SetUpOf(string coil) =>
        store.Reader.LatestFact(FactSubject.Coil, coil, SetUp) is { } fact ? TextMap.FromJson(fact.Json) : new Dictionary<string, string>();

    /// <inheritdoc/>
    public Pull? PullOf(string coil, IReadOnlyDictionary<string, string> setUp)
    {
        string wanted = TextMap.ToJson(setUp);
        Fact? newest = store.Reader.Facts(FactSubject.Coil, coil, Pulled).LastOrDefault(fact => FactJson.SetUpOf(fact.Json) == wanted);
        return newest is null ? null : FactJson.ToPull(newest.Json);
    }

    /// <inheritdoc/>
    public void Keep(string coil, IReadOnlyDictionary<string, string> setUp, DateTimeOffset utc) =>
        Keep(FactSubject.Coil, coil, SetUp, utc, TextMap.ToJson(setUp));

    /// <inheritdoc/>
    public void Keep(string coil, IReadOnlyDictionary<string, string> setUp, Pull pull) =>
        Keep(FactSubject.Coil, coil, Pulled, pull.On, FactJson.Of(pull, setUp));

    private void Keep(FactSubject subject, string name, string kind, DateTimeOffset utc, string json) =>
        store.Append(new Fact(Guid.CreateVersion7(), subject, name, kind, utc, hostVersion, json));
}
