namespace Looseloop.Coil;

/// <summary>From a coil's geometry to what it should read.</summary>
public static class Expectations
{
    /// <summary>Expansion of an aluminium top load, 1/K (trade tables).</summary>
    private const double AluminiumPerKelvin = 23e-6;

    /// <summary>The whole expectation of a coil.</summary>
    /// <exception cref="ImpossibleGeometryException">The coil cannot be built.</exception>
    public static CoilExpectation Of(CoilGeometry coil)
    {
        var model = new FieldModel(coil, Resolution.Fine);
        IReadOnlyList<Mode> modes = ModeSolver.Lowest(model, 3);
        double f1 = modes[0].FrequencyHz;
        IReadOnlyList<Sensitivity> sensitivities = SensitivitiesOf(coil, f1);
        return new CoilExpectation
        {
            Coil = coil,
            Modes = modes,
            DirectInductanceH = DirectInductanceH(coil),
            FilamentInductanceH = FilamentCoil.InductanceH(
                coil.WindingDiameterM, coil.PitchM, Math.Max(1, (int)Math.Round(coil.Turns)), coil.WireDiameterM),
            Q = QEstimate.Of(coil, modes[0]),
            Sensitivities = sensitivities,
            Contributions = [.. ContributionsOf(coil, f1, sensitivities).OrderByDescending(c => c.UncertaintyHz)],
            F1PerKelvin = PerKelvin(coil),
        };
    }

    /// <summary>Only the first resonance, hertz; for sweeps and searches.</summary>
    public static double F1Hz(CoilGeometry coil, Resolution resolution) =>
        ModeSolver.Lowest(new FieldModel(coil, resolution), 1)[0].FrequencyHz;

    /// <summary>Inductance at direct current, henry: Nagaoka's sheet less Rosa's correction.</summary>
    public static double DirectInductanceH(CoilGeometry coil)
    {
        GeometryCheck.ThrowIfImpossible(coil);
        return CurrentSheet.InductanceH(coil.WindingDiameterM, coil.WindingLengthM, coil.Turns)
            - RoundWireCorrection.ReductionH(coil.WindingDiameterM / 2, coil.Turns, coil.WireDiameterM, coil.PitchM);
    }

    /// <summary>How every dimension moves f1, by differences over its tolerance on the quick model.</summary>
    /// <param name="coil">The coil.</param>
    /// <param name="f1Hz">Its first resonance, to which the quick model's relative changes are applied.</param>
    public static IReadOnlyList<Sensitivity> SensitivitiesOf(CoilGeometry coil, double f1Hz)
    {
        double middle = F1Hz(coil, Resolution.Quick);
        var all = new List<Sensitivity>();
        foreach (Dimension dimension in Dimension.Of(coil))
        {
            bool stated = coil.Tolerances.TryGetValue(dimension.Path, out double tolerance);
            if (!stated)
            {
                tolerance = dimension.DefaultTolerance;
            }

            double step = Math.Max(tolerance, 1e-4 * Math.Abs(dimension.Value));
            (double low, double high) = (Try(dimension, -step), Try(dimension, step));
            // Where one side cannot be built (wire as thick as the pitch), the other one alone serves.
            double slope = (double.IsNaN(low), double.IsNaN(high)) switch
            {
                (false, false) => (high - low) / (2 * step),
                (true, false) => (high - middle) / step,
                (false, true) => (middle - low) / step,
                _ => double.NaN,
            };
            double perUnit = slope / middle * f1Hz;
            double perPercent = dimension.Value == 0 ? double.NaN : slope / middle * dimension.Value;
            all.Add(new Sensitivity(dimension, perPercent, double.IsNaN(perUnit) ? 0 : perUnit, tolerance, stated));
        }

        return all;
    }

    private static double Try(Dimension dimension, double change)
    {
        CoilGeometry other = dimension.With(dimension.Value + change);
        return GeometryCheck.Problems(other).Count > 0 ? double.NaN : F1Hz(other, Resolution.Quick);
    }

    private static IEnumerable<Contribution> ContributionsOf(
        CoilGeometry coil, double f1Hz, IReadOnlyList<Sensitivity> sensitivities)
    {
        foreach (Sensitivity s in sensitivities)
        {
            yield return new Contribution(s.Dimension.Name, s.UncertaintyHz, s.Stated
                ? "tolerance in the coil file"
                : "usual tolerance (common practice, no source)");
        }

        // Two independent field models of one coil differed by .08 %.
        yield return new Contribution("field model", 0.001 * f1Hz, "difference of two independent models");
        yield return new Contribution("room and ground", RoomRelative(coil) * f1Hz, coil.WallDistanceM is null && coil.CeilingHeightM is null
            ? "walls, ceiling and limited ground are not modelled; distances not stated"
            : "walls, ceiling and limited ground are not modelled");
        if (coil.Former.PullRelative > 0)
        {
            yield return new Contribution("former", coil.Former.PullRelative / 2 / Math.Sqrt(3) * f1Hz,
                "its permittivity lowers f0 by up to 2 %; not modelled");
        }
    }

    // A wide plane against a disc of limited size moved f1 by 1 to 2.4 %; walls nearer than the coil is tall make it worse.
    private static double RoomRelative(CoilGeometry coil)
    {
        double tall = coil.TopHeightM + coil.TopLoads.Select(l => Math.Max(0, l.HeightM)).DefaultIfEmpty(0).Max();
        double nearest = Math.Min(
            coil.WallDistanceM ?? double.PositiveInfinity,
            coil.CeilingHeightM is double ceiling ? Math.Max(0, ceiling - tall) : double.PositiveInfinity);
        return nearest < tall ? 0.02 : 0.0125;
    }

    // The former stretches the winding, aluminium the top load; over 100 K, so that the difference is well above rounding.
    private static double PerKelvin(CoilGeometry coil)
    {
        double former = coil.Former.PerKelvin;
        if (double.IsNaN(former))
        {
            return double.NaN;
        }

        const double Kelvin = 100;
        CoilGeometry Warm(double kelvin) => coil with
        {
            WindingDiameterM = coil.WindingDiameterM * (1 + (former * kelvin)),
            WindingLengthM = coil.WindingLengthM * (1 + (former * kelvin)),
            TopLoads = [.. coil.TopLoads.Select(l => l.Scaled(1 + (AluminiumPerKelvin * kelvin)) with { HeightM = l.HeightM })],
        };
        // Only warmer: the wire keeps its thickness, and a shrinking former would push touching turns into one another.
        CoilGeometry warm = Warm(Kelvin);
        return GeometryCheck.Problems(warm).Count > 0
            ? double.NaN
            : (F1Hz(warm, Resolution.Quick) / F1Hz(coil, Resolution.Quick) - 1) / Kelvin;
    }
}
