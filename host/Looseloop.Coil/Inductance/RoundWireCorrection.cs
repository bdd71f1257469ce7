namespace Looseloop.Coil;

/// <summary>
/// What a coil of round wire has less than the current sheet: mu0 a N (As + Bm)
/// (E.B. Rosa, Bull. Bureau of Standards 2 (1906) 161; F.W. Grover, Inductance Calculations, 1946).
/// </summary>
public static class RoundWireCorrection
{
    /// <summary>To be taken from the sheet's inductance, henry. Negative for wire thinner than about half the pitch.</summary>
    /// <param name="radiusM">The coil's, to the wire's centre, metres.</param>
    /// <param name="turns">Number of turns, at least 1.</param>
    /// <param name="wireDiameterM">Bare wire, metres.</param>
    /// <param name="pitchM">Distance of neighbouring turns, metres; not below the wire's diameter.</param>
    public static double ReductionH(double radiusM, double turns, double wireDiameterM, double pitchM)
    {
        Demand.Length(radiusM, nameof(radiusM));
        Demand.Within(turns, 1, Demand.MostTurns, nameof(turns), "");
        Demand.Length(pitchM, nameof(pitchM));
        Demand.Within(wireDiameterM, 1e-9, pitchM * (1 + 1e-9), nameof(wireDiameterM), "m");
        return PhysicalConstants.Mu0 * radiusM * turns * (SelfTerm(wireDiameterM / pitchM) + MutualTerm(turns));
    }

    /// <summary>As: the difference of a round wire's and a strip's own geometric mean distance.</summary>
    public static double SelfTerm(double wireOverPitch) => Math.Log(wireOverPitch) + 1.25 - Math.Log(2);

    /// <summary>Bm: the difference of wires' and strips' mutual distances, summed over the turns; .3379 for many turns.</summary>
    public static double MutualTerm(double turns) =>
        Math.Log(2 * Math.PI) - 1.5 - (Math.Log(turns) / (6 * turns)) - (0.33084236 / turns) - (1 / (120 * Math.Pow(turns, 3)));
}
