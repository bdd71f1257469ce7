using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Boxes;

/// <summary>An open box.</summary>
/// <param name="Session">The conversation with it.</param>
/// <param name="Law">What its builder declares of its detector, or null where nobody did.</param>
/// <param name="Trace">Where its lines are written, or null.</param>
/// <param name="Virtual">The virtual box behind it, or null.</param>
internal sealed record ChosenBox(BoxSession Session, DetectorLaw? Law, TextWriter? Trace, VirtualBox? Virtual) : IDisposable
{
    public void Dispose()
    {
        Session.Dispose();
        Trace?.Dispose();
    }
}
