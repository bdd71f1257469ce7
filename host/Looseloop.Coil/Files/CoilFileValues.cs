namespace Looseloop.Coil;

/// <summary>Takes values out of a coil file by path, and notes what is missing, of the wrong kind, or never asked for.</summary>
internal sealed class CoilFileValues(TomlEntries entries)
{
    private readonly Dictionary<string, TomlEntry> _values = entries.Values
        .GroupBy(v => v.Path, StringComparer.Ordinal).ToDictionary(g => g.Key, g => g.First(), StringComparer.Ordinal);

    private readonly HashSet<string> _used = new(StringComparer.Ordinal);

    public List<CoilFileError> Errors { get; } = [];

    public bool Has(string path) => _values.ContainsKey(path);

    public bool HasTable(string path) =>
        entries.Tables.Any(t => IsAt(t.Path, path)) || _values.Keys.Any(k => k.StartsWith(path + ".", StringComparison.Ordinal));

    /// <summary>The line of a value, or of the table it would stand in, or 1.</summary>
    public int LineOf(string path)
    {
        if (_values.TryGetValue(path, out TomlEntry? entry))
        {
            return entry.Line;
        }

        int dot = path.LastIndexOf('.');
        string table = dot > 0 ? path[..dot] : "";
        return entries.Tables.Where(t => t.Path == table).Select(t => t.Line).FirstOrDefault(1);
    }

    public double? Number(string path, bool required)
    {
        switch (Take(path, required))
        {
            case null:
                return null;
            case { Value: double number }:
                return number;
            default:
                Refuse<object>(path, path + " must be a number");
                return null;
        }
    }

    public string? Word(string path, bool required)
    {
        switch (Take(path, required))
        {
            case null:
                return null;
            case { Value: string word }:
                return word;
            default:
                return Refuse<string>(path, path + " must be a text in quotation marks");
        }
    }

    /// <summary>All numbers whose path begins so, without that beginning.</summary>
    public Dictionary<string, double> Numbers(string prefix)
    {
        var numbers = new Dictionary<string, double>(StringComparer.Ordinal);
        foreach (string path in _values.Keys.Where(k => k.StartsWith(prefix, StringComparison.Ordinal)))
        {
            if (Number(path, required: false) is double number)
            {
                numbers[path[prefix.Length..]] = number;
            }
        }

        return numbers;
    }

    /// <summary>Notes an error at a value's line.</summary>
    public T? Refuse<T>(string path, string text)
        where T : class
    {
        Errors.Add(new CoilFileError(LineOf(path), text));
        return null;
    }

    /// <summary>Values that nobody asked for.</summary>
    public IEnumerable<TomlEntry> Unused() => entries.Values.Where(v => !_used.Contains(v.Path)
        && !v.Path.StartsWith("tolerance.", StringComparison.Ordinal));

    private TomlEntry? Take(string path, bool required)
    {
        if (_values.TryGetValue(path, out TomlEntry? entry))
        {
            _used.Add(path);
            return entry;
        }

        if (required)
        {
            Errors.Add(new CoilFileError(LineOf(path), $"{path} is missing"));
        }

        return null;
    }

    private static bool IsAt(string table, string path) =>
        table == path || table.StartsWith(path + ".", StringComparison.Ordinal);
}
