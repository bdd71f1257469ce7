using Looseloop.Bench;
using Looseloop.Link;
using Looseloop.Procedures.Logging;

namespace Looseloop.Boxes;

/// <summary>A virtual box inside this process, as a source of links. It cannot be unplugged.</summary>
internal sealed class BenchSource(VirtualBox box, TextWriter? trace) : IBoxSource
{
    public string Name => box.Name;

    public TimeProvider Time => box.Time;

    public IByteLink Open() => trace is null ? box : new LinkTrace(box, trace);

    public void Pause(TimeSpan duration, CancellationToken cancel)
    {
        cancel.ThrowIfCancellationRequested();
        box.Pause(duration);
    }
}
