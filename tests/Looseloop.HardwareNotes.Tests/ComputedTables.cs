namespace Looseloop.HardwareNotes.Tests;

/// <summary>Every computed part of the pages by its name.</summary>
internal static class ComputedTables
{
    private static readonly Dictionary<string, Func<string>> _byName = new(StringComparer.Ordinal)
    {
        ["loop"] = LoopTables.Loop,
        ["field"] = LoopTables.Field,
        ["coupling"] = LoopTables.Coupling,
        ["antenna"] = AntennaTable.Antenna,
        ["ring-times"] = TimeTables.RingTimes,
        ["grid"] = GridTables.Grid,
        ["frequency-check"] = GridTables.Check,
        ["diode-law"] = SpiceTables.DiodeLaw,
        ["diode-figures"] = SpiceTables.DiodeFigures,
        ["peak-law"] = SpiceTables.PeakLaw,
        ["peak-figures"] = SpiceTables.PeakFigures,
        ["drive"] = SpiceTables.Drive,
        ["current"] = SpiceTables.Current,
        ["enable"] = SpiceTables.Enable,
    };

    public static IEnumerable<string> Names => _byName.Keys;

    public static string Compute(string name) => _byName[name]();
}
