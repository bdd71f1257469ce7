using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Procedures.Read;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Logging;

/// <summary>
/// Keeps a log on its box: reconnects after an unplugging with growing pauses, identifies again after a reset, and sets the
/// interlock's limits anew, for they are gone then.
/// </summary>
internal sealed class BoxKeeper(IBoxSource source, LogOptions options, LogState state, CancellationToken cancel)
{
    private static readonly TimeSpan _firstWait = TimeSpan.FromMilliseconds(250);
    private static readonly TimeSpan _longestWait = TimeSpan.FromSeconds(10);

    private IByteLink? _link;
    private LineTotals _before;
    private LimitsAnswer? _limits;
    private TimeSpan _wait = _firstWait;

    /// <summary>The session, or null while the box is lost.</summary>
    public BoxSession? Session { get; private set; }

    /// <summary>The interlock's limits, as they stood at the start.</summary>
    public LimitsAnswer Limits => _limits ?? throw new InvalidOperationException("no box was ever open");

    /// <summary>The box as it last identified itself.</summary>
    public BoxIdentity? Known { get; private set; }

    /// <summary>Opens the box for the first time and sets its interlock by its detector's law.</summary>
    /// <returns>How readings are taken of it.</returns>
    public ReadOptions Begin()
    {
        _link = source.Open();
        Session = BoxSession.Open(_link, options.Patience, cancel);
        Known = Session.Identity;
        ReadOptions read = options.ReadOf?.Invoke(Session) ?? options.Read;
        Interlock.Set(Session, read.Law);
        _limits = Session.Limits();
        return read;
    }

    /// <summary>The exchange with the box went wrong: asks it who it is, on the same link.</summary>
    /// <returns>False where it does not answer: the link counts as lost.</returns>
    public bool IdentifyAgain(RunWriter writer)
    {
        BoxSession? old = Session;
        try
        {
            if (old is null || _link is null)
            {
                return false;
            }

            _before = _before.Plus(old.Counters);
            Session = null;
            Take(BoxSession.Open(_link, options.Patience, cancel), writer);
            return true;
        }
        catch (Exception error) when (error is LinkLostException or BoxException)
        {
            Drop();
            return false;
        }
    }

    /// <summary>Gives the link up.</summary>
    public void Drop()
    {
        if (Session is not null)
        {
            _before = _before.Plus(Session.Counters);
        }

        Session = null;
        _link?.Dispose();
        _link = null;
        _wait = _firstWait;
    }

    /// <summary>Waits, then tries once to find the box again.</summary>
    /// <param name="writer">Told when it is found.</param>
    /// <param name="lostAt">When it was lost.</param>
    /// <param name="most">Longest wait.</param>
    /// <returns>True if it is back.</returns>
    public bool TryReconnect(RunWriter writer, DateTimeOffset lostAt, TimeSpan most)
    {
        source.Pause(_wait < most ? _wait : most, cancel);
        _wait = TimeSpan.FromSeconds(Math.Min(2 * _wait.TotalSeconds, _longestWait.TotalSeconds));
        try
        {
            _link = source.Open();
            BoxSession session = BoxSession.Open(_link, options.Patience, cancel);
            DateTimeOffset now = writer.Now;
            state.Reconnects++;
            writer.Keep(
                RunEventKind.Reconnected,
                $"The box answers again after {(now - lostAt).TotalSeconds:0.0} s, boot {session.Identity.BootId}.", lostAt, now);
            Take(session, writer);
            _wait = _firstWait;
            return true;
        }
        catch (Exception error) when (error is LinkLostException or LinkOpenException or BoxException)
        {
            Session = null;
            _link?.Dispose();
            _link = null;
            return false;
        }
    }

    /// <summary>Line counts of all sessions.</summary>
    public LineTotals Lines => Session is null ? _before : _before.Plus(Session.Counters);

    /// <summary>Closes the link.</summary>
    public void Close() => _link?.Dispose();

    private void Take(BoxSession session, RunWriter writer)
    {
        if (Known is { } known && known.BootId != session.Identity.BootId)
        {
            state.Resets++;
            writer.Keep(
                RunEventKind.BoardReset,
                $"The board has started anew: boot {known.BootId} became {session.Identity.BootId}; its clock begins again.");
        }

        Known = session.Identity;
        if (_limits is { } limits && session.Limits() != limits)
        {
            session.SetLimits(limits);
        }

        Session = session;
    }
}
