namespace Looseloop.Coil;

/// <summary>A root of one equation in one unknown, bracketed (the Illinois form of regula falsi; Dowell and Jarratt, BIT 11 (1971) 168).</summary>
internal static class Root
{
    /// <summary>The root of f between a and b, or null where f does not change sign there or is not finite.</summary>
    public static double? Bracketed(Func<double, double> f, double a, double b, double relative = 1e-10)
    {
        double fa = f(a);
        double fb = f(b);
        if (fa == 0)
        {
            return a;
        }

        if (fb == 0)
        {
            return b;
        }

        if (!double.IsFinite(fa) || !double.IsFinite(fb) || (fa > 0) == (fb > 0))
        {
            return null;
        }

        for (int round = 0; round < 200 && Math.Abs(b - a) > relative * Math.Max(Math.Abs(a), Math.Abs(b)); round++)
        {
            double c = ((fb * a) - (fa * b)) / (fb - fa);
            double fc = f(c);
            if (!double.IsFinite(fc))
            {
                return null;
            }

            if (fc == 0 || Math.Abs(c - b) <= relative * Math.Abs(c))
            {
                return c;
            }

            if ((fc > 0) == (fb > 0))
            {
                (b, fb) = (c, fc);
                fa *= 0.5;
            }
            else
            {
                (a, fa, b, fb) = (b, fb, c, fc);
            }
        }

        return b;
    }
}
