using Looseloop.Link;
using Looseloop.Procedures.Logging;

namespace Looseloop.Boxes;

/// <summary>A serial port that is opened again after every unplugging.</summary>
internal sealed class PortSource(string name, TextWriter? trace) : IBoxSource
{
    public string Name => name;

    public TimeProvider Time => TimeProvider.System;

    public IByteLink Open()
    {
        SerialLink port = SerialLink.Open(name);
        return trace is null ? port : new LinkTrace(port, trace);
    }

    public void Pause(TimeSpan duration, CancellationToken cancel)
    {
        cancel.WaitHandle.WaitOne(duration);
        cancel.ThrowIfCancellationRequested();
    }
}
