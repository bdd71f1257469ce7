namespace Looseloop.Bench;

/// <summary>A world's file cannot be used. The message names the file, the line and what to put right.</summary>
public sealed class WorldFileException : Exception
{
    public WorldFileException(string message)
        : base(message)
    {
    }

    public WorldFileException(string message, Exception inner)
        : base(message, inner)
    {
    }
}
