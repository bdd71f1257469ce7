using Looseloop.Link;

namespace Looseloop.Procedures.Logging;

/// <summary>Where links to one box come from, again and again: a port that may be unplugged, or a bench.</summary>
public interface IBoxSource
{
    /// <summary>What the user would call it.</summary>
    string Name { get; }

    /// <summary>The clock of its links: it goes on while none is open.</summary>
    TimeProvider Time { get; }

    /// <summary>Opens a link.</summary>
    /// <exception cref="LinkOpenException">The port is not there, or may not be opened.</exception>
    /// <exception cref="LinkLostException">It went away while it was opened.</exception>
    IByteLink Open();

    /// <summary>Lets time pass while no link is open.</summary>
    void Pause(TimeSpan duration, CancellationToken cancel);
}
