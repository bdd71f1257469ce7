using System.Globalization;
using Spectre.Console;

namespace Looseloop.Rendering;

/// <summary>A small curve in the terminal: dots of braille, two by four to a character, with the extremes written beside.</summary>
internal sealed class BrailleCanvas
{
    // Bits of the dots of one character, column by column from the top (Unicode 15, block 2800).
    private static readonly int[,] _bits = { { 0x01, 0x02, 0x04, 0x40 }, { 0x08, 0x10, 0x20, 0x80 } };
    private readonly int[,] _cells;
    private readonly int _columns;
    private readonly int _rows;

    public BrailleCanvas(int columns, int rows)
    {
        _columns = columns;
        _rows = rows;
        _cells = new int[columns, rows];
    }

    /// <summary>Draws y over x with lines between neighbours, scaled to the extremes; values that are not numbers part the curve.</summary>
    public static void Write(IAnsiConsole console, IReadOnlyList<double> x, IReadOnlyList<double> y, Func<double, string> yWords, string xFrom, string xTo)
    {
        List<int> good = [.. Enumerable.Range(0, x.Count).Where(i => double.IsFinite(y[i]) && double.IsFinite(x[i]))];
        if (good.Count < 2)
        {
            return;
        }

        double low = good.Min(i => y[i]);
        double high = good.Max(i => y[i]);
        double left = good.Min(i => x[i]);
        double right = good.Max(i => x[i]);
        var canvas = new BrailleCanvas(60, 10);
        (double X, double Y) Place(int i) => (
            right > left ? (x[i] - left) / (right - left) * 119 : 0, high > low ? (high - y[i]) / (high - low) * 39 : 20);
        for (int k = 1; k < good.Count; k++)
        {
            if (good[k] == good[k - 1] + 1)
            {
                canvas.Line(Place(good[k - 1]), Place(good[k]));
            }
        }

        string[] lines = canvas.Lines();
        int width = Math.Max(yWords(high).Length, yWords(low).Length);
        for (int row = 0; row < lines.Length; row++)
        {
            string label = row == 0 ? yWords(high) : row == lines.Length - 1 ? yWords(low) : "";
            console.WriteLine($"{label.PadLeft(width)} {lines[row].TrimEnd('\u2800')}");
        }

        console.WriteLine($"{new string(' ', width)} {xFrom}{xTo.PadLeft(Math.Max(xTo.Length + 1, 60 - xFrom.Length))}");
    }

    private void Line((double X, double Y) from, (double X, double Y) to)
    {
        int steps = 1 + (int)Math.Max(Math.Abs(to.X - from.X), Math.Abs(to.Y - from.Y));
        for (int i = 0; i <= steps; i++)
        {
            double t = (double)i / steps;
            Dot((int)Math.Round(from.X + (t * (to.X - from.X))), (int)Math.Round(from.Y + (t * (to.Y - from.Y))));
        }
    }

    private void Dot(int x, int y)
    {
        if (x >= 0 && y >= 0 && x / 2 < _columns && y / 4 < _rows)
        {
            _cells[x / 2, y / 4] |= _bits[x % 2, y % 4];
        }
    }

    private string[] Lines() => [.. Enumerable.Range(0, _rows).Select(row =>
        string.Concat(Enumerable.Range(0, _columns).Select(column => ((char)(0x2800 + _cells[column, row])).ToString(CultureInfo.InvariantCulture))))];
}
