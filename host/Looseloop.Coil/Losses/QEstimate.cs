namespace Looseloop.Coil;

/// <summary>
/// What Q the copper alone would allow, by three published methods. An upper bound: former, ground, enamel, damp and corona come on
/// top, and are not modelled. The methods differ by 20-30 % from one another and from the truth.
/// </summary>
public sealed record QEstimate
{
    /// <summary>Skin effect alone, as if the turns did not see one another; never reached.</summary>
    public required double SkinOnly { get; init; }

    /// <summary>Dowell's layer.</summary>
    public required double Dowell { get; init; }

    /// <summary>Medhurst's phi times the exact skin effect.</summary>
    public required double MedhurstTimesSkin { get; init; }

    /// <summary>Medhurst's phi times the thin-skin resistance; it holds only for wire well thicker than the skin.</summary>
    public required double MedhurstThinSkin { get; init; }

    /// <summary>Wire diameter over skin depth.</summary>
    public required double WireOverSkin { get; init; }

    /// <summary>Resistance of the whole wire at direct current, ohm.</summary>
    public required double DirectOhm { get; init; }

    /// <summary>The lower end of the bound.</summary>
    public double Low => Math.Min(Dowell, MedhurstTimesSkin);

    /// <summary>The upper end of the bound. The thin-skin figure takes part only where the wire is three skins thick.</summary>
    public double High => WireOverSkin >= 3
        ? Math.Max(Math.Max(Dowell, MedhurstTimesSkin), MedhurstThinSkin)
        : Math.Max(Dowell, MedhurstTimesSkin);

    /// <summary>From the mode's own distribution of current: Q = w W / P, W the mode's energy, P the sum of R I^2 over the bands.</summary>
    /// <param name="coil">The coil, with copper wire at 20 C.</param>
    /// <param name="mode">One of its modes.</param>
    public static QEstimate Of(CoilGeometry coil, Mode mode)
    {
        double directOhm = WireOhm(coil);
        double loss = 0;
        for (int i = 0; i < mode.CurrentPerVolt.Count; i++)
        {
            double share = (mode.HeightM[i + 1] - mode.HeightM[i]) / coil.WindingLengthM;
            loss += directOhm * share * mode.CurrentPerVolt[i] * mode.CurrentPerVolt[i];
        }

        return From(coil, mode.FrequencyHz, directOhm, mode.AngularHz * mode.TopCapacitanceF / loss);
    }

    /// <summary>As if the same current flowed in every turn: Q = w L / R, with the inductance at direct current.</summary>
    /// <param name="coil">The coil, with copper wire at 20 C.</param>
    /// <param name="frequencyHz">At which frequency.</param>
    /// <param name="inductanceH">Its inductance.</param>
    public static QEstimate OfEvenCurrent(CoilGeometry coil, double frequencyHz, double inductanceH)
    {
        double directOhm = WireOhm(coil);
        Demand.Inductance(inductanceH, nameof(inductanceH));
        return From(coil, frequencyHz, directOhm, 2 * Math.PI * frequencyHz * inductanceH / directOhm);
    }

    private static double WireOhm(CoilGeometry coil) =>
        SkinEffect.DirectOhm(coil.Turns * double.Hypot(Math.PI * coil.WindingDiameterM, coil.PitchM), coil.WireDiameterM);

    private static QEstimate From(CoilGeometry coil, double frequencyHz, double directOhm, double directQ)
    {
        double depthM = SkinEffect.DepthM(frequencyHz);
        double skin = SkinEffect.RoundWireRatio(coil.WireDiameterM / 2 / depthM);
        double phi = Medhurst.Phi(coil.WindingLengthM / coil.WindingDiameterM, coil.WireDiameterM / coil.PitchM);
        return new QEstimate
        {
            DirectOhm = directOhm,
            WireOverSkin = coil.WireDiameterM / depthM,
            SkinOnly = directQ / skin,
            Dowell = directQ / Looseloop.Coil.Dowell.SingleLayerRatio(
                Looseloop.Coil.Dowell.Xi(coil.WireDiameterM, coil.PitchM, depthM)),
            MedhurstTimesSkin = directQ / (phi * skin),
            MedhurstThinSkin = directQ / (phi * coil.WireDiameterM / (4 * depthM)),
        };
    }
}
