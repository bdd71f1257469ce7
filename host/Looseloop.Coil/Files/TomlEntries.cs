using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace Looseloop.Coil;

/// <summary>One value of a TOML text with the place it stands at.</summary>
/// <param name="Path">Dotted, bodies of a stack numbered from 1 as in <c>top_load.2.kind</c>; a lone <c>[[table]]</c> has no number.</param>
/// <param name="Value">A double, string, bool, or null for any other kind.</param>
/// <param name="Line">Counted from 1.</param>
internal sealed record TomlEntry(string Path, object? Value, int Line);

/// <summary>A TOML text as a flat list of values with line numbers: dotted keys, tables, inline tables and arrays of tables alike.</summary>
internal sealed class TomlEntries
{
    private readonly Dictionary<string, int> _arrayCounts = new(StringComparer.Ordinal);
    private readonly Dictionary<string, int> _arrayTotals = new(StringComparer.Ordinal);

    private TomlEntries()
    {
    }

    /// <summary>All values.</summary>
    public List<TomlEntry> Values { get; } = [];

    /// <summary>The tables that were opened, with the lines of their headers.</summary>
    public List<(string Path, int Line)> Tables { get; } = [];

    /// <summary>What the TOML itself is wrong with.</summary>
    public List<CoilFileError> Errors { get; } = [];

    /// <summary>How often a table of an array was opened; 0 for others.</summary>
    public int CountOf(string path) => _arrayTotals.GetValueOrDefault(path);

    /// <summary>Reads a text.</summary>
    public static TomlEntries Read(string text)
    {
        var entries = new TomlEntries();
        DocumentSyntax document = SyntaxParser.Parse(text, "coil file", true);
        foreach (DiagnosticMessage message in document.Diagnostics)
        {
            entries.Errors.Add(new CoilFileError(message.Span.Start.Line + 1, "this is not TOML: " + message.Message));
        }

        if (entries.Errors.Count > 0)
        {
            return entries;
        }

        foreach (TableSyntaxBase table in document.Tables)
        {
            if (table is TableArraySyntax && table.Name is not null)
            {
                string name = NameOf(table.Name);
                entries._arrayTotals[name] = entries._arrayTotals.GetValueOrDefault(name) + 1;
            }
        }

        entries.Take(document.KeyValues, "");
        foreach (TableSyntaxBase table in document.Tables)
        {
            string path = table.Name is null ? "" : NameOf(table.Name);
            if (table is TableArraySyntax)
            {
                int number = entries._arrayCounts[path] = entries._arrayCounts.GetValueOrDefault(path) + 1;
                path = entries._arrayTotals[path] > 1 ? FormattableString.Invariant($"{path}.{number}") : path;
            }

            entries.Tables.Add((path, table.Span.Start.Line + 1));
            entries.Take(table.Items, path + ".");
        }

        return entries;
    }

    private void Take(IEnumerable<KeyValueSyntax> items, string prefix)
    {
        foreach (KeyValueSyntax item in items)
        {
            if (item.Key is not null)
            {
                Take(prefix + NameOf(item.Key), item.Value, item.Span.Start.Line + 1);
            }
        }
    }

    private void Take(string path, ValueSyntax? value, int line)
    {
        if (value is InlineTableSyntax table)
        {
            Tables.Add((path, line));
            Take(table.Items.Select(i => i.KeyValue!), path + ".");
            return;
        }

        Values.Add(new TomlEntry(path, value switch
        {
            FloatValueSyntax number => number.Value,
            IntegerValueSyntax number => (double)number.Value,
            StringValueSyntax word => word.Value ?? "",
            BooleanValueSyntax flag => flag.Value,
            _ => null,
        }, line));
    }

    private static string NameOf(KeySyntax key)
    {
        string name = Part(key.Key);
        foreach (DottedKeyItemSyntax item in key.DotKeys)
        {
            name += "." + Part(item.Key);
        }

        return name;
    }

    private static string Part(BareKeyOrStringValueSyntax? part) => part switch
    {
        StringValueSyntax quoted => quoted.Value ?? "",
        BareKeySyntax bare => bare.Key?.Text ?? "",
        _ => "",
    };
}
