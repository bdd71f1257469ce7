using Looseloop.Box;
using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Boxes;

/// <summary>Whoever moves loop and pickup between the readings of a standoff.</summary>
internal interface IMover : IDisposable
{
    /// <summary>What is declared of the detector, or null.</summary>
    DetectorLaw? Law { get; }

    /// <summary>The box, after one thing was moved.</summary>
    /// <param name="moved">What.</param>
    /// <param name="place">0 for its usual place, then ever farther away.</param>
    BoxSession Place(StandoffMove moved, int place);
}
