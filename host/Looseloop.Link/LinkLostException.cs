namespace Looseloop.Link;

/// <summary>The bytes have stopped for good: unplugged, powered off, or the other end has closed.</summary>
public sealed class LinkLostException : IOException
{
    public LinkLostException(string message)
        : base(message)
    {
    }

    public LinkLostException(string message, Exception inner)
        : base(message, inner)
    {
    }
}
