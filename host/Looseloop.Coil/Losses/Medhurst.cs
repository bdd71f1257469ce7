namespace Looseloop.Coil;

/// <summary>
/// R.G. Medhurst's measured tables for single-layer coils (Wireless Engineer 24 (1947) 35-43 and 80-92). The rows of phi for lengths
/// up to one diameter rest on memory; in some copies the cell l/D = 10, d/s = .7 reads 2.27, monotony says 2.37.
/// </summary>
public static class Medhurst
{
    private static readonly double[] _ratioH =
        [.1, .2, .3, .5, .7, .8, 1, 1.5, 2, 2.5, 3, 3.5, 4, 4.5, 5, 6, 7, 8, 9, 10, 15, 20, 25, 30, 40, 50];

    private static readonly double[] _h =
        [.96, .70, .60, .50, .47, .46, .46, .47, .50, .56, .61, .67, .72, .77, .81, .92, 1.01, 1.12, 1.22, 1.32, 1.86, 2.36, 2.9, 3.4, 4.6, 5.8];

    // Lengths over diameters; the last row is the limit of a long coil.
    private static readonly double[] _ratioPhi = [0, .2, .4, .6, .8, 1, 2, 4, 6, 8, 10];

    // Columns: wire diameter over pitch 1, .9, ... .1.
    private static readonly double[][] _phi =
    [
        [5.31, 3.73, 2.74, 2.12, 1.74, 1.44, 1.20, 1.16, 1.07, 1.02],
        [5.45, 3.84, 2.83, 2.20, 1.77, 1.48, 1.29, 1.19, 1.08, 1.02],
        [5.65, 3.99, 2.97, 2.28, 1.83, 1.54, 1.33, 1.21, 1.08, 1.03],
        [5.80, 4.11, 3.10, 2.38, 1.89, 1.60, 1.38, 1.22, 1.10, 1.03],
        [5.80, 4.17, 3.20, 2.44, 1.92, 1.64, 1.42, 1.23, 1.10, 1.03],
        [5.55, 4.10, 3.17, 2.47, 1.94, 1.67, 1.45, 1.24, 1.10, 1.03],
        [4.10, 3.36, 2.74, 2.32, 1.98, 1.74, 1.50, 1.28, 1.13, 1.04],
        [3.54, 3.05, 2.60, 2.27, 2.01, 1.78, 1.54, 1.32, 1.15, 1.04],
        [3.31, 2.92, 2.60, 2.29, 2.03, 1.80, 1.56, 1.34, 1.16, 1.04],
        [3.20, 2.90, 2.62, 2.34, 2.08, 1.81, 1.57, 1.34, 1.165, 1.04],
        [3.23, 2.93, 2.65, 2.37, 2.10, 1.83, 1.58, 1.35, 1.17, 1.04],
        [3.41, 3.11, 2.815, 2.51, 2.22, 1.93, 1.65, 1.395, 1.19, 1.05],
    ];

    /// <summary>
    /// Self-capacitance, farad: H(l/D) times D, linear between the table's points. It belongs to coils on polystyrene formers and to
    /// the half-wave resonance of the free coil: a cross check, 5-20 % off for an earthed one.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">l/D outside .1 .. 50, where the table ends.</exception>
    public static double SelfCapacitanceF(double diameterM, double lengthM)
    {
        Demand.Length(diameterM, nameof(diameterM));
        Demand.Length(lengthM, nameof(lengthM));
        double x = Demand.Within(lengthM / diameterM, 0.1, 50, "length over diameter", "");
        int i = Array.FindLastIndex(_ratioH, r => r <= x);
        i = Math.Min(i, _ratioH.Length - 2);
        double share = (x - _ratioH[i]) / (_ratioH[i + 1] - _ratioH[i]);
        return (_h[i] + (share * (_h[i + 1] - _h[i]))) * diameterM * 100 * 1e-12;
    }

    /// <summary>
    /// Phi: resistance of the coil over that of the same wire stretched out, in the limit of thin skins. Linear between the table's
    /// points; in the inverse of the length above ten diameters; towards 1 below a tenth of the pitch.
    /// </summary>
    /// <param name="lengthOverDiameter">0 or more.</param>
    /// <param name="wireOverPitch">Above 0, at most 1.</param>
    public static double Phi(double lengthOverDiameter, double wireOverPitch)
    {
        double x = Demand.Within(lengthOverDiameter, 0, 1e6, nameof(lengthOverDiameter), "");
        double y = Demand.Within(wireOverPitch, 1e-9, 1 + 1e-9, nameof(wireOverPitch), "");
        if (x >= 10)
        {
            double share = 1 - (10 / x);
            return Row(10, y) + (share * (Row(11, y) - Row(10, y)));
        }

        int i = Array.FindLastIndex(_ratioPhi, r => r <= x);
        double part = (x - _ratioPhi[i]) / (_ratioPhi[i + 1] - _ratioPhi[i]);
        return Row(i, y) + (part * (Row(i + 1, y) - Row(i, y)));
    }

    private static double Row(int row, double wireOverPitch)
    {
        double place = (1 - Math.Min(1, wireOverPitch)) * 10;
        int i = (int)place;
        double share = place - i;
        double left = i <= 9 ? _phi[row][i] : 1;
        double right = i < 9 ? _phi[row][i + 1] : 1;
        return left + (share * (right - left));
    }
}
