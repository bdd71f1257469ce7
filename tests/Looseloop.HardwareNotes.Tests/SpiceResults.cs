using System.Globalization;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>Names and values as hardware-notes/spice/run.sh prints them.</summary>
internal sealed class SpiceResults
{
    private readonly Dictionary<string, double> _values = new(StringComparer.Ordinal);

    private SpiceResults(string text)
    {
        foreach (string line in text.Split('\n', StringSplitOptions.RemoveEmptyEntries))
        {
            string[] parts = line.Split(' ');
            _values.Add(parts[0], double.Parse(parts[1], NumberStyles.Float, CultureInfo.InvariantCulture));
        }
    }

    /// <summary>The results that stand in the repository.</summary>
    public static SpiceResults Committed { get; } =
        new(File.ReadAllText(NotesFolder.File(Path.Combine("spice", "results.txt"))));

    public IReadOnlyCollection<string> Names => _values.Keys;

    public double this[string name] => _values[name];

    public static SpiceResults Parse(string text) => new(text);

    /// <summary>The law's points: amplitude in volts, output in millivolts.</summary>
    public IEnumerable<(double AmplitudeV, double OutputMv)> Law(string detector)
    {
        string start = detector + ".law_mv.at_volt_";
        return _values
            .Where(pair => pair.Key.StartsWith(start, StringComparison.Ordinal))
            .Select(pair => (double.Parse(pair.Key[start.Length..], NumberStyles.Float, CultureInfo.InvariantCulture), pair.Value));
    }
}
