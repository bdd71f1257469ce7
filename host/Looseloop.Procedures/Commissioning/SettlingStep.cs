using Looseloop.Box;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>
/// Jumps from a bandwidth away onto the resonance, and looks after ever longer dwells: beyond the one where doubling changes
/// nothing, ring and detector have settled. A detector slower than declared shows here.
/// </summary>
public static class SettlingStep
{
    private const int Jumps = 16;
    private const int Samples = 4;

    /// <summary>
    /// The box makes the next setting before it sends a line, and settles meanwhile. With a jump to a line that falls on the
    /// way back, and what is looked at has its dwell and no more.
    /// </summary>
    private const int PointsALine = 2;

    /// <summary>A change that matters, share of the top: what e^-7 leaves, twice.</summary>
    private const double Change = 0.002;

    private const double Sigmas = 3;

    /// <summary>A step of the approach counts for a time constant if it stands this far out of its noise.</summary>
    private const double ClearSigmas = 8;

    /// <summary>An amplitude after a dwell.</summary>
    public readonly record struct Level(int DwellUs, double Amplitude, double Standard);

    /// <summary>Dwells to try, microseconds: from 1 ms, doubling until well beyond what is expected.</summary>
    public static IReadOnlyList<int> DwellsUs(double expectedS)
    {
        var dwells = new List<int> { 1000, 2000, 4000, 8000 };
        while (dwells[^1] < 2e6 * expectedS && dwells[^1] < 500_000)
        {
            dwells.Add(2 * dwells[^1]);
        }

        return dwells;
    }

    /// <summary>Takes the amplitudes.</summary>
    public static IReadOnlyList<Level> Take(BoxSession box, Target target, DetectorLaw law, CancellationToken cancel)
    {
        var maker = new AmplitudeMaker(new DetectorScale(law), box.Dark(100, cancel: cancel).Mean);
        Setting on = box.Grid.Nearest(target.F0Hz, target.Duty);
        Setting away = box.Grid.Nearest(target.F0Hz + target.BandwidthHz, target.Duty);
        away = away.Divider == on.Divider && away.DutyBits == on.DutyBits ? SettingGrid.WithDuty(box.Grid.Steps(on, 1), target.Duty) : away;
        Setting[] there = [.. Enumerable.Range(0, Jumps).SelectMany(_ => new[] { away, on })];
        var levels = new List<Level>();
        foreach (int dwellUs in DwellsUs(ExpectedS(target, law)))
        {
            double[] amplitudes = [.. box.Sweep(new SweepRequest(there, dwellUs, Samples) { Pack = PointsALine }, cancel: cancel).Points
                .Where(point => point.Setting == on).Select(point => maker.Make(point).Amplitude)];
            double mean = amplitudes.Average();
            double variance = amplitudes.Sum(one => (one - mean) * (one - mean)) / Math.Max(amplitudes.Length - 1, 1);
            levels.Add(new Level(dwellUs, mean, Math.Sqrt(variance / amplitudes.Length)));
        }

        return levels;
    }

    /// <summary>Judges amplitudes after ever doubled dwells.</summary>
    public static StepFinding Judge(IReadOnlyList<Level> levels, Target target, DetectorLaw law)
    {
        double expectedS = ExpectedS(target, law);
        int settled = levels.Count - 1;
        while (settled > 0 && !Differ(levels[settled - 1], levels[settled]))
        {
            settled--;
        }

        var figures = levels.ToDictionary(level => $"after_{level.DwellUs / 1000}ms_counts", level => level.Amplitude);
        figures["expected_ms"] = 1e3 * expectedS;
        figures["settled_ms"] = settled < levels.Count - 1 ? levels[settled].DwellUs / 1e3 : double.NaN;
        figures["slowest_time_constant_ms"] = 1e3 * SlowestS(levels);
        figures["coil_ring_ms"] = 1e3 * target.RingTimeS;
        figures["detector_declared_ms"] = 1e3 * law.TimeConstantS;
        if (settled == levels.Count - 1)
        {
            return Finding(StepResult.Failed, $"The amplitude still changes at a dwell of {levels[settled].DwellUs / 1e3:0} ms: the coil drifts or is moved, or the detector is very slow.");
        }

        int allowedUs = levels.First(level => level.DwellUs >= 1e6 * expectedS).DwellUs;
        return levels[settled].DwellUs > allowedUs
            ? Finding(StepResult.Failed, $"Settled only after {levels[settled].DwellUs / 1e3:0} ms, where ring and detector as declared make {1e3 * expectedS:0.0} ms: the detector is slower than its declared time constant.")
            : Finding(StepResult.Passed, $"Settled after {levels[settled].DwellUs / 1e3:0} ms or sooner; ring and detector make {1e3 * expectedS:0.0} ms.");

        StepFinding Finding(StepResult result, FormattableString detail) =>
            new(CommissioningStep.Settling, result, FormattableString.Invariant(detail), figures);
    }

    private static double ExpectedS(Target target, DetectorLaw law) => CurveSweep.RingsInOrder * (target.RingTimeS + law.TimeConstantS);

    private static bool Differ(Level a, Level b) =>
        Math.Abs(a.Amplitude - b.Amplitude) > Math.Max(Change * b.Amplitude, Sigmas * double.Hypot(a.Standard, b.Standard));

    /// <summary>
    /// The time constant that rules the end of the approach, the slower of ring and detector. With x = e^(-d/tau), what 2 d
    /// adds to d and what 4 d adds to 2 d have the ratio x + x^2, wherever the approach ends. NaN where it was over too soon.
    /// </summary>
    private static double SlowestS(IReadOnlyList<Level> levels)
    {
        double found = double.NaN;
        for (int i = 0; i + 2 < levels.Count; i++)
        {
            double first = levels[i + 1].Amplitude - levels[i].Amplitude;
            double second = levels[i + 2].Amplitude - levels[i + 1].Amplitude;
            double ratio = second / first;
            if (Math.Abs(second) > ClearSigmas * double.Hypot(levels[i + 1].Standard, levels[i + 2].Standard) && ratio is > 0 and < 2)
            {
                found = levels[i].DwellUs * 1e-6 / -Math.Log((Math.Sqrt(1 + (4 * ratio)) - 1) / 2);
            }
        }

        return found;
    }
}
