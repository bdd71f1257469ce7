namespace Looseloop.Coil;

/// <summary>Effective inductance and capacitance at the top terminal from two readings with different known capacitors (two-capacitor method).</summary>
public sealed record PadMethod
{
    /// <summary>Effective inductance at the top terminal, henry. Not the inductance at direct current.</summary>
    public required double InductanceH { get; init; }

    /// <summary>Effective capacitance at the top terminal with no capacitor hung on, farad.</summary>
    public required double CapacitanceF { get; init; }

    /// <summary>Standard uncertainty of the inductance, henry.</summary>
    public required double InductanceUncertaintyH { get; init; }

    /// <summary>Standard uncertainty of the capacitance, farad.</summary>
    public required double CapacitanceUncertaintyF { get; init; }

    /// <summary>By how much a relative error of the second frequency is amplified in C, and in L.</summary>
    public required double AmplificationOfSecond { get; init; }

    /// <summary>By how much a relative error of the first frequency is amplified in L.</summary>
    public required double AmplificationOfFirstInL { get; init; }

    /// <summary>
    /// True where the coil's own capacitance is below 12 pF: with little at the top the current is far from even, and L comes out
    /// some 9 % below the inductance at direct current. With a top load it is right to about 1 %.
    /// </summary>
    public bool LooksBare => CapacitanceF < 12e-12;

    /// <summary>What must be said with the figures of a bare coil.</summary>
    public const string BareCaution =
        "A bare coil's current is not even: the inductance found this way is effective at the top terminal, about 9 % below that at direct current.";

    /// <summary>
    /// L = (1/fb^2 - 1/fa^2)/(4 pi^2 (Cb - Ca)), C0 = (Ca fa^2 - Cb fb^2)/(fb^2 - fa^2), with first-order uncertainty (GUM 5.1.2; the
    /// inputs independent).
    /// </summary>
    /// <param name="firstHz">Reading with the smaller capacitor.</param>
    /// <param name="firstPadF">That capacitor, farad; 0 for none.</param>
    /// <param name="secondHz">Reading with the larger one; lower than the first.</param>
    /// <param name="secondPadF">That capacitor, farad.</param>
    /// <param name="relativeUncertaintyF0">Relative standard uncertainty of each reading.</param>
    /// <param name="padUncertaintyF">Standard uncertainty of the difference of the capacitors, farad.</param>
    /// <exception cref="ArgumentException">The readings do not fall as the capacitance rises.</exception>
    public static PadMethod Of(
        double firstHz, double firstPadF, double secondHz, double secondPadF, double relativeUncertaintyF0, double padUncertaintyF)
    {
        Demand.Frequency(firstHz, "the first frequency");
        Demand.Frequency(secondHz, "the second frequency");
        Demand.Within(firstPadF, 0, 1e-6, "the first capacitor", "F");
        Demand.Within(secondPadF, 1e-15, 1e-6, "the second capacitor", "F");
        Demand.Within(relativeUncertaintyF0, 0, 1, "the relative uncertainty", "");
        Demand.Uncertainty(padUncertaintyF, "the capacitor's uncertainty");
        if (secondPadF <= firstPadF || secondHz >= firstHz)
        {
            throw new ArgumentException("the reading with the larger capacitor must be the lower one: check which reading is which");
        }

        double a2 = firstHz * firstHz;
        double b2 = secondHz * secondHz;
        double difference = secondPadF - firstPadF;
        double l = ((1 / b2) - (1 / a2)) / (4 * Math.PI * Math.PI * difference);
        double c = ((firstPadF * a2) - (secondPadF * b2)) / (b2 - a2);
        if (c <= 0)
        {
            throw new ArgumentException(
                "these readings would need a coil without capacitance: the second capacitor is larger than stated, or the readings are not of one coil");
        }

        double byFirst = 2 * b2 / (a2 - b2);
        double bySecond = 2 * a2 / (a2 - b2);
        double padRelative = padUncertaintyF / difference;
        double lRelative = Hypot(byFirst * relativeUncertaintyF0, bySecond * relativeUncertaintyF0, padRelative);
        // dC/C0 as fractions: C0 + Ca = (Cb - Ca) b2/(a2 - b2).
        double share = (c + firstPadF) / c;
        double cRelative = Hypot(bySecond * relativeUncertaintyF0, bySecond * relativeUncertaintyF0, padRelative) * share;
        return new PadMethod
        {
            InductanceH = l,
            CapacitanceF = c,
            InductanceUncertaintyH = l * lRelative,
            CapacitanceUncertaintyF = c * cRelative,
            AmplificationOfSecond = bySecond,
            AmplificationOfFirstInL = byFirst,
        };
    }

    private static double Hypot(double a, double b, double c) => Math.Sqrt((a * a) + (b * b) + (c * c));
}
