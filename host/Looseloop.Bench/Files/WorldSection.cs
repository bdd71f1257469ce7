using System.Globalization;
using Tomlyn.Syntax;

namespace Looseloop.Bench.Files;

/// <summary>One section of a world's file: hands out its values by key, and in the end names what nobody asked for.</summary>
internal sealed class WorldSection
{
    private readonly string _file;
    private readonly string _title;
    private readonly Dictionary<string, KeyValueSyntax> _values = [];

    public WorldSection(string file, string title, SyntaxList<KeyValueSyntax>? items)
    {
        _file = file;
        _title = title;
        if (items is null)
        {
            return;
        }

        foreach (KeyValueSyntax item in items)
        {
            string key = item.Key?.ToString().Trim() ?? "";
            if (!_values.TryAdd(key, item))
            {
                throw Wrong(item, $"'{key}' is given twice in {_title}");
            }
        }
    }

    /// <summary>A number between two bounds.</summary>
    public double Number(string key, double fallback, double least = 0, double most = 1e12)
    {
        if (!_values.Remove(key, out KeyValueSyntax? item))
        {
            return fallback;
        }

        double value = item.Value switch
        {
            FloatValueSyntax number => number.Value,
            IntegerValueSyntax number => number.Value,
            _ => throw Wrong(item, $"'{key}' in {_title} must be a number"),
        };
        if (!(value >= least && value <= most))
        {
            throw Wrong(item, string.Create(CultureInfo.InvariantCulture, $"'{key}' in {_title} is {value}, but must lie between {least} and {most}"));
        }

        return value;
    }

    /// <summary>A number that has no default.</summary>
    public double Needed(string key, double least, double most)
    {
        if (!_values.ContainsKey(key))
        {
            throw new WorldFileException($"{_file}: {_title} needs '{key}'.");
        }

        return Number(key, 0, least, most);
    }

    public int Whole(string key, int fallback, int least, int most)
    {
        _values.TryGetValue(key, out KeyValueSyntax? item);
        double value = Number(key, fallback, least, most);
        return value == Math.Floor(value) ? (int)value : throw Wrong(item!, $"'{key}' in {_title} must be a whole number");
    }

    public bool Flag(string key, bool fallback)
    {
        if (!_values.Remove(key, out KeyValueSyntax? item))
        {
            return fallback;
        }

        return item.Value is BooleanValueSyntax flag ? flag.Value : throw Wrong(item, $"'{key}' in {_title} must be true or false");
    }

    public string Text(string key, string fallback)
    {
        if (!_values.Remove(key, out KeyValueSyntax? item))
        {
            return fallback;
        }

        return item.Value is StringValueSyntax text ? text.Value ?? "" : throw Wrong(item, $"'{key}' in {_title} must be a text in quotes");
    }

    /// <summary>One of several words.</summary>
    public T Choice<T>(string key, T fallback, params (string Word, T Value)[] choices)
    {
        if (!_values.TryGetValue(key, out KeyValueSyntax? item))
        {
            return fallback;
        }

        string word = Text(key, "");
        foreach ((string known, T value) in choices)
        {
            if (known == word)
            {
                return value;
            }
        }

        string all = string.Join(", ", choices.Select(choice => $"\"{choice.Word}\""));
        throw Wrong(item, $"'{key}' in {_title} is \"{word}\", but must be one of {all}");
    }

    /// <summary>To be called when all known keys were asked for: what is left is unknown.</summary>
    public void Done()
    {
        foreach ((string key, KeyValueSyntax item) in _values)
        {
            throw Wrong(item, $"{_title} has no '{key}'");
        }
    }

    private WorldFileException Wrong(SyntaxNode node, string what) =>
        new($"{_file}, line {node.Span.Start.Line + 1}: {what}.");
}
