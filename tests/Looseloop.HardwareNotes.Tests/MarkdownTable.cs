using System.Globalization;
using System.Text;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>Rows of text as a Markdown table.</summary>
internal sealed class MarkdownTable
{
    private readonly StringBuilder _text = new();

    public MarkdownTable(params string[] heads)
    {
        Row(heads);
        Row([.. heads.Select(_ => "---")]);
    }

    public MarkdownTable Row(params string[] cells)
    {
        _text.Append("| ").AppendJoin(" | ", cells).Append(" |\n");
        return this;
    }

    public override string ToString() => _text.ToString();

    /// <summary>A number with so many significant digits, without an exponent.</summary>
    public static string Digits(double value, int significant)
    {
        if (value == 0)
        {
            return "0";
        }

        int decimals = Math.Max(0, significant - 1 - (int)Math.Floor(Math.Log10(Math.Abs(value))));
        return Math.Round(value, Math.Min(decimals, 15)).ToString("F" + decimals, CultureInfo.InvariantCulture);
    }

    public static string Fixed(double value, int decimals) => value.ToString("F" + decimals, CultureInfo.InvariantCulture);
}
