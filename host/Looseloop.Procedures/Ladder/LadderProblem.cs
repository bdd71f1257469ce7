using Looseloop.Readings;
using Looseloop.Resonance;

namespace Looseloop.Procedures.Ladder;

/// <summary>One law against the rungs, with what is known beforehand as further residuals.</summary>
internal struct LadderProblem(LadderRungs rungs, DetectorLaw law, bool withBow) : ILeastSquaresProblem
{
    /// <summary>Parameters that every law has.</summary>
    public const int Always = 6;

    /// <summary>More than this, of the fundamental's power, no set-up worth a ladder has.</summary>
    private const double MostHarmonic = 0.12;
    private const double DutyPrior = 0.03;
    private const double LogShapePrior = 1.5;
    private const double BowPrior = 0.02;

    private readonly int _count = Always + (FreePedestal(law.Kind) ? 1 : 0) + (FreeShape(law.Kind) ? 1 : 0) + (withBow ? 1 : 0);

    public readonly int ParameterCount => _count;

    public readonly int ResidualCount => rungs.Points.Count + _count - 1;

    /// <summary>True where the pedestal matters apart from the dark: where counts go with amplitude.</summary>
    public static bool FreePedestal(DetectorKind kind) =>
        kind is DetectorKind.RmsLinear or DetectorKind.Mean or DetectorKind.Peak or DetectorKind.DiodeKnee;

    /// <summary>True where the law has a figure of its own.</summary>
    public static bool FreeShape(DetectorKind kind) =>
        kind is DetectorKind.RmsLog or DetectorKind.LogOfWaveform or DetectorKind.DiodeKnee;

    public readonly double[] Start() => Pack(new LadderParameters(
        Math.Log(Math.Max(new Detector.DetectorScale(law).Amplitude(rungs.Points.Max(point => point.Mean)), 1)),
        0, rungs.Harmonics.Higher, rungs.Harmonics.Second, rungs.Harmonics.Third, rungs.Harmonics.Fourth, law.PedestalCounts, Math.Log(law.Shape), 0));

    public readonly double[] Pack(in LadderParameters p)
    {
        var packed = new List<double> { p.LogAmplitude, p.DutyError, p.Higher, p.Second, p.Third, p.Fourth };
        if (FreePedestal(law.Kind))
        {
            packed.Add(p.Pedestal);
        }

        if (FreeShape(law.Kind))
        {
            packed.Add(p.LogShape);
        }

        if (withBow)
        {
            packed.Add(p.Bow);
        }

        return [.. packed];
    }

    public readonly LadderParameters Unpack(ReadOnlySpan<double> packed)
    {
        int at = Always;
        double pedestal = FreePedestal(law.Kind) ? packed[at++] : law.PedestalCounts;
        double shape = FreeShape(law.Kind) ? packed[at++] : Math.Log(law.Shape);
        return new LadderParameters(packed[0], packed[1], packed[2], packed[3], packed[4], packed[5], pedestal, shape, withBow ? packed[at] : 0);
    }

    public readonly bool TryEvaluate(ReadOnlySpan<double> parameters, Span<double> residuals, Span<double> jacobian)
    {
        if (!Residuals(Unpack(parameters), residuals))
        {
            return false;
        }

        if (jacobian.IsEmpty)
        {
            return true;
        }

        int n = ResidualCount;
        Span<double> moved = stackalloc double[_count];
        double[] up = new double[n];
        double[] down = new double[n];
        for (int j = 0; j < _count; j++)
        {
            parameters.CopyTo(moved);
            double step = 1e-5 * Math.Max(Math.Abs(parameters[j]), 0.01);
            moved[j] = parameters[j] + step;
            bool good = Residuals(Unpack(moved), up);
            moved[j] = parameters[j] - step;
            if (!good || !Residuals(Unpack(moved), down))
            {
                return false;
            }

            for (int i = 0; i < n; i++)
            {
                jacobian[(j * n) + i] = (up[i] - down[i]) / (2 * step);
            }
        }

        return true;
    }

    private readonly bool Residuals(in LadderParameters p, Span<double> residuals)
    {
        if (Math.Abs(p.DutyError) > 0.2 || Math.Abs(p.Higher) > MostHarmonic || Math.Abs(p.Second) > MostHarmonic
            || Math.Abs(p.Third) > MostHarmonic || Math.Abs(p.Fourth) > MostHarmonic || Math.Abs(p.LogAmplitude) > 25 || Math.Abs(p.LogShape) > 15)
        {
            return false;
        }

        LadderModel.Counts(law, p, rungs.Points, rungs.DarkCounts, residuals);
        int i = 0;
        for (; i < rungs.Points.Count; i++)
        {
            residuals[i] = (residuals[i] - rungs.Points[i].Mean) / rungs.Sigmas[i];
        }

        residuals[i++] = p.DutyError / DutyPrior;
        HarmonicPowers known = rungs.Harmonics;
        residuals[i++] = (p.Higher - known.Higher) / known.HigherStandard;
        residuals[i++] = (p.Second - known.Second) / known.SecondStandard;
        residuals[i++] = (p.Third - known.Third) / known.ThirdStandard;
        residuals[i++] = (p.Fourth - known.Fourth) / known.FourthStandard;
        if (FreePedestal(law.Kind))
        {
            residuals[i++] = (p.Pedestal - law.PedestalCounts) / Math.Max(law.PedestalUncertainty, 0.1);
        }

        if (FreeShape(law.Kind))
        {
            residuals[i++] = (p.LogShape - Math.Log(law.Shape)) / LogShapePrior;
        }

        if (withBow)
        {
            residuals[i] = p.Bow / BowPrior;
        }

        return true;
    }
}
