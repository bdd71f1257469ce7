namespace Looseloop.Report.Plots;

/// <summary>Two dots across and four down to a character (Unicode block Braille Patterns).</summary>
internal sealed class BrailleField(int columns, int rows) : DotField(columns, rows, 2, 4)
{
    // Bits of the dots, left column then right, from the top (The Unicode Standard, Braille Patterns).
    private static readonly int[,] _bits = { { 0x01, 0x02, 0x04, 0x40 }, { 0x08, 0x10, 0x20, 0x80 } };

    private readonly int[,] _dots = new int[columns, rows];

    public override char Key(int series) => series < 0 ? '\u2506' : '\u25CF';

    protected override void SetDot(int column, int row, int across, int down, int series) => _dots[column, row] |= _bits[across, down];

    protected override char Character(int column, int row) => _dots[column, row] == 0 ? ' ' : (char)(0x2800 + _dots[column, row]);
}
