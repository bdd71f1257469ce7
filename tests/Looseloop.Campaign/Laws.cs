using Looseloop.Bench;
using Looseloop.Readings;
using BenchDetector = Looseloop.Bench.DetectorKind;
using Kind = Looseloop.Readings.DetectorKind;

namespace Looseloop.Campaign;

/// <summary>What the builder of a virtual box writes down of its detector.</summary>
public static class Laws
{
    public static DetectorLaw Of(World world)
    {
        DetectorParameters detector = world.Detector;
        double countsPerVolt = 4095 / world.Converter.FullScaleVolts;
        Kind kind = detector.Kind switch
        {
            BenchDetector.RmsLog => Kind.RmsLog,
            BenchDetector.Square => Kind.SquareLaw,
            BenchDetector.MeanAbsolute => Kind.Mean,
            BenchDetector.Logarithm => Kind.LogOfWaveform,
            BenchDetector.Diode => Kind.DiodeKnee,
            BenchDetector.Peak or BenchDetector.PeakToPeak => Kind.Peak,
            _ => Kind.RmsLinear,
        };
        double shape = kind is Kind.RmsLog or Kind.LogOfWaveform
            ? detector.MvPerDb * 1e-3 * countsPerVolt
            : detector.DiodeMv * 1e-3 * detector.Gain * countsPerVolt;
        double slowestUs = kind == Kind.Peak ? detector.DecayUs : detector.TimeConstantUs;

        // A logarithmic output rests on its own noise, not on its zero.
        double floorDecibel = Math.Max((20 * Math.Log10(detector.FloorMv * 1e-3)) - detector.InterceptDbV, 0);
        double restVolts = kind is Kind.RmsLog or Kind.LogOfWaveform ? floorDecibel * detector.MvPerDb * 1e-3 : 0;
        return DetectorLaw.Declared(kind, (detector.PedestalVolts + restVolts) * countsPerVolt) with
        {
            Shape = shape,
            ShapeUncertainty = 0.03 * shape,
            TimeConstantS = slowestUs * 1e-6,
        };
    }
}
