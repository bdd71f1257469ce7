namespace Looseloop.Report.Plots;

/// <summary>One mark to a character, told apart by its shape, for terminals without Unicode.</summary>
internal sealed class CharacterField(int columns, int rows) : DotField(columns, rows, 1, 1)
{
    private const string Keys = "*+ox#";

    private readonly char[,] _marks = new char[columns, rows];

    public override char Key(int series) => series < 0 ? ':' : Keys[series % Keys.Length];

    protected override void SetDot(int column, int row, int across, int down, int series) => _marks[column, row] = Key(series);

    protected override char Character(int column, int row) => _marks[column, row] == 0 ? ' ' : _marks[column, row];
}
