namespace Looseloop.Record;

/// <summary>What a merge has added.</summary>
/// <param name="Runs">Runs that were not there.</param>
/// <param name="Readings">Readings that were not there.</param>
/// <param name="Events">Events that were not there.</param>
/// <param name="Facts">Facts that were not there.</param>
/// <param name="AlreadyThere">Readings of the other record that were there already.</param>
public sealed record ImportResult(long Runs, long Readings, long Events, long Facts, long AlreadyThere);
