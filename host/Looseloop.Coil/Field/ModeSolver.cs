namespace Looseloop.Coil;

/// <summary>
/// The lowest resonances of a <see cref="FieldModel"/>. The problem D' M^-1 D u = w^2 B u (D differences along the winding, M band
/// inductances, B node capacitances) is turned over: A B u = u / w^2 with A = D^-1 M D^-T, which needs no factoring of M, and the
/// largest values of 1/w^2 are found by Lanczos' method in the scalar product of B (C. Lanczos, J. Res. NBS 45 (1950) 255), fully
/// reorthogonalised. Only products with M and B are formed.
/// </summary>
public static class ModeSolver
{
    private const int MostSteps = 120;

    /// <summary>Solves for the lowest modes, lowest first.</summary>
    /// <param name="model">The coil.</param>
    /// <param name="count">How many, 1 .. 8.</param>
    /// <param name="addedTopF">A lumped capacitance from the top to ground, farad, 0 or more (a probe).</param>
    public static IReadOnlyList<Mode> Lowest(FieldModel model, int count, double addedTopF = 0)
    {
        Demand.Within(count, 1, 8, "the number of modes", "");
        Demand.Within(addedTopF, 0, 1, "the added capacitance", "F");
        int n = model.WindingBands;
        int most = Math.Min(MostSteps, n);
        count = Math.Min(count, n);
        double[] scratch = new double[model.ScratchLength];
        double[] flux = new double[n];
        double[] current = new double[n];
        var basis = new List<double[]>(most);
        var charges = new List<double[]>(most);
        double[] alpha = new double[most];
        double[] beta = new double[most];
        double[] u = StartVector(n);
        double[] q = new double[n];
        model.MultiplyCapacitance(u, q, scratch, addedTopF);
        double norm = Math.Sqrt(VectorMath.Dot(u, q));
        for (int step = 0; step < most; step++)
        {
            Scale(u, 1 / norm);
            Scale(q, 1 / norm);
            basis.Add(u);
            charges.Add(q);
            u = new double[n];
            Invert(model, q, current, flux, u);
            alpha[step] = VectorMath.Dot(u, q);
            // Twice is enough (Kahan and Parlett).
            for (int pass = 0; pass < 2; pass++)
            {
                for (int k = 0; k < basis.Count; k++)
                {
                    VectorMath.AddScaled(u, -VectorMath.Dot(u, charges[k]), basis[k]);
                }
            }

            q = new double[n];
            model.MultiplyCapacitance(u, q, scratch, addedTopF);
            norm = Math.Sqrt(Math.Max(0, VectorMath.Dot(u, q)));
            beta[step] = norm;
            int size = step + 1;
            bool last = size == most || norm <= 1e-15 * alpha[0];
            if (size >= count + 4 && (size % 4 == 0 || last) || last)
            {
                (double[] values, double[][] vectors) = TridiagonalEigen.Solve(alpha, beta, size);
                double worst = 0;
                for (int i = 0; i < Math.Min(count, size); i++)
                {
                    worst = Math.Max(worst, norm * Math.Abs(vectors[i][size - 1]) / values[i]);
                }

                // An eigenvalue's error is of the order of the residual's square; vectors want the residual itself small.
                if (worst < 1e-10 || last)
                {
                    return [.. Enumerable.Range(0, Math.Min(count, size)).Select(i =>
                        ToMode(model, values[i], Combine(basis, vectors[i]), addedTopF, scratch))];
                }
            }
        }

        throw new InvalidOperationException("the resonances did not converge");
    }

    // The voltage rises from base to top roughly as a quarter wave; the ripple lets every mode take part.
    private static double[] StartVector(int n)
    {
        double[] u = new double[n];
        for (int i = 0; i < n; i++)
        {
            double t = (i + 1.0) / n;
            u[i] = Math.Sin(Math.PI / 2 * t) + (0.5 * Math.Sin(1.5 * Math.PI * t)) + (0.25 * t * t * t);
        }

        return u;
    }

    // u = D^-1 M D^-T q: charges to currents (from the top down), currents to fluxes, fluxes to voltages (from the base up).
    private static void Invert(FieldModel model, double[] q, double[] current, double[] flux, double[] u)
    {
        CurrentsOf(q, current);
        model.MultiplyInductance(current, flux);
        double sum = 0;
        for (int i = 0; i < u.Length; i++)
        {
            sum += flux[i];
            u[i] = sum;
        }
    }

    private static void CurrentsOf(ReadOnlySpan<double> q, Span<double> current)
    {
        double sum = 0;
        for (int i = q.Length - 1; i >= 0; i--)
        {
            sum += q[i];
            current[i] = sum;
        }
    }

    private static void Scale(double[] x, double factor)
    {
        for (int i = 0; i < x.Length; i++)
        {
            x[i] *= factor;
        }
    }

    private static double[] Combine(List<double[]> basis, double[] weights)
    {
        double[] sum = new double[basis[0].Length];
        for (int k = 0; k < weights.Length; k++)
        {
            VectorMath.AddScaled(sum, weights[k], basis[k]);
        }

        return sum;
    }

    private static Mode ToMode(FieldModel model, double inverseSquare, double[] u, double addedTopF, double[] scratch)
    {
        int n = u.Length;
        Scale(u, 1 / u[n - 1]);
        double[] q = new double[n];
        model.MultiplyCapacitance(u, q, scratch, addedTopF);
        double firstBandCharge = scratch[0];
        double angular = 1 / Math.Sqrt(inverseSquare);
        double[] current = new double[n];
        CurrentsOf(q, current);
        Scale(current, angular);
        return new Mode
        {
            FrequencyHz = angular / (2 * Math.PI),
            HeightM = model.EdgesM,
            Voltage = [0, .. u],
            CurrentPerVolt = current,
            // Half of the first band's charge sits below its middle.
            BaseCurrentPerVolt = current[0] + (angular * firstBandCharge / 2),
            TopCapacitanceF = VectorMath.Dot(u, q),
        };
    }
}
