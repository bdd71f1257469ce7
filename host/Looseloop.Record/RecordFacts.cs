using Looseloop.Readings;

namespace Looseloop.Record;

/// <summary>What a record knows of boxes and coils, and where more is kept.</summary>
/// <param name="store">The record, open for writing.</param>
/// <param name="hostVersion">The program that finds new facts.</param>
public sealed class RecordFacts(RecordStore store, string hostVersion) : RecordedFacts(store.Reader), IBoxFacts, ICoilFacts
{
    /// <inheritdoc/>
    public void Keep(string box, DetectorLaw law) =>
        Keep(FactSubject.Box, box, Law, law.ReadOn ?? throw new ArgumentException("a law that no ladder has read is no finding", nameof(law)), FactJson.Of(law));

    /// <inheritdoc/>
    public void Keep(string box, ClockTrim trim) => Keep(FactSubject.Box, box, Clock, trim.On, FactJson.Of(trim));

    /// <inheritdoc/>
    public void Keep(string box, CommissioningRecord commissioning) =>
        Keep(FactSubject.Box, box, Commissioned, commissioning.Utc, FactJson.Of(commissioning));

    /// <inheritdoc/>
    public void Keep(string coil, IReadOnlyDictionary<string, string> setUp, DateTimeOffset utc) =>
        Keep(FactSubject.Coil, coil, SetUp, utc, TextMap.ToJson(setUp));

    /// <inheritdoc/>
    public void Keep(string coil, IReadOnlyDictionary<string, string> setUp, Pull pull) =>
        Keep(FactSubject.Coil, coil, Pulled, pull.On, FactJson.Of(pull, setUp));

    private void Keep(FactSubject subject, string name, string kind, DateTimeOffset utc, string json) =>
        store.Append(new Fact(Guid.CreateVersion7(), subject, name, kind, utc, hostVersion, json));
}
