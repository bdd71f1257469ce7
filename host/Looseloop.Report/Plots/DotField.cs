using Spectre.Console;
using Spectre.Console.Rendering;

namespace Looseloop.Report.Plots;

/// <summary>A grid of characters, each holding one or more dots.</summary>
internal abstract class DotField(int columns, int rows, int dotsAcross, int dotsDown)
{
    /// <summary>The owner of each character: the series that was drawn there last, -1 a mark, -2 nobody.</summary>
    private readonly int[,] _owner = Filled(columns, rows);

    public int Columns { get; } = columns;

    public int Rows { get; } = rows;

    /// <summary>Dots across the whole field.</summary>
    public int Across { get; } = columns * dotsAcross;

    /// <summary>Dots down the whole field.</summary>
    public int Down { get; } = rows * dotsDown;

    /// <summary>Sets a dot, counted from the upper left; outside the field nothing happens.</summary>
    public void Set(int x, int y, int series)
    {
        if (x < 0 || y < 0 || x >= Across || y >= Down)
        {
            return;
        }

        int column = x / dotsAcross;
        int row = y / dotsDown;
        _owner[column, row] = series;
        SetDot(column, row, x % dotsAcross, y % dotsDown, series);
    }

    /// <summary>A row's characters, joined where they share an owner.</summary>
    public void AppendRow(int row, List<Segment> segments, Func<int, Style> style)
    {
        int from = 0;
        for (int column = 1; column <= Columns; column++)
        {
            if (column == Columns || _owner[column, row] != _owner[from, row])
            {
                char[] text = [.. Enumerable.Range(from, column - from).Select(c => Character(c, row))];
                int owner = _owner[from, row];
                segments.Add(new Segment(new string(text), owner == -2 ? Style.Plain : style(owner)));
                from = column;
            }
        }
    }

    /// <summary>What stands for a series in the legend.</summary>
    public abstract char Key(int series);

    protected abstract void SetDot(int column, int row, int across, int down, int series);

    protected abstract char Character(int column, int row);

    private static int[,] Filled(int columns, int rows)
    {
        int[,] owner = new int[columns, rows];
        for (int c = 0; c < columns; c++)
        {
            for (int r = 0; r < rows; r++)
            {
                owner[c, r] = -2;
            }
        }

        return owner;
    }
}
