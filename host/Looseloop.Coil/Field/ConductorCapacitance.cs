namespace Looseloop.Coil;

/// <summary>Capacitance of single bodies, without a coil.</summary>
public static class ConductorCapacitance
{
    /// <summary>
    /// Exact capacitance of a toroid alone in space, farad (C. Snow, NBS Circular 544, 1954). In toroidal coordinates, cosh eta = R/r:
    /// C = 8 eps0 c [Q/P + 2 sum Q/P] over the orders n - 1/2. By the Wronskian P(v) Q(v-1) - P(v-1) Q(v) = 1/v this collapses to
    /// 16 eps0 c sum over n >= 1 of 1/(P(n-1/2) P(n-3/2)), which has no cancellation.
    /// </summary>
    /// <param name="ringRadiusM">Radius of the tube's centre line, metres.</param>
    /// <param name="tubeRadiusM">Radius of the tube, metres; smaller.</param>
    public static double OfTorusF(double ringRadiusM, double tubeRadiusM)
    {
        Demand.Length(ringRadiusM, nameof(ringRadiusM));
        Demand.Within(tubeRadiusM, 1e-9, ringRadiusM * (1 - 1e-9), nameof(tubeRadiusM), "m");
        double x = ringRadiusM / tubeRadiusM;
        double root = Math.Sqrt((x - 1) * (x + 1));
        double shrink = 1 / (x + root);
        // P(-1/2) and P(+1/2) as elliptic integrals of modulus sqrt(1 - e^(-2 eta)) (DLMF 14.5), e^-eta = shrink.
        (double k, double e, _) = EllipticIntegrals.Complete(shrink * shrink);
        double before = 2 / Math.PI * Math.Sqrt(shrink) * k;
        double p = 2 / Math.PI * e / Math.Sqrt(shrink);
        double sum = 0;
        for (int n = 1; n < 100_000; n++)
        {
            double term = 1 / (p * before);
            sum += term;
            if (term < 1e-17 * sum)
            {
                break;
            }

            (before, p) = (p, ((2 * n * x * p) - ((n - 0.5) * before)) / (n + 0.5));
        }

        return 16 * PhysicalConstants.Epsilon0 * (tubeRadiusM * root) * sum;
    }

    /// <summary>Capacitance of a body alone in space by the field model's own bands, farad.</summary>
    /// <param name="load">The body.</param>
    /// <param name="bands">How many bands, 4 .. 2000.</param>
    public static double OfBodyF(TopLoad load, int bands)
    {
        Demand.Within(bands, 4, 2000, nameof(bands), "");
        return Alone(load.Profile.Cut(bands, 1), cylinder: false);
    }

    /// <summary>Capacitance of an open tube alone in space by the field model's own bands, farad.</summary>
    /// <param name="radiusM">Metres.</param>
    /// <param name="lengthM">Metres.</param>
    /// <param name="bands">How many bands, 4 .. 2000.</param>
    /// <param name="endRefined">Whether they narrow towards the ends.</param>
    public static double OfOpenTubeF(double radiusM, double lengthM, int bands, bool endRefined)
    {
        Demand.Length(radiusM, nameof(radiusM));
        Demand.Length(lengthM, nameof(lengthM));
        Demand.Within(bands, 4, 2000, nameof(bands), "");
        return Alone(Profile.Upright(radiusM, 0, lengthM, endRefined).Cut(bands, 1), cylinder: true);
    }

    private static double Alone(Band[] bands, bool cylinder)
    {
        int n = bands.Length;
        double[] p = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                Band a = bands[i];
                Band b = bands[j];
                double dz = a.HeightM - b.HeightM;
                p[(i * n) + j] = cylinder
                    ? RingKernel.OnCylinder(a.RadiusM, i == j ? 0 : Math.Abs(dz), a.WidthM, b.WidthM).PotentialPerCoulomb
                    : RingKernel.Potential(a.RadiusM, b.RadiusM, Band.EffectiveSquare(a, b), dz);
            }
        }

        CholeskyFactor factor = CholeskyFactor.InPlace(p, n)
            ?? throw new ArgumentException("the body's bands cannot be told apart: use fewer");
        double[] q = new double[n];
        Array.Fill(q, 1.0);
        factor.Solve(q);
        return q.Sum();
    }
}
