using Looseloop.Box;
using Looseloop.Readings;

namespace Looseloop.Boxes;

/// <summary>
/// The law of a box of which nobody has stated anything: a linear true-RMS detector, as the hardware notes recommend, whose
/// pedestal is what it shows with the drive off. The box's own interlock keeps the pedestal of its firmware.
/// </summary>
internal static class UndeclaredBox
{
    private const int LookMs = 1000;

    /// <summary>Noise and weak carriers hide in a pedestal that was only looked at: its standard uncertainty, counts.</summary>
    private const double PedestalUncertainty = 4;

    public static DetectorLaw LawOf(BoxSession box) =>
        DetectorLaw.Declared(DetectorKind.RmsLinear, box.Dark(LookMs).Mean) with { PedestalUncertainty = PedestalUncertainty };
}
