namespace Looseloop.Coil;

/// <summary>A single-layer coil as the sum of its turns, each a loop of round wire: the second opinion on sheet and correction.</summary>
public static class FilamentCoil
{
    /// <summary>Inductance of a whole number of turns, henry; time proportional to the turns.</summary>
    /// <param name="diameterM">To the wire's centre, metres.</param>
    /// <param name="pitchM">Distance of neighbouring turns, metres.</param>
    /// <param name="turns">1 .. 100 000.</param>
    /// <param name="wireDiameterM">Bare wire, metres; at most the pitch.</param>
    public static double InductanceH(double diameterM, double pitchM, int turns, double wireDiameterM)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(pitchM, nameof(pitchM));
        Demand.Within(turns, 1, 100_000, nameof(turns), "");
        Demand.Within(wireDiameterM, 1e-9, pitchM * (1 + 1e-9), nameof(wireDiameterM), "m");
        double a = diameterM / 2;
        double sum = turns * Loops.SelfH(a, wireDiameterM / 2, 0.25);
        for (int k = 1; k < turns; k++)
        {
            sum += 2.0 * (turns - k) * Loops.MutualH(a, a, k * pitchM);
        }

        return sum;
    }
}
