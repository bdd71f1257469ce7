namespace Looseloop.Coil;

/// <summary>Gauss-Legendre quadrature (DLMF 3.5(v)); the nodes of 24 points are worked out once, by Newton's method.</summary>
internal static class GaussLegendre
{
    private const int Points = 24;
    private static readonly (double X, double W)[] _nodes = Nodes(Points);

    /// <summary>Integral of f from a to b over a number of equal panels.</summary>
    public static double Integrate(Func<double, double> f, double a, double b, int panels = 1)
    {
        double half = 0.5 * (b - a) / panels;
        double sum = 0;
        for (int p = 0; p < panels; p++)
        {
            double middle = a + (((2 * p) + 1) * half);
            foreach ((double x, double w) in _nodes)
            {
                sum += w * f(middle + (half * x));
            }
        }

        return sum * half;
    }

    private static (double X, double W)[] Nodes(int n)
    {
        var nodes = new (double X, double W)[n];
        for (int i = 0; i < n; i++)
        {
            double x = Math.Cos(Math.PI * (i + 0.75) / (n + 0.5));
            double slope = 1;
            for (int round = 0; round < 50; round++)
            {
                double p0 = 1;
                double p1 = x;
                for (int k = 2; k <= n; k++)
                {
                    (p0, p1) = (p1, ((((2 * k) - 1) * x * p1) - ((k - 1) * p0)) / k);
                }

                slope = n * ((x * p1) - p0) / ((x * x) - 1);
                double step = p1 / slope;
                x -= step;
                if (Math.Abs(step) < 1e-16)
                {
                    break;
                }
            }

            nodes[i] = (x, 2 / ((1 - (x * x)) * slope * slope));
        }

        return nodes;
    }
}
